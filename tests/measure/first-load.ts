import { gzipSync } from "node:zlib";
import { ApiClient } from "../support/api-client";
import { startServer, temporaryDataFolder } from "../support/server-process";
import { printFigure } from "./figure";

/** JavaScript that each page loads at first, compressed, as the server sends it. */
export async function measureFirstLoad(): Promise<void> {
  const { dataFolder, remove } = temporaryDataFolder();
  const server = await startServer(dataFolder, { STEPWELL_DEMO: "register" });
  try {
    const client = await ApiClient.signIn(server.url, "ines.marlow@thornmere.example");
    const pages = await pagesToLoad(client);
    for (const [name, path] of pages)
      printFigure(`first_load_js_${name}`, (await scriptBytes(client, path)) / 1000, "kB");
  } finally {
    await server.kill("SIGTERM");
    remove();
  }
}

async function pagesToLoad(client: ApiClient): Promise<[string, string][]> {
  const [bench] = await client.json<{ id: string }[]>("GET", "/api/benches");
  const [unit] = await client.json<{ id: string }[]>("GET", "/api/units?search=0412");
  const recipes = await client.json<{ id: string; recipeId: string; document: { name: string } }[]>(
    "GET",
    "/api/recipes",
  );
  const quick = recipes.find(({ document }) => document.name === "Quick check")!;
  const runId = await client.startRun({ benchId: bench!.id, unitId: unit!.id, recipeVersionId: quick.id }, 60);
  return [
    ["sign_in", "/sign-in"],
    ["benches", "/benches"],
    ["run_live", `/runs/${runId}`],
    ["start", `/benches/${bench!.id}/start`],
    ["runs", "/runs"],
    ["replay", `/runs/${runId}/replay`],
    ["results", `/runs/${runId}/results`],
    ["recipes", "/recipes"],
    ["recipe", `/recipes/${quick.recipeId}`],
    ["recipe_form", "/recipes/new"],
  ];
}

async function scriptBytes(client: ApiClient, path: string): Promise<number> {
  const html = await (await client.request("GET", path)).text();
  const sources = new Set(
    [...html.matchAll(/<script[^>]+src="(\/_next\/static\/[^"]+\.js)"/gu)].map((match) => match[1]!),
  );
  if (sources.size === 0) throw new Error(`${path} names no scripts`);
  const sizes = [...sources].map(async (source) => {
    const script = await client.request("GET", source);
    return gzipSync(Buffer.from(await script.arrayBuffer())).length;
  });
  return (await Promise.all(sizes)).reduce((sum, size) => sum + size, 0);
}
