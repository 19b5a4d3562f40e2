import { cpSync, mkdtempSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import {
  fit,
  forecast,
  observations,
  openCase,
  readRecord,
  recurrence,
  timeToReach,
} from "../../kernel-helpers/index.js";
import { yeast } from "../published/carlson-yeast.js";

let made: Promise<Readonly<Record<string, unknown>>> | undefined;

/** Values that examples speak of without making them. */
export function scope(): Promise<Readonly<Record<string, unknown>>> {
  made ??= make();
  return made;
}

async function make(): Promise<Readonly<Record<string, unknown>>> {
  const folder = mkdtempSync(join(tmpdir(), "periodwise-examples-"));
  cpSync(join(import.meta.dirname, "..", "..", "notebooks", "data"), join(folder, "data"), {
    recursive: true,
  });
  process.chdir(folder);
  openCase({ title: "Examples", question: "Do they run?", domain: "cultures", seed: 7 });
  const readings = await readRecord("data/algae-line-3.csv");
  readings.addColumn("density", readings["reading"].sub(readings["blank"]), { inplace: true });
  const counts = observations(
    { hour: [...yeast.keys()], density: [...yeast] },
    { period: "hour", step: { every: 1, of: "hour" }, value: "density" },
  );
  const crowding = recurrence("ΔN = r*N*(1 - N/K)");
  const sheltered = recurrence("N[t+1] = R*N/(1 + (R - 1)*N/K)");
  const crowdingFit = fit(crowding, counts, { errors: "observation" });
  const shelteredFit = fit(sheltered, counts, { errors: "observation" });
  const fitted = shelteredFit;
  const flasks = observations(
    {
      flask: ["A", "A", "A", "A", "A", "A", "B", "B", "B", "B", "B", "B", "C", "C", "C", "C", "C", "C"],
      hour: [0, 1, 2, 3, 4, 5, 0, 1, 2, 3, 4, 5, 0, 1, 2, 3, 4, 5],
      N: [10, 12.4, 14.1, 17.9, 20.6, 25.4, 20, 23.1, 29.4, 33.9, 42.5, 49.8, 5, 5.9, 7.6, 8.4, 10.7, 12.2],
    },
    { period: "hour", step: "hour", by: "flask", value: "N" },
  );
  const flasksFit = fit(recurrence("N[t+1] = R*N"), flasks, {
    errors: "observation",
    distribution: "lognormal",
  });
  const ahead = forecast(fitted, { periods: 12 });
  const ready = timeToReach(ahead, { risesTo: 600 });
  return {
    readings,
    counts,
    flasks,
    crowding,
    sheltered,
    rule: sheltered,
    crowdingFit,
    shelteredFit,
    fitted,
    flasksFit,
    ahead,
    ready,
  };
}
