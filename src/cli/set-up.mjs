/**
 * Prepares a checkout: installs the locked packages when they are missing or out of date, then builds what is stale.
 * Uses only Node itself, so that it works before anything is installed.
 */
import { spawnSync } from "node:child_process";
import { createHash } from "node:crypto";
import { existsSync, readFileSync, writeFileSync } from "node:fs";
import { dirname, join } from "node:path";
import { fileURLToPath } from "node:url";

const root = join(dirname(fileURLToPath(import.meta.url)), "..", "..");
const stamp = join(root, "node_modules", ".periodwise-set-up");

function run(program, args) {
  const done = spawnSync(program, args, { cwd: root, stdio: ["ignore", "inherit", "inherit"] });
  if (done.error) throw done.error;
  if (done.status !== 0) process.exit(done.status ?? 1);
}

function wanted() {
  const lock = readFileSync(join(root, "package-lock.json"));
  const machine = `${process.versions.modules} ${process.platform} ${process.arch}`;
  return createHash("sha256").update(lock).update(machine).digest("hex");
}

function installed() {
  return existsSync(stamp) ? readFileSync(stamp, "utf8") : "";
}

const [major = 0, minor = 0] = process.versions.node.split(".").map(Number);
if (major < 20 || (major === 20 && minor < 19)) {
  console.error(`Periodwise needs Node 20.19 or later; this is ${process.versions.node}.`);
  process.exit(1);
}
if (installed() !== wanted()) {
  const npm = process.env.npm_execpath;
  if (!npm) {
    console.error("Run this through npm, for example: npm start");
    process.exit(1);
  }
  run(process.execPath, [npm, "ci", "--loglevel=error"]);
  writeFileSync(stamp, wanted());
}
run(process.execPath, [join(root, "node_modules", "typescript", "bin", "tsc"), "-b"]);
