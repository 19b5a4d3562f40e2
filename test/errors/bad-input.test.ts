// Whole messages for wrong input: what is wrong, where, and what to type instead.
import { mkdtempSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { afterAll, expect, test } from "vitest";
import { fit, type Observations, observations, readRecord, recurrence } from "../../kernel-helpers/index.js";

const folder = mkdtempSync(join(tmpdir(), "periodwise-bad-input-"));
afterAll(() => rmSync(folder, { recursive: true, force: true }));

const crowding = recurrence("ΔN = r*N*(1 - N/K)");
const weekly = (values: readonly number[]): Observations =>
  observations(
    { week: values.map((_, week) => week), count: [...values] },
    { period: "week", step: { every: 1, of: "week" }, value: "count" },
  );

/** The message of the error that `act` throws. */
async function errorMessage(act: () => unknown): Promise<string> {
  try {
    await act();
  } catch (error) {
    const { name, code, message } = error as { name: string; code: string; message: string };
    return `${name} ${code}\n${message}`;
  }
  return "no error";
}

async function file(name: string, text: string): Promise<Awaited<ReturnType<typeof readRecord>>> {
  const path = join(folder, name);
  writeFileSync(path, text);
  return readRecord(path);
}

test("an unknown name in a rule", async () => {
  const message = await errorMessage(() =>
    recurrence("N[t+1] = N + r*N*(1 - N/capcity)", { parameters: ["r", "capacity"] }),
  );
  expect(message).toMatchInlineSnapshot(`
    "ModelError unknown-name
    Unknown name "capcity" in the rule.
        N[t+1] = N + r*N*(1 - N/capcity)
                                ^^^^^^^
    Known parameters: r, capacity. Other names: N. Did you mean "capacity"?"
  `);
});

test("a missing column", async () => {
  const frame = await file("column.csv", "week,count\n0,12\n1,15\n2,19\n");
  const message = await errorMessage(() =>
    observations(frame, { period: "week", step: { every: 1, of: "week" }, value: "cuont" }),
  );
  expect(message).toMatchInlineSnapshot(`
    "ModelError missing-column
    The record has no column "cuont", asked for as a value. Its columns are "week", "count". Did you mean "count"?"
  `);
});

test("a non-number in a number column", async () => {
  const frame = await file("text.csv", "week,count\n0,12\n1,about 15\n2,19\n");
  const message = await errorMessage(() =>
    observations(frame, { period: "week", step: { every: 1, of: "week" }, value: "count" }),
  );
  expect(message).toMatchInlineSnapshot(`
    "ModelError not-a-number
    Row 2, count: "about 15" is not a number. If it marks a missing value, read the file with missing: ["about 15"]; otherwise correct the cell."
  `);
});

test("too few rows", async () => {
  const message = await errorMessage(() =>
    fit(crowding, weekly([12, 15, 19, 24, 28]), { errors: "observation" }),
  );
  expect(message).toMatchInlineSnapshot(`
    "ModelError too-few-observations
    5 usable values for 3 unknowns (r, K, N[0]): not fitted. At least 6 are needed; use a rule with fewer parameters, fix some with { fixed }, or wait for more rows."
  `);
});

test("all values equal", async () => {
  const message = await errorMessage(() =>
    fit(crowding, weekly([12, 12, 12, 12, 12, 12, 12]), { errors: "observation" }),
  );
  expect(message).toMatchInlineSnapshot(`
    "ModelError no-change
    The value never changes (it is 12 in every row): a multiplier of 1 cannot be separated from no process at all. Check the column, or wait for a record that moves."
  `);
});

test("a rule that leaves the finite range", async () => {
  const exploding = recurrence("N[t+1] = exp(a*N) + 1e200*N", { bounds: { a: [5, 9] } });
  const message = await errorMessage(() =>
    fit(exploding, weekly([12, 15, 19, 24, 28, 33, 37]), { errors: "observation" }),
  );
  expect(message).toMatchInlineSnapshot(`
    "ModelError no-finite-start
    No parameters were found at which "N[t+1] = exp(a*N) + 1e200*N" stays finite over the record. Give { start: { ... } } near plausible values, or { bounds: { ... } } that keep the rule in its range."
  `);
});
