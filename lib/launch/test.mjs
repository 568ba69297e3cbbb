// `npm test`: makes ready what is missing (Chromium from the system's packages included), then runs every check.
import { existsSync } from "node:fs";
import { buildPages, installPackages, root, run } from "./prepare.mjs";

const CHROMIUM = "/usr/bin/chromium";

function installChromium() {
  if (existsSync(CHROMIUM)) return;
  console.log("Installing Chromium from the system's packages …");
  const asRoot = process.getuid?.() === 0 ? [] : ["sudo"];
  const [update, install] = [
    ["apt-get", "update", "-qq"],
    ["apt-get", "install", "-y", "-qq", "chromium"],
  ];
  for (const command of [update, install]) {
    const [program, ...args] = [...asRoot, ...command];
    run(program, args, { env: { ...process.env, DEBIAN_FRONTEND: "noninteractive" } });
  }
}

function step(title, args, environment = {}) {
  console.log(`\n${title}`);
  run(process.execPath, args, { env: { ...process.env, NEXT_TELEMETRY_DISABLED: "1", ...environment } });
}

process.chdir(root);
installPackages();
installChromium();
step("Lint", ["node_modules/eslint/bin/eslint.js", "."]);
step("Format", ["node_modules/prettier/bin/prettier.cjs", "--check", "--log-level=warn", "."]);
buildPages();
step("Types", ["node_modules/typescript/bin/tsc", "--noEmit"]);
step("Unit and integration tests", ["node_modules/vitest/vitest.mjs", "run"]);
step("Browser tests", ["node_modules/vitest/vitest.mjs", "run", "--config", "tests/end-to-end/vitest.config.ts"]);
