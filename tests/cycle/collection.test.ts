import { describe, expect, it } from "vitest";
import type { PassagePoint } from "../../src/blocks/passage.js";
import { collect } from "../../src/cycle/collection.js";
import { waterAtSaturation, carbonDioxideAtSaturation, frostPoint } from "../../src/fluids/moist-air.js";

const at = (place: number, temperature: number, pressure = 8e5, more: Partial<PassagePoint> = {}): PassagePoint => ({ place, temperature, pressure, ...more });
const humid = { water: 0.01, carbonDioxide: 420e-6 };

describe("what a passage collects", () => {
  it("is what a trap finds condensed, down to saturation", () => {
    const { contents, taken, settled } = collect({ points: [at(0, 400), at(1, 303.15, 8e5, { trap: "A1" })] }, humid);
    // 4246.9 Pa: water at 30 degC, steam tables.
    expect(contents.water / (4246.9 / (8e5 - 4246.9))).toBeCloseTo(1, 3);
    expect(taken).toEqual([{ at: "A1", by: "trap", amount: humid.water - contents.water, temperature: 303.15, pressure: 8e5 }]);
    expect(settled).toEqual([]);
    expect(contents.carbonDioxide).toBe(420e-6);
  });

  it("is nothing without a trap above 0 degC: condensed water travels on", () => {
    expect(collect({ points: [at(0, 400), at(1, 303.15)] }, humid)).toEqual({ contents: humid, taken: [], settled: [] });
  });

  it("is what a dryer takes, down to its pressure dew point, with or without a trap", () => {
    for (const trap of [{}, { trap: "A1" }]) {
      const { contents, taken } = collect({ points: [at(0, 400), at(1, 303.15, 8e5, { ...trap, dryer: { at: "A1", dewPoint: 233.15 } })] }, humid);
      // 16.05 ppm: ISO 8573-1 class 2 at 8 bar.
      expect(contents.water * 1e6).toBeCloseTo(16.05, 2);
      expect(taken.reduce((sum, { amount }) => sum + amount, 0)).toBeCloseTo(humid.water - contents.water, 15);
      expect(taken.at(-1)).toMatchObject({ at: "A1", by: "dryer" });
    }
  });

  it("is nothing in a dryer worse than the gas", () => {
    const dry = { water: 1e-5, carbonDioxide: 0 };
    expect(collect({ points: [at(0, 300), at(1, 300, 8e5, { dryer: { at: "A1", dewPoint: 280 } })] }, dry)).toEqual({ contents: dry, taken: [], settled: [] });
  });

  it("settles along a profile between the frost points of what comes and of the last hundredth of it", () => {
    const dried = { water: waterAtSaturation(253.15, 8e5), carbonDioxide: 420e-6 };
    const points = Array.from({ length: 21 }, (_, i) => at(i / 20, 300 - 10 * i));
    const { contents, settled } = collect({ points, alongDuty: true }, dried);
    const [ice, frost] = settled;
    expect(ice).toMatchObject({ substance: "water", liquid: 0 });
    expect(ice.begins.temperature).toBeCloseTo(253.15, 6);
    expect(ice.begins.dutyFraction).toBeCloseTo((300 - 253.15) / 200, 8);
    expect(waterAtSaturation(ice.ends.temperature, 8e5) / dried.water).toBeCloseTo(0.01, 6);
    expect(ice.amount).toBeCloseTo(dried.water, 12);
    expect(frost.begins.temperature).toBeCloseTo(frostPoint(420e-6, 8e5) as number, 6);
    expect(frost.amount).toBeCloseTo(420e-6 - contents.carbonDioxide, 15);
    expect(contents.water).toBe(waterAtSaturation(100, 8e5));
    expect(contents.carbonDioxide).toBe(carbonDioxideAtSaturation(100, 8e5));
  });

  it("has water that condensed on the way freeze at 0 degC", () => {
    const { settled } = collect({ points: [at(0, 300), at(1, 250)], alongDuty: true }, { water: 0.004, carbonDioxide: 0 });
    expect(settled).toHaveLength(1);
    expect(settled[0].begins.temperature).toBeCloseTo(273.16, 6);
    // 611.657 Pa at the triple point: the rest of the 0.004 has condensed before.
    expect(settled[0].liquid).toBeCloseTo(0.004 - 611.657 / (8e5 - 611.657), 7);
  });

  it("has no place along the duty in a block without a profile", () => {
    const { settled } = collect({ points: [at(0, 150), at(1, 110, 1e5)] }, { water: 0, carbonDioxide: 420e-6 });
    expect(settled[0].begins.dutyFraction).toBeNull();
    expect(settled[0].ends.dutyFraction).toBeNull();
  });

  it("is nothing in gas without water and carbon dioxide", () => {
    const none = { water: 0, carbonDioxide: 0 };
    expect(collect({ points: [at(0, 300), at(1, 60)] }, none)).toEqual({ contents: none, taken: [], settled: [] });
  });
});
