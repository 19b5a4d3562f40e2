export type HeadersInit = Record<string, string> | [string, string][];
/** Always rejects: records are not fetched from the network. */
export default function refuse(address: string): Promise<never>;
