import { ApiClient, eventually } from "../support/api-client";
import { startServer, temporaryDataFolder } from "../support/server-process";
import { percentile, printFigure } from "./figure";

const STOPS = 5;

/** From the stop that a person sends to the answer that the output is off and proven off, at the bench's real time, with the output on. */
export async function measureStop(): Promise<void> {
  const { dataFolder, remove } = temporaryDataFolder();
  const server = await startServer(dataFolder, { STEPWELL_DEMO: "register" });
  try {
    const client = await ApiClient.signIn(server.url, "ines.marlow@thornmere.example");
    const [unit] = await client.json<{ id: string }[]>("GET", "/api/units?search=0412");
    const recipes = await client.json<{ id: string; document: { name: string } }[]>("GET", "/api/recipes");
    const recipe = recipes.find(({ document }) => document.name === "Five-voltage accuracy")!;
    const times: number[] = [];
    while (times.length < STOPS) times.push(await timeOneStop(client, unit!.id, recipe.id));
    printFigure("stop_to_proven_off_median", percentile(times, 0.5), "ms");
    printFigure("stop_to_proven_off_longest", Math.max(...times), "ms");
  } finally {
    await server.kill("SIGTERM");
    remove();
  }
}

async function timeOneStop(client: ApiClient, unitId: string, recipeVersionId: string): Promise<number> {
  const runId = await client.startRun({ benchId: "north", unitId, recipeVersionId }, 1);
  await eventually(async () => (await client.state(runId)).output.state === "on", 30_000, "the output is on");
  const from = performance.now();
  await client.command(runId, "stop");
  const elapsed = performance.now() - from;
  const { output } = await client.state(runId);
  if (output.state !== "off") throw new Error(`the output is ${output.state} after a stop`);
  return elapsed;
}
