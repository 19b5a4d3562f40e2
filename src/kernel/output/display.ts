import { randomUUID } from "node:crypto";
import type { MimeBundle } from "../mime-bundle.js";
import { currentRun } from "./run.js";
import { withText } from "./value-bundle.js";

export interface DisplayOptions {
  /** Identifies the display, so that it can be replaced later from any cell. */
  readonly display_id?: string;
  /** Replace the displays with this id instead of adding one. */
  readonly update?: boolean;
}

/** Returned by `display`: a handle on the display. */
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

/** Whether a value was returned by `display`; such a value is not shown again. */
export function isDisplayHandle(value: unknown): boolean {
  return typeof value === "object" && value !== null && handles.has(value);
}

function send(bundle: MimeBundle | Promise<MimeBundle>, id: string, named: boolean, update: boolean): void {
  const run = currentRun();
  if (run === undefined || run.silent) return;
  const content = (data: MimeBundle): object => ({
    data: withText(data),
    metadata: {},
    // An unnamed display also carries its id, so that its handle can replace it.
    transient: named || !update ? { display_id: id } : {},
  });
  const type = update ? "update_display_data" : "display_data";
  run.output.add(type, bundle instanceof Promise ? bundle.then(content) : content(bundle));
}

/** Clears the outputs of the cell; with `wait`, only when the next one comes. */
export function clearOutput(wait = false): void {
  const run = currentRun();
  if (run && !run.silent) run.output.add("clear_output", { wait });
}
