// `npm start` and `npm run dev`: makes ready what is missing, then becomes the server in this very process.
import path from "node:path";
import { pathToFileURL } from "node:url";
import { buildPages, installPackages, root } from "./prepare.mjs";

const isDevelopment = process.argv.includes("--dev");

process.chdir(root);
process.env.NODE_ENV = isDevelopment ? "development" : "production";
process.env.NEXT_TELEMETRY_DISABLED = "1";
installPackages();
if (!isDevelopment) buildPages();
const { register } = await import("tsx/esm/api");
register();
await import(pathToFileURL(path.join(root, "server.ts")).href);
