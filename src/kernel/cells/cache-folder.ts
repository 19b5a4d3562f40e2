import { homedir } from "node:os";
import { join } from "node:path";

/**
 * Where this user's programs keep what they can make again.
 * @see XDG Base Directory Specification; on macOS and Windows the places that those systems name.
 */
export function cacheFolder(): string {
  const { XDG_CACHE_HOME, LOCALAPPDATA } = process.env;
  if (XDG_CACHE_HOME) return join(XDG_CACHE_HOME, "periodwise");
  if (process.platform === "darwin") return join(homedir(), "Library", "Caches", "periodwise");
  if (process.platform === "win32") return join(LOCALAPPDATA ?? homedir(), "periodwise", "cache");
  return join(homedir(), ".cache", "periodwise");
}
