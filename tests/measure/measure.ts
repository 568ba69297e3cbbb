import { measureEngineOverhead } from "./engine-overhead";
import { measureFirstLoad } from "./first-load";
import { measureJournalAppend } from "./journal-append";
import { measureLiveLatency } from "./live-latency";
import { measureSettling } from "./settling";
import { measureStop } from "./stop";

await measureJournalAppend();
await measureLiveLatency();
await measureEngineOverhead();
measureSettling();
await measureStop();
await measureFirstLoad();
process.exit(0);
