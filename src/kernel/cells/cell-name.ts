/** The name of a cell's code in stack traces; every execution has its own. */
export function cellName(serial: number): string {
  return `cell-${serial}.ts`;
}
