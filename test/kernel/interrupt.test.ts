import { setTimeout as pause } from "node:timers/promises";
import { describe, expect, test } from "vitest";
import { type Ran, testFolder, testKernel, writeInto } from "./kernel-in-test.js";

const folder = testFolder({
  "spin.js": "exports.spin = () => { for (;;) {} };\n",
  "spin.d.ts": "export function spin(): never;\n",
});
writeInto(
  folder,
  "node_modules/busy/package.json",
  '{ "name": "busy", "main": "index.js", "types": "index.d.ts" }',
);
writeInto(folder, "node_modules/busy/index.js", "exports.busy = () => { for (;;) {} };\n");
writeInto(folder, "node_modules/busy/index.d.ts", "export function busy(): never;\n");
const kernel = await testKernel(folder);
await kernel.run("let kept = 41;");

/** A computation that looks up from its work, as those of a package should. */
const asking = `
const asks = globalThis[Symbol.for("periodwise.interrupt")];
exports.asks = asks;
exports.rounds = () => { let n = 0; while (!asks()) n += 1; return n; };
`;

/** Runs a cell that says when it has begun, and interrupts it then. */
async function interrupted(code: string): Promise<Ran> {
  const ran = kernel.run(code);
  await pause(600);
  kernel.conversation.interrupt();
  return ran;
}

// Source: Jupyter client documentation, "Messaging in Jupyter", "Kernel interrupt"; what is stopped is our promise.
describe("an interrupt", () => {
  test.each([
    ["a busy loop", "kept += 1;\nfor (;;) {}"],
    ["a wait", "kept += 1;\nawait new Promise(r => setTimeout(r, 60_000));"],
    ["a loop after a wait", "kept += 1;\nawait new Promise(r => setTimeout(r, 5));\nfor (;;) {}"],
    ["a loop inside a function of an earlier cell", "kept += 1;\nawait null;\n(() => { while (true) ; })();"],
    ["a loop that waits", "kept += 1;\nfor (;;) await new Promise(r => setTimeout(r, 5));"],
    ["a loop that catches everything", "kept += 1;\nfor (;;) { try { for (;;) {} } catch {} }"],
    ["a loop in a package after a wait", 'import { busy } from "busy";\nawait null;\nkept += 1;\nbusy();'],
    ["a loop in a package, which has no checks", 'import { busy } from "busy";\nkept += 1;\nbusy();'],
  ])("stops %s and keeps what was set", async (_, code) => {
    const before = Number((await kernel.run("kept")).value);
    const { reply } = await interrupted(code);
    expect(reply).toMatchObject({ status: "error", ename: "Interrupted" });
    expect((await kernel.run("kept")).value).toBe(String(before + 1));
  });

  test("ends the pending work of a stopped cell", async () => {
    await interrupted("kept = 0;\nfor (;;) { await new Promise(r => setTimeout(r, 5)); kept += 1; }");
    const then = (await kernel.run("await new Promise(r => setTimeout(r, 50)); kept")).value;
    expect((await kernel.run("await new Promise(r => setTimeout(r, 50)); kept")).value).toBe(then);
  });

  test("does not affect an idle kernel or the next cell", async () => {
    kernel.conversation.interrupt();
    await pause(200);
    expect((await kernel.run("let n = 0; for (let i = 0; i < 1000; i++) n += i; n")).value).toBe("499500");
  });

  test("can be queried by a long computation", async () => {
    writeInto(folder, "node_modules/busy/asks.js", asking);
    await kernel.run('require("busy/asks").asks()');
    const { value } = await interrupted('const { rounds } = require("busy/asks"); rounds() > 0');
    expect(value).toBe("true");
    expect((await kernel.run('require("busy/asks").asks()')).value).toBe("false");
  });

  test("aborts the queued cells", async () => {
    const first = interrupted("for (;;) {}");
    const second = kernel.run("'ran'");
    expect((await first).reply["status"]).toBe("error");
    expect((await second).reply["status"]).toBe("aborted");
  });
});
