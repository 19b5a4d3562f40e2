import { ModelError } from "../../numeric/index.js";
import { listed } from "../refusals.js";

export function identityUnread(
  text: string,
  at: number,
  names: readonly string[],
  nearest: readonly string[],
): ModelError {
  const hint = nearest.length > 0 ? ` Did you mean ${nearest.map((n) => `"${n}"`).join(" or ")}?` : "";
  return new ModelError(
    "identity-unread",
    `The sum could not be read.\n    ${text}\n    ${" ".repeat(Math.max(0, at))}^\n` +
      `It is one column, "=", and columns added and subtracted, such as closing = opening + interest - paid. Columns: ${listed(names)}.${hint}`,
    { text, at, names, nearest },
  );
}

export function mixedUnits(
  column: string,
  group: string,
  first: { readonly row: number; readonly unit: string },
  other: { readonly row: number; readonly unit: string },
): ModelError {
  const where = group === "" ? "The record" : `"${group}"`;
  return new ModelError(
    "mixed-units",
    `${where} mixes units: ${column} is "${first.unit}" at row ${first.row} and "${other.unit}" at row ${other.row}. ` +
      `Convert the values first, or keep them apart with by or where: { ${column}: ${JSON.stringify(first.unit)} }.`,
    { column, group, first, other },
  );
}
