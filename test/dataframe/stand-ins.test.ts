import { spawnSync } from "node:child_process";
import { mkdtempSync, rmSync, symlinkSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import {
  DataFrame,
  MinMaxScaler,
  readCSV,
  readExcel,
  readJSON,
  Series,
  StandardScaler,
  streamJSON,
} from "danfojs-node";
import { describe, expect, test } from "vitest";

const two = (): DataFrame =>
  new DataFrame(
    [
      [1, 10],
      [2, 20],
      [4, 40],
    ],
    { columns: ["a", "b"] },
  );

describe("arithmetic of frames", () => {
  test("works with a number, a series by row, a series by column, and a frame", () => {
    expect((two().mul(3) as DataFrame).values).toEqual([
      [3, 30],
      [6, 60],
      [12, 120],
    ]);
    expect((two().sub(new Series([1, 2, 4]), { axis: 0 }) as DataFrame).values).toEqual([
      [0, 9],
      [0, 18],
      [0, 36],
    ]);
    expect((two().div(new Series([1, 10]), { axis: 1 }) as DataFrame).values).toEqual([
      [1, 1],
      [2, 2],
      [4, 4],
    ]);
    expect((two().add(two()) as DataFrame).values).toEqual([
      [2, 20],
      [4, 40],
      [8, 80],
    ]);
    expect((two().pow(2) as DataFrame).values).toEqual([
      [1, 100],
      [4, 400],
      [16, 1600],
    ]);
    expect((two().mod(3) as DataFrame).values).toEqual([
      [1, 1],
      [2, 2],
      [1, 1],
    ]);
  });

  test("is in double precision: a third of an amount keeps every digit", () => {
    // 1/3 in IEEE 754 double arithmetic.
    expect((two().div(3) as DataFrame).values[0]![0 as never]).toBe(0.3333333333333333);
  });

  test("rejects shapes that do not match", () => {
    expect(() => two().add(new Series([1, 2]), { axis: 0 })).toThrow();
  });

  test("compares cell by cell", () => {
    expect(two().gt(2).values).toEqual([
      [false, true],
      [false, true],
      [true, true],
    ]);
    expect(two().eq(20).values).toEqual([
      [false, false],
      [false, true],
      [false, false],
    ]);
  });
});

describe("statistics", () => {
  test("divide by n - 1, give medians and modes, and leave the standard deviation of one value undefined", () => {
    const series = new Series([2, 4, 4, 10]);
    expect([series.mean(), series.median(), series.var(), series.std()]).toEqual([5, 4, 12, Math.sqrt(12)]);
    expect(series.mode()).toEqual([4]);
    expect(new Series([7]).std()).toBeNaN();
    expect(new Series([3, 9, 5]).argMax()).toBe(1);
    expect(new Series([3, 9, 5]).argMin()).toBe(0);
  });

  test("scale to the unit interval and to z-scores", () => {
    expect(new MinMaxScaler().fitTransform([1, 2, 5])).toEqual([0, 0.25, 1]);
    // Mean 2, variance with n: 2/3.
    const root = Math.sqrt(2 / 3);
    expect(new StandardScaler().fitTransform([1, 2, 3])).toEqual([-1 / root, 0, 1 / root]);
  });

  test("sample rows without replacement, reproducibly for a seed", async () => {
    const frame = new DataFrame(
      Array.from({ length: 50 }, (_, i) => [i]),
      { columns: ["a"] },
    );
    const drawn = async (seed: number) => (await frame.sample(20, { seed })).values.flat();
    const first = await drawn(4);
    expect(new Set(first).size).toBe(20);
    expect(await drawn(4)).toEqual(first);
    expect(await drawn(5)).not.toEqual(first);
  });
});

test("nothing is read from the network", async () => {
  const address = "http://127.0.0.1:9/record";
  await expect(readJSON(address)).rejects.toThrow("records are not fetched from the network");
  await expect(readExcel(address)).rejects.toThrow("records are not fetched from the network");
  await expect(readCSV(address)).rejects.toThrow("records are not fetched from the network");
  await expect(streamJSON(address, () => undefined)).rejects.toThrow(
    "records are not fetched from the network",
  );
});

test("the frame library is loaded on first use, not by importing the functions", () => {
  const program = `
    require(${JSON.stringify(join(import.meta.dirname, "..", "..", "dist", "kernel-helpers", "functions", "records.js"))});
    const loaded = () => Object.keys(require.cache).filter((path) => /danfojs-node|node-bindings|[\\\\/]xlsx[\\\\/]/.test(path)).length;
    console.log(loaded());`;
  expect(spawnSync(process.execPath, ["-e", program], { encoding: "utf8" }).stdout.trim()).toBe("0");
});

describe.each(["typescript", "typescript-cell"])(
  "the declarations of the frame library, by %s",
  (compiler) => {
    test("compile, and a frame is not of type any", () => {
      const folder = mkdtempSync(join(tmpdir(), "periodwise-types-"));
      const packages = join(import.meta.dirname, "..", "..", "node_modules");
      symlinkSync(packages, join(folder, "node_modules"));
      writeFileSync(
        join(folder, "cell.ts"),
        `import { DataFrame, streamJSON } from "danfojs-node";
       export const frame: DataFrame = new DataFrame([[1]], { columns: ["a"] }).add(1) as DataFrame;
       // @ts-expect-error a frame is no text
       export const text: string = frame;
       export { streamJSON };`,
      );
      const flags = [
        "--noEmit",
        "--strict",
        "--skipLibCheck",
        "false",
        "--module",
        "commonjs",
        "--moduleResolution",
        "node10",
        "--target",
        "es2020",
        "--lib",
        "es2020,dom",
        "--esModuleInterop",
        "--types",
        "node",
      ];
      const compiled = spawnSync(
        process.execPath,
        [join(packages, compiler, "lib", "tsc.js"), ...flags, "cell.ts"],
        { cwd: folder, encoding: "utf8" },
      );
      rmSync(folder, { recursive: true, force: true });
      expect(compiled.stdout).toBe("");
    });
  },
);
