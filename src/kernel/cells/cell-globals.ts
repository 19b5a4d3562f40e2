/**
 * Declarations of what a cell can use without an import: what the kernel adds, and the Node globals that cells use
 * most. Reading all of Node's declarations takes a second, so only notebooks that need them do (see node-types.ts).
 */
export const cellGlobals = `
/** Representations of a value by MIME type. */
type MimeBundle = { readonly [type: string]: string | object };
/** Shows a bundle below the cell; \`update\` on what it returns replaces it. */
declare function display(bundle: MimeBundle | Promise<MimeBundle>, options?: { display_id?: string; update?: boolean }):
  { readonly display_id: string; update(bundle: MimeBundle | Promise<MimeBundle>): void };
/** Clears the outputs of the cell; with \`wait\`, only when the next output comes. */
declare function clearOutput(wait?: boolean): void;
/** Asks the user for a line of text; with \`password\`, without showing it. */
declare function input(prompt?: string, options?: { password?: boolean }): Promise<string>;
`;

export const smallNodeGlobals = `
interface Console {
  log(...values: unknown[]): void; info(...values: unknown[]): void; debug(...values: unknown[]): void;
  warn(...values: unknown[]): void; error(...values: unknown[]): void; trace(...values: unknown[]): void;
  table(rows: unknown, columns?: readonly string[]): void; dir(value: unknown, options?: object): void;
  assert(condition?: unknown, ...values: unknown[]): void; group(...values: unknown[]): void; groupEnd(): void;
  time(label?: string): void; timeEnd(label?: string): void; timeLog(label?: string, ...values: unknown[]): void;
  count(label?: string): void; countReset(label?: string): void;
}
declare var console: Console;
interface Timer { ref(): this; unref(): this; hasRef(): boolean; refresh(): this; [Symbol.toPrimitive](): number }
declare function setTimeout(work: (value: void) => void, ms?: number): Timer;
declare function setTimeout<A extends unknown[]>(work: (...values: A) => void, ms?: number, ...values: A): Timer;
declare function setInterval(work: (value: void) => void, ms?: number): Timer;
declare function setInterval<A extends unknown[]>(work: (...values: A) => void, ms?: number, ...values: A): Timer;
declare function clearTimeout(timer?: Timer | number | string): void;
declare function clearInterval(timer?: Timer | number | string): void;
declare function queueMicrotask(work: () => void): void;
declare function structuredClone<T>(value: T): T;
declare var performance: { now(): number; readonly timeOrigin: number };
`;
