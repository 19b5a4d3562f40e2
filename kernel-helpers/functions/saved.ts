import type { Fit as EngineFit } from "../../src/estimate/index.js";
import { loadResult as loadSaved, saveResult as saveEngine } from "../../src/numeric/index.js";
import type { Forecast as EngineForecast } from "../../src/projection/index.js";
import { checkCall } from "../options/index.js";
import type { Fit, Forecast } from "../results/index.js";
import { presentForecast } from "./projections.js";
import { presentFit } from "./show-fit.js";

/**
 * Writes a fit or a forecast as JSON text, to be kept in a file, sent to a worker or put in a queue; `loadResult` makes
 * the same one of it, every number with the same digits.
 *
 * @example saveResult(fitted).slice(0, 28); // '{"format":"periodwise result'
 */
export function saveResult(result: EngineFit | EngineForecast): string {
  checkCall("saveResult", arguments);
  return saveEngine(result);
}

/**
 * Makes a saved fit or forecast again: it shows itself, and what is asked of it gives the same digits as before.
 *
 * @throws {ModelError} `no-saved-result` for text that `saveResult` did not write; `newer-format` for one written by a
 *   later version of the package.
 * @example loadResult(saveResult(fitted)).kind; // "fit"
 */
export function loadResult(text: string): Fit | Forecast {
  checkCall("loadResult", arguments);
  const loaded = loadSaved<EngineFit | EngineForecast>(text);
  return loaded.kind === "fit" ? presentFit(loaded) : presentForecast(loaded);
}
