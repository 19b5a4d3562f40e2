/** The name of a cell's code in stack traces, unique for every execution. */
export function cellName(serial: number): string {
  return `cell-${serial}.ts`;
}
