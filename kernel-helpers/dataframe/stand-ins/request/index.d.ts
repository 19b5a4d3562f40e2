declare namespace request {
  interface RequiredUriUrl {
    url: string;
  }
  interface CoreOptions {
    method?: string;
    headers?: Record<string, string>;
  }
}
/** Always throws: records are not fetched from the network. */
declare function request(asked: string | request.RequiredUriUrl): never;
// biome-ignore lint/style/noDefaultExport: the real package has one, and danfojs-node imports it.
export default request;
