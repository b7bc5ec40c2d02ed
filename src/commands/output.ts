import { closeSync, openSync, writeSync } from "node:fs";
import type { Terminal } from "./command.js";
import { optionFault } from "./vary.js";

/** Where a long answer goes, piece by piece. */
export interface Output {
  write(text: string): void;
  close(): void;
}

/**
 * Opens a file before anything is computed, or gathers for the terminal; every piece written to a file is kept at once.
 * @throws InputError where the file exists and may not be replaced, or cannot be written
 */
export async function openOutput(path: string | undefined, replace: boolean, terminal: Terminal): Promise<Output> {
  if (path === undefined) {
    const pieces: string[] = [];
    return {
      write: (text) => void pieces.push(text),
      close: () => terminal.write(pieces.join("")),
    };
  }
  let handle: number;
  try {
    handle = openSync(path, replace ? "w" : "wx");
  } catch (error) {
    const { code } = error as NodeJS.ErrnoException;
    throw optionFault("out", path, code === "EEXIST" ? "a file that does not exist yet, or --force to replace it" : `a file that can be written (${code ?? "unknown"})`);
  }
  return {
    write: (text) => void writeSync(handle, text),
    close: () => {
      closeSync(handle);
      terminal.tell(`Written to ${path}.`);
    },
  };
}
