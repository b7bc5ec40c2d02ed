import { watch, type FSWatcher } from "node:fs";
import { basename, dirname } from "node:path";
import { ANSWERED, WRONG_INPUT, type Terminal } from "./command.js";
import { explain } from "./failure.js";

/** Milliseconds in which the several events of one save arrive. */
const SETTLE = 80;

/**
 * Runs at once and again after every change of a file, until interrupted; a run that fails says why and the watch goes
 * on. The folder is watched, not the file: many editors save by putting a new file in the old one's place.
 */
export async function watchFile(path: string, terminal: Terminal, run: () => Promise<number>): Promise<number> {
  const runOnce = async (): Promise<void> => {
    terminal.clear();
    await run().catch((error: unknown) => explain(error, terminal));
    terminal.tell(`Watching ${path}; Ctrl-C ends.`);
  };
  let timer: NodeJS.Timeout | undefined;
  let running = Promise.resolve();
  let watcher: FSWatcher;
  try {
    // The watch begins before the first run, so that no save in between is missed.
    watcher = watch(dirname(path), (_event, name) => {
      if (name !== null && name !== basename(path)) return;
      clearTimeout(timer);
      timer = setTimeout(() => (running = running.then(runOnce)), SETTLE);
    });
  } catch (error) {
    terminal.tell(`${dirname(path)}: a folder that cannot be watched (${(error as NodeJS.ErrnoException).code ?? String(error)})`);
    return WRONG_INPUT;
  }
  running = running.then(runOnce);
  await new Promise<void>((resolve) => {
    process.once("SIGINT", resolve);
    // A folder that is taken away ends the watch.
    watcher.once("error", () => resolve());
  });
  watcher.close();
  clearTimeout(timer);
  return ANSWERED;
}
