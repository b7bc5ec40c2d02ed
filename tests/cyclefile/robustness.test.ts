import { readdirSync } from "node:fs";
import fc from "fast-check";
import { describe, expect, it } from "vitest";
import type { CycleDefinition } from "../../src/cycle/definition.js";
import { InputError } from "../../src/cyclefile/errors.js";
import { plainQuantity } from "../../src/cyclefile/quantity.js";
import { readCycle } from "../../src/cyclefile/read.js";
import { units } from "../../src/cyclefile/units.js";
import { bench, example } from "./cases.js";

const EXAMPLES = readdirSync(new URL("../../cycles/", import.meta.url)).flatMap((name) => (name.endsWith(".yaml") ? [example(name.replace(".yaml", ""))] : []));
/** Pieces that mean something to YAML, to expressions or to the reader. */
const PIECES = ["{", "}", "[", "]", ":", ": ", ",", "- ", "\n", "\n  ", "\t", "#", "&a", "*a", "!t", "|", ">", "'", "\"", "?", "%", "@", "---\n", "<<", "~", "null", "true", "-", "+", "*", "/", "^", "(", ")", "=", ".", "..", "1e999", "NaN", "Infinity", "0", "-1", " bar", " degC", " barg", " K", "p_high", "let", "flow", "side: warm", "name: C1", "\u00B0", "\uFEFF", "\u0000", "\u2028", "__proto__", "constructor", "toString"];

/** Whatever the text, there is a definition of finite numbers, or an InputError that tells places and facts. */
function expectAnswer(text: string, set: readonly { address: string; value: string | number }[] = []): void {
  const start = performance.now();
  let definition: CycleDefinition | undefined;
  try {
    definition = readCycle(text, { file: "x.yaml", set });
  } catch (error) {
    if (!(error instanceof InputError)) throw error;
    expect(error.problems.length).toBeGreaterThan(0);
    for (const { place, found, expected, line, column } of error.problems) {
      if (!place.startsWith("--set")) expect(place).toBe(`x.yaml:${line}:${column}`);
      expect(found).toMatch(/\S/);
      expect(expected).toMatch(/\S/);
      expect(`${found} ${expected}`).not.toMatch(/[\n\r]|\[object|function \w+\(/);
    }
  }
  expect(performance.now() - start, "milliseconds").toBeLessThan(2000);
  if (definition === undefined) return;
  expect(definition.flow.value).toBeGreaterThan(0);
  const blocks = [...definition.loop, ...Object.values(definition.branches).flat()];
  for (const value of [definition.flow.value, ...Object.values(definition.surroundings), ...blocks.flatMap(({ values }) => Object.values(values))]) {
    if (typeof value === "number") expect(Number.isFinite(value)).toBe(true);
  }
}

/** An example with a few pieces put in, or stretches taken out or repeated. */
const mutated = fc
  .tuple(
    fc.constantFrom(...EXAMPLES),
    fc.array(fc.record({ at: fc.double({ min: 0, max: 1, noNaN: true }), length: fc.nat(12), piece: fc.oneof(fc.constantFrom(...PIECES), fc.string({ maxLength: 4 })), again: fc.boolean() }), { minLength: 1, maxLength: 4 }),
  )
  .map(([text, changes]) => {
    let result = text;
    for (const { at, length, piece, again } of changes) {
      const start = Math.floor(at * result.length);
      result = result.slice(0, start) + (again ? result.slice(Math.max(0, start - length), start) : piece) + result.slice(start + (again ? 0 : length));
    }
    return result;
  });

describe("whatever the input", { timeout: 60_000 }, () => {
  it("mutated examples are read or refused", () => {
    fc.assert(fc.property(mutated, (text) => expectAnswer(text)), { seed: 7, numRuns: 2000 });
  });

  it("lines in another order are read or refused", () => {
    fc.assert(
      fc.property(fc.constantFrom(...EXAMPLES).chain((text) => fc.shuffledSubarray(text.split("\n"))), (lines) => expectAnswer(lines.join("\n"))),
      { seed: 8, numRuns: 300 },
    );
  });

  it("random text is refused", () => {
    fc.assert(fc.property(fc.string({ unit: "binary", maxLength: 300 }), (text) => expectAnswer(text)), { seed: 9, numRuns: 500 });
    fc.assert(fc.property(fc.uint8Array({ maxLength: 300 }), (bytes) => expectAnswer(Buffer.from(bytes).toString("utf8"))), { seed: 10, numRuns: 500 });
    fc.assert(fc.property(fc.array(fc.constantFrom(...PIECES), { maxLength: 60 }), (pieces) => expectAnswer(pieces.join(""))), { seed: 11, numRuns: 1000 });
  });

  it("random values are read or refused", () => {
    const value = fc.oneof(fc.string({ maxLength: 12 }), fc.array(fc.constantFrom(...PIECES, ...Object.keys(units), "2", "3.5", " "), { maxLength: 8 }).map((pieces) => pieces.join("")), fc.double());
    const address = fc.oneof(fc.constantFrom("T1.efficiency", "flow", "let.p_high", "HX1.approach", "A1.outlet-temperature", "surroundings.pressure", "C1.stages", "HX1.warm.pressure-drop"), fc.string({ maxLength: 8 }));
    fc.assert(fc.property(fc.array(fc.record({ address, value }), { minLength: 1, maxLength: 3 }), (set) => expectAnswer(bench, set)), { seed: 12, numRuns: 1000 });
  });

  it("every number written is read as it is", () => {
    fc.assert(
      fc.property(fc.double({ noNaN: true, noDefaultInfinity: true }).filter((number) => !Object.is(number, -0)), fc.constantFrom("", " ", "  "), (number, gap) => {
        expect(plainQuantity(`${number}${gap}W`, 0)).toEqual({ value: number, kind: "power", unit: "W" });
      }),
      { seed: 13, numRuns: 500 },
    );
  });
});
