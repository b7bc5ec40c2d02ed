import { closeSync, openSync, readSync } from "node:fs";
import { LONGEST } from "./document.js";
import { InputError } from "./errors.js";
import { openCycleFile, type CycleFile } from "./open.js";
import type { Override } from "./override.js";

/**
 * Opens a cycle file on disk, with the evaluator of expressions loaded where the file or the overrides need it.
 *
 * @throws InputError where it cannot be read or is not of the form of a cycle file
 */
export async function loadCycleFile(path: string, overrides: readonly Override[] = []): Promise<CycleFile> {
  const cycleFile = openCycleFile(readText(path), path);
  if (cycleFile.needsExpressions(overrides)) cycleFile.useEvaluator((await import("./expression.js")).evaluateExpression);
  return cycleFile;
}

function readText(path: string): string {
  const refuse = (code: string, found: string, expected = "a cycle file"): never => {
    throw new InputError([{ code, place: `${path}:1:1`, line: 1, column: 1, found, expected }]);
  };
  let bytes: Buffer;
  try {
    bytes = readStart(path, LONGEST + 1);
  } catch (error) {
    const { code } = error as NodeJS.ErrnoException;
    if (code === "ENOENT") return refuse("no-file", "no such file");
    if (code === "EISDIR") return refuse("no-file", "a directory");
    if (code === "EACCES") return refuse("no-file", "a file that may not be read");
    return refuse("no-file", `a file that cannot be read (${code ?? String(error)})`);
  }
  if (bytes.length > LONGEST) return refuse("too-long", `a file of more than ${LONGEST / 1000} kB`, "a cycle file, which has a few kB");
  try {
    return new TextDecoder("utf-8", { fatal: true }).decode(bytes);
  } catch {
    return refuse("not-text", "bytes that are no text", "a cycle file in UTF-8");
  }
}

/** The first bytes of a file; a device such as /dev/zero has no last one, and a pipe comes in pieces. */
function readStart(path: string, most: number): Buffer {
  const file = openSync(path, "r");
  try {
    const buffer = Buffer.alloc(most);
    let length = 0;
    for (let read = -1; read !== 0 && length < most; length += read) read = readSync(file, buffer, length, most - length, null);
    return buffer.subarray(0, length);
  } finally {
    closeSync(file);
  }
}

/**
 * A command-line setting, NAME.key=VALUE.
 * @throws InputError where it has no = or nothing on a side of it
 */
export function parseSetting(text: string): Override {
  const at = text.indexOf("=");
  const address = text.slice(0, at).trim();
  const value = text.slice(at + 1).trim();
  if (at > 0 && address !== "" && value !== "") return { address, value };
  throw new InputError([{ code: "setting", place: `--set ${text}`, line: 0, column: 0, found: `"${text}"`, expected: "NAME.key=VALUE, as in T1.efficiency=55%" }]);
}
