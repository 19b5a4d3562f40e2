import { homedir } from "node:os";
import { join } from "node:path";

/**
 * The cache folder of this user.
 * @see XDG Base Directory Specification; the usual folders on macOS and Windows.
 */
export function cacheFolder(): string {
  const { XDG_CACHE_HOME, LOCALAPPDATA } = process.env;
  if (XDG_CACHE_HOME) return join(XDG_CACHE_HOME, "periodwise");
  if (process.platform === "darwin") return join(homedir(), "Library", "Caches", "periodwise");
  if (process.platform === "win32") return join(LOCALAPPDATA ?? homedir(), "periodwise", "cache");
  return join(homedir(), ".cache", "periodwise");
}
