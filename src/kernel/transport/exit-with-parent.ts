const everyMs = 1_000;

/**
 * Watches the process that started this kernel and calls `exit` once it is gone, so that a killed front end leaves no
 * kernel behind. The client gives its id in JPY_PARENT_PID; without it nothing is watched.
 */
export function exitWithParent(exit: () => void): void {
  const parent = Number(process.env["JPY_PARENT_PID"]);
  if (process.platform === "win32" || !Number.isInteger(parent) || parent <= 1) return;
  const timer = setInterval(() => {
    if (isAlive(parent)) return;
    clearInterval(timer);
    exit();
  }, everyMs);
  timer.unref();
}

function isAlive(pid: number): boolean {
  try {
    process.kill(pid, 0);
    return true;
  } catch (cause) {
    return (cause as NodeJS.ErrnoException).code === "EPERM";
  }
}
