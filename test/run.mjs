/**
 * Runs the tests and ends with the line that CI reads: how many passed, failed and were skipped.
 * Extra arguments go to vitest, so `npm test -- test/rule` runs one folder.
 */
import { spawnSync } from "node:child_process";
import { mkdtempSync, readFileSync, rmSync } from "node:fs";
import { tmpdir } from "node:os";
import { dirname, join } from "node:path";
import { fileURLToPath } from "node:url";

const root = join(dirname(fileURLToPath(import.meta.url)), "..");
const folder = mkdtempSync(join(tmpdir(), "periodwise-tests-"));
const report = join(folder, "report.json");
const vitest = join(root, "node_modules", "vitest", "vitest.mjs");
const settings = join("test", "vitest.config.ts");
const reporters = ["--reporter=default", "--reporter=json", `--outputFile.json=${report}`];
const done = spawnSync(
  process.execPath,
  [vitest, "run", "--config", settings, ...reporters, ...process.argv.slice(2)],
  { cwd: root, stdio: ["ignore", "inherit", "inherit"], env: { ...process.env, TZ: "UTC" } },
);

let status = done.status ?? 1;
try {
  const told = JSON.parse(readFileSync(report, "utf8"));
  const skipped = told.numPendingTests + (told.numTodoTests ?? 0);
  if (status === 0 && told.numPassedTests === 0) status = 1;
  console.log(`${told.numPassedTests} passed, ${told.numFailedTests} failed, ${skipped} skipped`);
} catch (cause) {
  console.error(`The test report could not be read: ${cause.message}`);
  status = 1;
}
rmSync(folder, { recursive: true, force: true });
process.exit(status);
