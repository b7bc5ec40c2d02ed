import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { Counterflow, logarithmicMean } from "../../src/blocks/counterflow.js";
import { fluid } from "../../src/fluids/registry.js";
import { State } from "../../src/fluids/state.js";

/** Streams of a fluid between two temperatures, at pressures without drop. */
function exchanger(name: string, warm: [flow: number, temperature: number, pressure: number], cold: [flow: number, temperature: number, pressure: number]) {
  const gas = fluid(name);
  const exchange = new Counterflow(gas);
  for (const [side, [massFlow, temperature, pressure]] of [["warm", warm], ["cold", cold]] as const) {
    Object.assign(exchange[side], {
      massFlow,
      pressure,
      outletPressure: pressure,
      enthalpy: gas.temperaturePressure(temperature, pressure, new State()).enthalpy,
    });
  }
  return exchange;
}

describe("logarithmicMean", () => {
  // Source: closed form (d1 - d2) / ln(d1 / d2).
  it.each([
    [10, 2, 4.970679],
    [5, 5, 5],
    [20, 1, 6.342356],
  ])("of %d and %d is %d", (first, second, expected) => {
    expect(logarithmicMean(first, second)).toBeCloseTo(expected, 6);
    expect(logarithmicMean(second, first)).toBeCloseTo(expected, 6);
  });

  it("runs smoothly through equality, where the quotient loses its digits", () => {
    for (const difference of [1e-2, 1.9e-3, 2.1e-3, 1e-6, 0]) {
      const exact = 1 - (difference / 2 / (1 - difference / 2)) ** 2 / 3;
      expect(logarithmicMean(1, 1 - difference) / ((1 + 1 - difference) / 2)).toBeCloseTo(exact, 6);
    }
  });
});

describe("an exchanger of constant heat capacities", () => {
  // A monatomic gas at low pressure has a constant heat capacity: the streams then meet the effectiveness-NTU relation of
  // counterflow, eps = (1 - exp(-N (1 - C))) / (1 - C exp(-N (1 - C))), N / (1 + N) where C = 1.
  // Values: closed form, checked with the matrix exponential of the two stream equations.
  it.each([
    { transferUnits: 1, ratio: 1, effectiveness: 0.5 },
    { transferUnits: 3, ratio: 0.5, effectiveness: 0.8744252 },
    { transferUnits: 5, ratio: 0.5, effectiveness: 0.9572009 },
    { transferUnits: 10, ratio: 0.9, effectiveness: 0.945003 },
    { transferUnits: 20, ratio: 1, effectiveness: 0.952381 },
    { transferUnits: 50, ratio: 0.95, effectiveness: 0.9955486 },
  ])("of $transferUnits transfer units and a capacity ratio of $ratio reaches $effectiveness", ({ transferUnits, ratio, effectiveness }) => {
    const exchange = exchanger("argon", [1, 300, 10], [ratio, 120, 1]);
    const heatCapacity = (2.5 * 8.31451) / 0.039948;
    const conductance = transferUnits * ratio * heatCapacity;
    const duty = exchange.dutyAtConductance(conductance);
    expect(duty / exchange.dutyAtApproach(0)).toBeCloseTo(effectiveness, 4);
    expect(exchange.conductance(duty) / conductance).toBeCloseTo(1, 5);
  });
});

describe("dutyAtApproach", () => {
  const air = fluid("air");
  const arbitrary = fc.record({
    warmFlow: fc.double({ min: 0.5, max: 2, noNaN: true }),
    warmTemperature: fc.double({ min: 140, max: 320, noNaN: true }),
    warmPressure: fc.double({ min: 4e5, max: 2e7, noNaN: true }),
    coldEnthalpy: fc.double({ min: 2e3, max: 2.4e5, noNaN: true }),
    coldPressure: fc.double({ min: 1e5, max: 3.9e5, noNaN: true }),
    approach: fc.double({ min: 0, max: 8, noNaN: true }),
  });

  it("leaves exactly the approach at the closest place, wet and near-critical streams included", () => {
    fc.assert(
      fc.property(arbitrary, ({ warmFlow, warmTemperature, warmPressure, coldEnthalpy, coldPressure, approach }) => {
        const exchange = exchanger("air", [warmFlow, warmTemperature, warmPressure], [1, 100, coldPressure]);
        exchange.cold.enthalpy = coldEnthalpy;
        const coldInlet = air.pressureEnthalpy(coldPressure, coldEnthalpy, new State()).temperature;
        fc.pre(warmTemperature - coldInlet > approach + 1);
        const duty = exchange.dutyAtApproach(approach);
        expect(duty).toBeGreaterThan(0);
        // Looked at on a grid of its own, finer than the search's.
        let least = Infinity;
        for (let i = 0; i <= 400; i++) least = Math.min(least, exchange.difference(duty, i / 400));
        expect(least).toBeGreaterThan(approach - 0.02);
        expect(exchange.smallestDifference(duty).value).toBeCloseTo(approach, 2);
      }),
      { seed: 7, numRuns: 150 },
    );
  });

  it("is nothing between streams that come in closer than the approach", () => {
    expect(exchanger("air", [1, 200, 5e5], [1, 198, 1e5]).dutyAtApproach(3)).toBe(0);
    expect(exchanger("air", [1, 200, 5e5], [1, 250, 1e5]).dutyAtApproach(0)).toBe(0);
  });
});
