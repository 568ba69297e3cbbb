import { measureEngineOverhead } from "./engine-overhead";
import { measureFirstLoad } from "./first-load";
import { measureJournalAppend } from "./journal-append";
import { measureLiveLatency } from "./live-latency";
import { measureSettling } from "./settling";

await measureJournalAppend();
await measureLiveLatency();
await measureEngineOverhead();
measureSettling();
await measureFirstLoad();
process.exit(0);
