import { handler } from "@/lib/server/handler";
import { getServices } from "@/lib/server/services";

export const GET = handler("bench.watch", async () => Response.json(getServices().benches.snapshots()));
