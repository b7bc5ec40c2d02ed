import { open } from "node:fs/promises";
import type { Override } from "./define.js";
import { InputError } from "./errors.js";
import { openCycleFile, type CycleFile } from "./open.js";

/** Bytes beyond which a file is taken for something else. */
const LARGEST = 1_000_000;

/**
 * Opens a cycle file on disk, with the evaluator of expressions loaded where the file or the overrides need it.
 *
 * @throws InputError where it cannot be read or is not of the form of a cycle file
 */
export async function loadCycleFile(path: string, overrides: readonly Override[] = []): Promise<CycleFile> {
  const cycleFile = openCycleFile(await readText(path), path);
  if (cycleFile.needsExpressions(overrides)) cycleFile.useEvaluator((await import("./expression.js")).evaluateExpression);
  return cycleFile;
}

async function readText(path: string): Promise<string> {
  const refuse = (code: string, found: string, expected = "a cycle file"): never => {
    throw new InputError([{ code, place: path, line: 0, column: 0, found, expected }]);
  };
  let bytes: Buffer;
  try {
    const handle = await open(path);
    try {
      const { size } = await handle.stat();
      if (size > LARGEST) refuse("too-long", `a file of ${(size / 1e6).toFixed(0)} MB`, "a cycle file, which has a few kB");
      bytes = await handle.readFile();
    } finally {
      await handle.close();
    }
  } catch (error) {
    if (error instanceof InputError) throw error;
    const { code } = error as NodeJS.ErrnoException;
    if (code === "ENOENT") return refuse("no-file", "no such file");
    if (code === "EISDIR") return refuse("no-file", "a directory");
    if (code === "EACCES") return refuse("no-file", "a file that may not be read");
    return refuse("no-file", `a file that cannot be read (${code ?? String(error)})`);
  }
  try {
    return new TextDecoder("utf-8", { fatal: true }).decode(bytes);
  } catch {
    return refuse("not-text", "bytes that are no text", "a cycle file in UTF-8");
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
