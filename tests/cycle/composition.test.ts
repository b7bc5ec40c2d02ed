import { readFileSync } from "node:fs";
import { describe, expect, it } from "vitest";
import { wetAir } from "../../src/cycle/composition.js";
import { solve, type SolveOptions } from "../../src/cycle/solve.js";
import type { SteadyState } from "../../src/cycle/result.js";
import { readCycle } from "../../src/cyclefile/read.js";
import { dryAir } from "../../src/fluids/data/air-mixture.js";
import { mixture, type Composition } from "../../src/fluids/mixture.js";

const textOf = (name: string): string => readFileSync(new URL(`../../cycles/${name}.yaml`, import.meta.url), "utf8");
const solvedText = (text: string, options: SolveOptions = {}): SteadyState => solve(readCycle(text), { threshold: false, ...options });
const solved = (name: string, options?: SolveOptions): SteadyState => solvedText(textOf(name), options);
/** kg/mol */
const massOf = (x: Composition): number => mixture(x).molarMass;

describe("liquid and vapour of wet air", () => {
  it.each([1e5, 5e5, 2e6, 3.5e6])("hold together what the air holds, weighed, at %d Pa", (pressure) => {
    for (const quality of [0.02, 0.3, 0.7, 0.98]) {
      const wet = wetAir(pressure, quality);
      if (wet === null) throw new Error("no equilibrium");
      const { liquid, vapour } = wet;
      for (const name of ["nitrogen", "argon", "oxygen"] as const) {
        const perKilogram = ((1 - quality) * liquid[name]) / massOf(liquid) + (quality * vapour[name]) / massOf(vapour);
        expect(perKilogram * massOf(dryAir)).toBeCloseTo(dryAir[name], 6);
      }
      expect(liquid.oxygen).toBeGreaterThan(vapour.oxygen);
    }
  });

  it("begins with half oxygen at 1 atm", () => {
    // Source: computed with the reference property library's mixture of nitrogen, argon and oxygen: 0.513 at the dew point.
    expect(Math.abs((wetAir(101325, 1 - 1e-6)?.liquid.oxygen ?? NaN) - 0.513)).toBeLessThan(0.001);
  });

  it("are the same whatever was asked before", () => {
    const first = wetAir(2e5, 0.6);
    wetAir(2.1e5, 0.3);
    expect(wetAir(2e5, 0.6)).toEqual(first);
  });

  it("are none of a phase alone, nor near the critical pressure", () => {
    for (const quality of [0, 1, 1e-12, 1 - 1e-12, NaN]) expect(wetAir(1e5, quality)).toBeNull();
    expect(wetAir(3.78e6, 0.5)).toBeNull();
  });
});

describe("a machine on air", () => {
  it("shows them at its wet stations, and its liquid's oxygen is the wettest's", () => {
    const { stations, liquid } = solved("bench-cooler");
    const wet = stations.filter(({ phase }) => phase === "two-phase");
    expect(wet.length).toBeGreaterThan(1);
    for (const { pressure, vapourFraction, liquidOxygen, vapourOxygen } of wet) {
      const expected = wetAir(pressure, vapourFraction as number);
      expect([liquidOxygen, vapourOxygen]).toEqual([expected?.liquid.oxygen, expected?.vapour.oxygen]);
    }
    for (const { phase, liquidOxygen, vapourOxygen } of stations) if (phase !== "two-phase") expect([liquidOxygen, vapourOxygen]).toEqual([null, null]);
    const wettest = wet.reduce((best, each) => ((each.vapourFraction as number) < (best.vapourFraction as number) ? each : best));
    expect(liquid?.oxygenMoleFraction).toBe(wettest.liquidOxygen);
  });

  it("leaves them out where nobody asks, and all else as it is", () => {
    const [whole, without] = [solved("bench-cooler"), solved("bench-cooler", { composition: false })];
    expect(without.liquid?.oxygenMoleFraction).toBeNull();
    const others = (result: SteadyState): object[] => result.stations.map((station) => ({ ...station, liquidOxygen: null, vapourOxygen: null }));
    expect(without.stations).toEqual(others(whole));
  });

  it("gives none for a machine that stays dry", () => {
    for (const { liquidOxygen } of solved("workshop-air").stations) expect(liquidOxygen).toBeNull();
  });

  it("draws from a closed circuit what its make-up brings in, and says that its gas drifts", () => {
    const { stations, liquid, warnings } = solved("precooled-linde-hampson");
    expect(liquid?.oxygenMoleFraction).toBe(dryAir.oxygen);
    expect(warnings.map(({ code }) => code)).toContain("composition-drifts");
    // The separated liquid, wet again behind the leaking pipe, is not of air's composition.
    const oxygenBehind = (name: string): unknown => stations.find(({ after }) => after === name)?.liquidOxygen;
    expect(oxygenBehind("P1")).toBeNull();
    expect(oxygenBehind("V1")).toBeGreaterThan(0.3);
  });

  it("draws from an open circuit the liquid that it separates", () => {
    const { stations, liquid, warnings } = solvedText(textOf("linde-hampson").replace("circuit: closed", "circuit: open"));
    expect(liquid?.oxygenMoleFraction).toBeCloseTo(stations.find(({ after }) => after === "V1")?.liquidOxygen as number, 9);
    expect(warnings).toEqual([]);
  });
});

it("a machine on nitrogen has no oxygen to show", () => {
  const { stations, liquid, warnings } = solved("claude");
  expect(liquid?.massFlow).toBeGreaterThan(0);
  expect(liquid?.oxygenMoleFraction).toBeNull();
  for (const { liquidOxygen } of stations) expect(liquidOxygen).toBeNull();
  expect(warnings.map(({ code }) => code)).not.toContain("composition-drifts");
});
