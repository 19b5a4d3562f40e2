// Held to: a million rows of text to observations within 1.5 times the database engine's own read of the file; ten
// million rows streamed series by series with the process below 500 MB.
import { spawnSync } from "node:child_process";
import { createWriteStream, mkdtempSync, rmSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { Readable } from "node:stream";
import { pipeline } from "node:stream/promises";
import { DuckDBInstance } from "@duckdb/node-api";
import { bench } from "vitest";
import { randomStream } from "../../src/numeric/index.js";
import { observations } from "../../src/record/index.js";
import { readTable } from "../../src/store/index.js";

const folder = mkdtempSync(join(tmpdir(), "periodwise-bench-"));

/** Weekly stock of many items, a made-up record: series, week, stock, receipts. */
function* lines(items: number, weeks: number): Generator<string> {
  const stream = randomStream(20260401);
  yield "series,week,stock,receipts\n";
  for (let item = 0; item < items; item++) {
    let text = "";
    for (let week = 0; week < weeks; week++)
      text += `item-${item},${week},${(50 + 40 * stream.uniform()).toFixed(3)},${Math.floor(60 * stream.uniform())}\n`;
    yield text;
  }
}

async function made(name: string, items: number, weeks: number): Promise<string> {
  const path = join(folder, name);
  await pipeline(Readable.from(lines(items, weeks)), createWriteStream(path));
  return path;
}

async function times(repeats: number, work: () => Promise<unknown>): Promise<number> {
  const taken: number[] = [];
  for (let k = 0; k < repeats; k++) {
    const start = performance.now();
    await work();
    taken.push(performance.now() - start);
  }
  return taken.sort((a, b) => a - b)[repeats >> 1]!;
}

const options = { period: "week", step: "week", value: "stock", by: "series", inputs: ["receipts"] } as const;
const connection = await (await DuckDBInstance.create(":memory:")).connect();

for (const [items, weeks] of [
  [1000, 1000],
  [1, 1_000_000],
] as const) {
  const path = await made(`million-${items}.csv`, items, weeks);
  const engine = () =>
    connection.run(`SELECT * FROM read_csv('${path}')`).then((result) => result.fetchAllChunks());
  const ours = async () => observations(await readTable(path), options);
  await engine();
  await ours();
  const [alone, whole] = [await times(7, engine), await times(7, ours)];
  console.log(
    `a million rows, ${items} series: engine ${alone.toFixed(0)} ms, to observations ${whole.toFixed(0)} ms, ` +
      `ratio ${(whole / alone).toFixed(2)} (held to 1.5)`,
  );
}

// A process of its own, so that what is measured is the streaming and nothing that went before it.
const long = await made("ten-million.csv", 10_000, 1000);
const program = `
  const { streamSeries } = require(${JSON.stringify(join(import.meta.dirname, "..", "..", "dist", "src", "store", "index.js"))});
  (async () => {
    let series = 0, rows = 0, peak = 0;
    const start = performance.now();
    for await (const one of streamSeries(${JSON.stringify(long)}, { by: "series", memory: "128MB" })) {
      series++; rows += one.rows.length;
      if (series % 50 === 0) peak = Math.max(peak, process.memoryUsage.rss());
    }
    console.log("ten million rows by series: " + series + " series, " + rows + " rows, " +
      ((performance.now() - start) / 1000).toFixed(1) + " s, peak " + Math.round(process.resourceUsage().maxRSS / 1024) + " MB (held to 500)");
  })();`;
console.log(spawnSync(process.execPath, ["-e", program], { encoding: "utf8" }).stdout.trim());

bench(
  "a small record, read and observed",
  async () => {
    observations(await readTable("test/record/fixtures/stock-trace.csv"), {
      period: "week",
      step: "week",
      value: "closing_on_hand",
    });
  },
  { time: 300, teardown: () => rmSync(folder, { recursive: true, force: true }) },
);
