import { watch } from "node:fs";
import { basename, dirname } from "node:path";
import { ANSWERED, type Terminal } from "./command.js";

/** Milliseconds in which the several events of one save arrive. */
const SETTLE = 80;

/**
 * Runs at once and again after every change of a file, until interrupted. The folder is watched, not the file: many
 * editors save by putting a new file in the old one's place.
 */
export async function watchFile(path: string, terminal: Terminal, run: () => Promise<void>): Promise<number> {
  const clear = (): void => {
    if (terminal.isTerminal) terminal.write("\u001B[2J\u001B[3J\u001B[H");
  };
  let running = Promise.resolve();
  const again = (): void => {
    running = running.then(async () => {
      clear();
      await run();
      terminal.tell(`Watching ${path}; Ctrl-C ends.`);
    });
  };
  again();
  await running;
  await new Promise<void>((resolve) => {
    let timer: NodeJS.Timeout | undefined;
    const watcher = watch(dirname(path), (_event, name) => {
      if (name !== null && name !== basename(path)) return;
      clearTimeout(timer);
      timer = setTimeout(again, SETTLE);
    });
    process.once("SIGINT", () => {
      watcher.close();
      resolve();
    });
  });
  return ANSWERED;
}
