import { fileURLToPath } from "node:url";
import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { solveFile } from "../../src/commands/solve-file.js";
import { NoSteadyState } from "../../src/cycle/failure.js";
import { InputError } from "../../src/cyclefile/errors.js";
import { jsonText } from "../../src/present/json.js";
import { noSteadyState } from "../../src/present/no-steady-state.js";
import { report } from "../../src/present/report.js";

const bench = fileURLToPath(new URL("../../cycles/bench-cooler.yaml", import.meta.url));
const parts = (unit: string, most: number): fc.Arbitrary<string> => fc.integer({ min: 0, max: 100 }).map((n) => `${(n * most) / 100} ${unit}`);

const settings = fc.record(
  { "T1.efficiency": parts("%", 100), "HX1.effectiveness": parts("%", 100), "L1.heat": parts("W", 300), "let.p_high": parts("bar", 60), flow: parts("g/s", 20), "C1.efficiency": parts("%", 100) },
  { requiredKeys: [] },
);

describe("any machine", () => {
  it("is told within a terminal's width and in finite numbers, whatever its figures, or refused", async () => {
    let solved = 0;
    const property = fc.asyncProperty(settings, async (given) => {
      const overrides = Object.entries(given).map(([address, value]) => ({ address, value }));
      const text = await solveFile(bench, overrides).then(
        ({ definition, result }) => {
          solved++;
          expect(JSON.parse(jsonText(result))).toEqual(result);
          return report(definition, result, false);
        },
        (error: unknown) => {
          if (error instanceof NoSteadyState) return noSteadyState(error);
          if (error instanceof InputError) return "";
          throw error;
        },
      );
      for (const line of text.split("\n")) expect(line.length, line).toBeLessThanOrEqual(100);
      expect(text).not.toMatch(/NaN|undefined|null|Infinity|\[object/);
    });
    await fc.assert(property, { numRuns: 200, seed: 7 });
    expect(solved).toBeGreaterThan(40);
  });
});
