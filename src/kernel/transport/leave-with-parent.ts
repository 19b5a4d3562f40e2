const everyMs = 1_000;

/**
 * Watches the program that started this kernel and calls `leave` once it is gone, so that a front end that was
 * killed leaves no kernel behind. The client names itself in JPY_PARENT_PID; without it nothing is watched.
 */
export function leaveWithParent(leave: () => void): void {
  const parent = Number(process.env["JPY_PARENT_PID"]);
  if (process.platform === "win32" || !Number.isInteger(parent) || parent <= 1) return;
  const timer = setInterval(() => {
    if (isAlive(parent)) return;
    clearInterval(timer);
    leave();
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
