import { afterEach, describe, expect, test } from "vitest";
import { durationText } from "../../kernel-helpers/progress/duration-text.js";
import { progress, progressAt } from "../../kernel-helpers/progress/progress.js";
import { withProgress } from "../../kernel-helpers/progress/with-progress.js";

const display = Symbol.for("periodwise.display");
const interrupt = Symbol.for("periodwise.interrupt");
const offered = globalThis as { [name: symbol]: unknown };

afterEach(() => {
  delete offered[display];
  delete offered[interrupt];
});

/** A place with a clock that the test sets, and a list of what was shown. */
function watched(): {
  clock: { seconds: number };
  lines: string[];
  stop: { asked: boolean };
  place: Parameters<typeof progressAt>[0];
} {
  const clock = { seconds: 0 };
  const lines: string[] = [];
  const stop = { asked: false };
  const place = {
    now: () => clock.seconds,
    show: (line: string) => void lines.push(line),
    interrupted: () => stop.asked,
  };
  return { clock, lines, stop, place };
}

test("progress shows the amount done, the total, the speed and the time left", () => {
  const { clock, lines, place } = watched();
  const shown = progressAt(place, "Refits", 1200);
  clock.seconds = 4;
  shown.at(300);
  expect(lines).toEqual(["Refits: 300 of 1,200 (25%), 75 per second, 12 s left"]);
});

test("work under a second shows nothing, and updates are at most five per second", () => {
  const { clock, lines, place } = watched();
  const shown = progressAt(place, "Refits", 100);
  clock.seconds = 0.9;
  shown.advance(50);
  expect(lines).toEqual([]);
  clock.seconds = 1.1;
  shown.advance();
  clock.seconds = 1.2;
  shown.advance();
  expect(lines).toHaveLength(1);
});

test("it ends once, with a final line", () => {
  const { clock, lines, place } = watched();
  const shown = progressAt(place, "Refits", 200);
  clock.seconds = 2;
  shown.at(100);
  clock.seconds = 8;
  shown.at(200);
  expect(shown.end()).toBe("Refits: 200 of 200 in 8.0 s, 25 per second.");
  shown.end();
  expect(lines.at(-1)).toBe("Refits: 200 of 200 in 8.0 s, 25 per second.");
  expect(lines).toHaveLength(3);
});

test("work of a few seconds leaves no line", () => {
  const { clock, lines, place } = watched();
  const shown = progressAt(place, "Refits", 200);
  clock.seconds = 2;
  shown.at(100);
  shown.end();
  expect(lines).toEqual([expect.stringContaining("100 of 200"), ""]);
});

test("without a total it counts", () => {
  const { clock, lines, place } = watched();
  const shown = progressAt(place, "Series");
  clock.seconds = 2;
  shown.advance(3000);
  expect(lines).toEqual(["Series: 3,000 done, 1,500 per second"]);
});

test("an interrupt takes effect at the next step, and the final line says where it stopped", () => {
  const { clock, lines, stop, place } = watched();
  const shown = progressAt(place, "Refits", 200);
  clock.seconds = 3;
  stop.asked = true;
  expect(() => shown.at(57)).toThrowError(
    expect.objectContaining({
      name: "ModelError",
      code: "interrupted",
      message:
        "Refits: stopped at 57 of 200 after 3.0 s. The calculation was interrupted and has no result. Run it again.",
    }),
  );
  expect(lines).toEqual(["Refits: stopped at 57 of 200 after 3.0 s."]);
});

describe("in a notebook", () => {
  test("one display is updated in place", async () => {
    const calls: { text: string; id: string; update: boolean }[] = [];
    offered[display] = (bundle: Record<string, string>, options: { display_id: string; update: boolean }) =>
      void calls.push({ text: bundle["text/plain"] ?? "", id: options.display_id, update: options.update });
    const shown = progress("<b>Refits</b>", 2);
    await new Promise((done) => setTimeout(done, 1100));
    shown.advance();
    shown.end();
    expect(calls.map(({ update }) => update)).toEqual([false, true]);
    expect(new Set(calls.map(({ id }) => id)).size).toBe(1);
    expect(calls[0]?.text).toMatch(/^<b>Refits<\/b>: 1 of 2 \(50%\)/);
    expect(calls[1]?.text).toBe("");
  });

  test("an interrupt of the kernel stops the work", () => {
    offered[interrupt] = () => true;
    expect(() => withProgress("Refits", 2, ({ advance }) => advance())).toThrowError(
      /^Refits: stopped at 1 of 2/,
    );
  });
});

test("withProgress returns the value or promise of the work", async () => {
  expect(withProgress("Sum", 1, () => 7)).toBe(7);
  await expect(withProgress("Sum", 1, async () => 8)).resolves.toBe(8);
});

test.each([
  [0.04, "0.0 s"],
  [59.6, "1 min"],
  [130, "2 min 10 s"],
  [3900, "1 h 05 min"],
])("%d seconds are written as %s", (seconds, text) => {
  expect(durationText(seconds)).toBe(text);
});
