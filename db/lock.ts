import { readFileSync, rmSync, writeFileSync } from "node:fs";

function isAlive(pid: number): boolean {
  try {
    process.kill(pid, 0);
    return true;
  } catch (error) {
    return (error as NodeJS.ErrnoException).code === "EPERM";
  }
}

/**
 * Takes the lock file of a data folder; PGlite has none, and two processes on one folder silently lose writes.
 * @returns Frees the lock; also done when the process exits.
 * @throws Error naming the process that holds it. A lock whose process is gone is taken over.
 */
export function takeLock(file: string): () => void {
  for (let attempt = 0; ; attempt++) {
    try {
      writeFileSync(file, String(process.pid), { flag: "wx" });
      break;
    } catch (error) {
      if ((error as NodeJS.ErrnoException).code !== "EEXIST" || attempt > 1) throw error;
      const pid = Number(readFileSync(file, "utf8"));
      if (pid !== process.pid && pid > 0 && isAlive(pid)) {
        throw new Error(`the data folder is in use by process ${pid} (${file})`);
      }
      rmSync(file, { force: true });
    }
  }
  const free = () => rmSync(file, { force: true });
  process.once("exit", free);
  return () => {
    process.removeListener("exit", free);
    free();
  };
}
