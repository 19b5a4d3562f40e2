import { expect, test } from "vitest";
import { correct, decisionsLog, undo } from "../../kernel-helpers/commands/corrections.js";
import { observations, readRecord } from "../../kernel-helpers/commands/records.js";
import { sourceOf } from "../../kernel-helpers/dataframe/index.js";
import { bundleOf } from "../../kernel-helpers/tables/index.js";

test("a corrected frame shows the raw and the used column, keeps its source, and can be taken back", async () => {
  const read = await readRecord("test/record/fixtures/ferry-loan.csv");
  const checked = correct(read, {
    row: 14,
    column: "payment",
    now: 377,
    why: "35.00 of it was a fee",
    who: "A. K.",
  });
  expect(checked.columns).toEqual(["month", "closing_balance", "payment", "payment (corrected)"]);
  expect(checked.column("payment").values[13]).toBe(412);
  expect(checked.column("payment (corrected)").values[13]).toBe(377);
  expect(sourceOf(checked)).toEqual(sourceOf(read));
  const owed = observations(checked, {
    period: "month",
    step: "month",
    value: "closing_balance",
    inputs: ["payment"],
  });
  expect(owed.groups[0]!.inputs["payment"]![13]).toBe(377);
  expect((await bundleOf(decisionsLog(owed)))?.["text/plain"]).toContain("35.00 of it was a fee");
  const back = undo(checked);
  expect(back.columns).toEqual(read.columns);
  expect(back.values).toEqual(read.values);
});
