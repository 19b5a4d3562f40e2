import { builtinModules } from "node:module";

const names =
  "process|Buffer|require|module|exports|global|NodeJS|__dirname|__filename|setImmediate|clearImmediate|fetch|URL" +
  "|URLSearchParams|TextEncoder|TextDecoder|AbortController|AbortSignal|Event|EventTarget|Blob|crypto|WebAssembly" +
  "|Response|Request|Headers|FormData|btoa|atob|MessageChannel|BroadcastChannel|ReadableStream|WritableStream";
const builtIns = builtinModules.filter((name) => !name.startsWith("_")).join("|");
const mentions = new RegExp(`\\b(?:${names})\\b|["'](?:node:[\\w/]+|(?:${builtIns}))["']`);

/** Whether a cell's text uses anything that only Node's declarations describe. */
export function needsNodeTypes(code: string): boolean {
  return mentions.test(code);
}
