import { spawnSync } from "node:child_process";
import { join } from "node:path";
import { Resvg } from "@resvg/resvg-js";
import { describe, expect, test } from "vitest";
import { figure, resetPlotLibrary } from "../../kernel-helpers/figures/index.js";
import { bundleOf } from "../../kernel-helpers/tables/index.js";
import { figuresOfEveryKind } from "./all-kinds.js";

const points = { mark: "points", name: "counted", x: [0, 1], y: [90, 83] } as const;
const axes = { x: { title: "Week" }, y: { title: "Stock", unit: "coils" } };

describe.each(Object.entries(figuresOfEveryKind))("a %s figure", (_, drawn) => {
  const shown = bundleOf(drawn);

  test("has a picture, a plot and a text", async () => {
    const bundle = (await shown) ?? {};
    const png = Buffer.from(String(bundle["image/png"]), "base64");
    // Source: W3C, PNG specification: signature, then the header with width and height in bytes 16 to 23.
    expect(png.subarray(0, 8)).toEqual(Buffer.from([137, 80, 78, 71, 13, 10, 26, 10]));
    expect(png.readUInt32BE(16)).toBeGreaterThan(1000);
    expect(bundle["text/html"]).toContain(`base64,${bundle["image/png"]}`);
  });

  test("gives title, axes with units, and data as text", async () => {
    const text = String((await shown)?.["text/plain"]);
    expect(text.startsWith(drawn.title)).toBe(true);
    for (const { x, y } of drawn.panels) {
      for (const { title, unit } of [x, y])
        expect(text).toContain(unit ? `${title} (${unit.replace("10^4", "10⁴")}` : title);
    }
    expect(text).toMatch(/^─+ {2}─/m);
  });
});

test("the picture is a valid PNG, and the same each time", async () => {
  const [a, b] = await Promise.all(
    [0, 1].map(() => bundleOf(figure({ title: "Stock", ...axes, layers: [points] }))),
  );
  expect(a?.["image/png"]).toBe(b?.["image/png"]);
  const frame = `<svg xmlns="http://www.w3.org/2000/svg" width="9" height="9"><image width="9" height="9" href="data:image/png;base64,${a?.["image/png"]}"/></svg>`;
  const { pixels } = new Resvg(frame).render();
  // The renderer draws nothing of a picture that it cannot decode; the ground of ours is opaque.
  expect(Math.max(...pixels)).toBe(255);
});

test("the plotting library is included once, with at most 1.3 million characters, and again after a reset", async () => {
  resetPlotLibrary();
  const made = () => bundleOf(figure({ title: "Stock", ...axes, layers: [points] }));
  const htmls = [await made(), await made()].map((bundle) => String(bundle?.["text/html"]));
  const library = /<script data-periodwise="library">[\s\S]*?<\/script>/;
  expect(htmls[0]).toMatch(library);
  expect(htmls[0]?.length).toBeLessThan(1.3e6);
  expect(htmls[1]).not.toMatch(library);
  // A figure beyond the first adds its data, its picture and little else.
  expect(htmls[1]?.length).toBeLessThan(60_000);
  resetPlotLibrary();
  expect(String((await made())?.["text/html"])).toMatch(library);
});

test("hostile texts stay text in every representation", async () => {
  const hostile = `<img src=x onerror=alert(1)></script><!-- $x$ "' & \u202eabc \u{1f41f}`;
  const bundle = await bundleOf(
    figure({
      title: hostile,
      x: { title: hostile, unit: hostile },
      y: { title: hostile, scale: "category" },
      layers: [
        { mark: "bars", horizontal: true, name: hostile, x: [1], y: [hostile] },
        { mark: "vertical", name: hostile, x: 1 },
      ],
      notes: [hostile],
      summary: hostile,
    }),
  );
  const html = String(bundle?.["text/html"]).replace(
    /<script data-periodwise="library">[\s\S]*?<\/script>/,
    "",
  );
  expect(html.match(/<img/g)).toHaveLength(1);
  expect(html.match(/<\/script/g)).toHaveLength(1);
  expect(html).not.toContain("<!--");
  const outside = html.replace(/<script>[\s\S]*?<\/script>/g, "");
  expect(outside).not.toContain("\u202e");
  expect(bundle?.["text/plain"]).toContain("<img src=x onerror=alert(1)></script>");
});

test("an empty figure is rejected", () => {
  expect(() => figure({ title: "Stock" })).toThrowErrorMatchingInlineSnapshot(
    `[ModelError: Figure "Stock" is empty. Give \`x\`, \`y\` and \`layers\`, or \`panels\` with at least one layer each.]`,
  );
});

test("an idle picture worker does not keep a program alive", () => {
  const built = join(import.meta.dirname, "..", "..", "dist", "kernel-helpers", "figures", "index.js");
  const done = spawnSync(process.execPath, ["-e", `require(${JSON.stringify(built)}).startPictureWorker()`], {
    timeout: 30_000,
  });
  expect(done.status).toBe(0);
});
