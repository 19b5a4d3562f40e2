import { expect, test } from "vitest";
import { sourceOf } from "../../kernel-helpers/dataframe/index.js";
import { differences, observations, readRecord } from "../../kernel-helpers/functions/records.js";
import { bundleOf } from "../../kernel-helpers/tables/index.js";

const fixtures = "test/record/fixtures";

test("a file becomes a frame, observations and differences, each with a display", async () => {
  const frame = await readRecord(`${fixtures}/ferry-loan.csv`);
  expect(frame.columns).toEqual(["month", "closing_balance", "payment"]);
  expect(frame.shape).toEqual([24, 3]);
  const owed = observations(frame, {
    period: "month",
    step: { every: 1, of: "month" },
    value: "closing_balance",
    inputs: ["payment"],
  });
  const changes = differences(owed);
  expect(changes.series[0]!.steps[8]).toBe(2);
  for (const shown of [frame, owed, changes]) {
    const bundle = await bundleOf(shown);
    expect(bundle?.["text/plain"]).toContain("24 rows");
  }
});

test("the checksum of the file stays with the frame", async () => {
  // Source: sha256sum of GNU coreutils on the same file.
  const frame = await readRecord(`${fixtures}/ferry-loan.csv`);
  expect(sourceOf(frame)?.checksum).toBe("57bfae39229157795d7b1a78abfb90a8e69f24c2961db399eef36871b77f402f");
});
