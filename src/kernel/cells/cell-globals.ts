/**
 * Declarations of what a cell may name without an import: what the kernel adds, and the small part of Node's
 * globals that cells use daily. Node's whole declarations cost a second to read, so they are read only by
 * notebooks that need them (see node-types.ts).
 */
export const cellGlobals = `
/** What is shown of a value: one representation a MIME type. */
type MimeBundle = { readonly [type: string]: string | object };
/** Shows a bundle below the cell; \`update\` on what it returns replaces it. */
declare function display(bundle: MimeBundle | Promise<MimeBundle>, options?: { display_id?: string; update?: boolean }):
  { readonly display_id: string; update(bundle: MimeBundle | Promise<MimeBundle>): void };
/** Clears the outputs of the cell; with \`wait\`, not before the next output comes. */
declare function clearOutput(wait?: boolean): void;
/** Asks the reader and resolves to the answer; with \`password\`, without showing it. */
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
