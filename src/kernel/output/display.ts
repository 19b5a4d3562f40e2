import { randomUUID } from "node:crypto";
import type { MimeBundle } from "../mime-bundle.js";
import { presentRun } from "./run.js";
import { withText } from "./value-bundle.js";

export interface DisplayOptions {
  /** Names the display, so that it can be replaced later, from this cell or another. */
  readonly display_id?: string;
  /** Replace the displays of that name instead of adding one. */
  readonly update?: boolean;
}

/** What `display` returns: a handle on what was shown. */
export interface DisplayHandle {
  readonly display_id: string;
  readonly update: (bundle: MimeBundle | Promise<MimeBundle>) => void;
}

/**
 * Shows a bundle below the cell.
 * @see Jupyter messaging, "Display data" and "Update display data".
 */
export function display(
  bundle: MimeBundle | Promise<MimeBundle>,
  options: DisplayOptions = {},
): DisplayHandle {
  const display_id = options.display_id ?? randomUUID();
  const named = options.display_id !== undefined;
  send(bundle, display_id, named, options.update === true);
  const handle: DisplayHandle = { display_id, update: (next) => send(next, display_id, true, true) };
  handles.add(handle);
  return handle;
}

const handles = new WeakSet<object>();

/** Whether a value is what `display` returned: its display has been shown, it is not shown again as a value. */
export function isDisplayHandle(value: unknown): boolean {
  return typeof value === "object" && value !== null && handles.has(value);
}

function send(bundle: MimeBundle | Promise<MimeBundle>, id: string, named: boolean, update: boolean): void {
  const run = presentRun();
  if (run === undefined || run.silent) return;
  const content = (data: MimeBundle): object => ({
    data: withText(data),
    metadata: {},
    // An unnamed display carries its id too, or its handle could not replace it.
    transient: named || !update ? { display_id: id } : {},
  });
  const type = update ? "update_display_data" : "display_data";
  run.output.add(type, bundle instanceof Promise ? bundle.then(content) : content(bundle));
}

/** Clears the cell's outputs; with `wait`, not before the next one comes. */
export function clearOutput(wait = false): void {
  const run = presentRun();
  if (run && !run.silent) run.output.add("clear_output", { wait });
}
