export type HeadersInit = Record<string, string> | [string, string][];
/** Always rejects: records are not fetched from the network. */
// biome-ignore lint/style/noDefaultExport: the real package has one, and danfojs-node imports it.
export default function refuse(address: string): Promise<never>;
