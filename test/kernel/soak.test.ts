import { readFileSync } from "node:fs";
import { expect, test } from "vitest";
import { testKernel } from "./kernel-in-test.js";

const cells = 500;
const grown = 1.5;

/** Resident memory of a process, in kB; where the system does not tell, the test of memory is left out. */
function residentKb(pid: number): number {
  try {
    return Number(/VmRSS:\s+(\d+)/.exec(readFileSync(`/proc/${pid}/status`, "utf8"))?.[1] ?? 0);
  } catch {
    return 0;
  }
}

// Source: common practice, no source; the bound is our promise. Cells declare again, as a notebook's do when they
// are run over and over; the work done for a cell is counted by the processor time it takes, not by the clock.
test(`${cells} cells in one kernel do not increase memory or cost`, { timeout: 300_000 }, async () => {
  const kernel = await testKernel();
  const pid = Number((await kernel.run("process.pid")).value);
  const cost = async (): Promise<number> => {
    const { value } = await kernel.run("const spent = process.cpuUsage(); spent.user + spent.system");
    return Number(value);
  };
  const batch = async (from: number, count: number): Promise<number> => {
    const before = await cost();
    for (let i = from; i < from + count; i++) {
      const { value } = await kernel.run(
        `const level${i % 20} = ${i};\nfunction next(n: number): number { return n * 2; }\nconsole.log("cell", ${i});\nnext(level${i % 20})`,
      );
      expect(value).toBe(String(i * 2));
    }
    return ((await cost()) - before) / count;
  };
  await batch(0, 100);
  const memoryThen = residentKb(pid);
  const costThen = await batch(100, 50);
  await batch(150, 300);
  const costNow = await batch(450, 50);
  expect(costNow / costThen).toBeLessThan(grown);
  if (memoryThen > 0) expect(residentKb(pid) / memoryThen).toBeLessThan(grown);
});
