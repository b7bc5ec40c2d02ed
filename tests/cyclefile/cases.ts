import { readFileSync } from "node:fs";
import { InputError, type LocatedProblem } from "../../src/cyclefile/errors.js";
import type { Quantity } from "../../src/cyclefile/quantity.js";
import { readCycle } from "../../src/cyclefile/read.js";
import type { Scope } from "../../src/cyclefile/values.js";

/** The text of an example. */
export function example(name: string): string {
  return readFileSync(new URL(`../../cycles/${name}.yaml`, import.meta.url), "utf8");
}

export const bench = example("bench-cooler");

/** A text with one piece in place of another that it must hold. */
export function changed(text: string, ...changes: readonly (readonly [from: string, to: string])[]): string {
  let result = text;
  for (const [from, to] of changes) {
    if (!result.includes(from)) throw new Error(`no "${from}" in the text`);
    result = result.replace(from, to);
  }
  return result;
}

/** The problems that reading gives; none where it succeeds. */
export function problemsOf(text: string, set: Record<string, string | number> = {}): readonly LocatedProblem[] {
  try {
    readCycle(text, { file: "test.yaml", set: Object.entries(set).map(([address, value]) => ({ address, value })) });
    return [];
  } catch (error) {
    if (error instanceof InputError) return error.problems;
    throw error;
  }
}

/** Each problem as "code line:column". */
export function codesOf(text: string, set: Record<string, string | number> = {}): string[] {
  return problemsOf(text, set).map(({ code, line, column }) => `${code} ${line}:${column}`);
}

/** A scope with names and a surroundings' pressure (Pa). */
export function scopeOf(names: Record<string, Quantity> = {}, pressure = 101325): Scope {
  return {
    get: (name) => (Object.hasOwn(names, name) ? names[name] : undefined),
    names: () => Object.keys(names),
    surroundingsPressure: () => pressure,
  };
}
