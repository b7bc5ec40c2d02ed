import { readdirSync, readFileSync } from "node:fs";
import { describe, expect, it } from "vitest";
import { solve } from "../../src/cycle/solve.js";
import { readCycle } from "../../src/cyclefile/read.js";

const folder = new URL("../../cycles/", import.meta.url);
const example = (name: string, set: Record<string, string> = {}) =>
  solve(
    readCycle(readFileSync(new URL(`${name}.yaml`, folder), "utf8"), {
      file: `${name}.yaml`,
      set: Object.entries(set).map(([address, value]) => ({ address, value })),
    }),
  );

describe("the examples", () => {
  it.each(readdirSync(folder).map((file) => file.replace(/\.yaml$/, "")))("%s solves with its accounts closed", (name) => {
    const result = example(name);
    expect(result.audit.energy).toBeLessThan(1e-8);
    expect(result.audit.exergy).toBeLessThan(1e-8);
    for (const { destroyed, block } of result.exergy) expect(destroyed, block).toBeGreaterThan(-1e-6);
  });

  it("bench-cooler meets the independent figures without load at an effectiveness of 0.90", () => {
    // Source: computed independently, with another solver on the reference property library.
    const set = { "HX1.effectiveness": "0.90", "L1.heat": "0 W" };
    const half = example("bench-cooler", set).stations[3];
    expect(half.after).toBe("T1");
    expect(half.temperature).toBeCloseTo(83.13, 2);
    expect(half.vapourFraction).toBeCloseTo(0.981, 3);
    const third = example("bench-cooler", { ...set, "T1.efficiency": "30 %" });
    expect(third.stations[3].temperature).toBeCloseTo(121.09, 2);
    expect(third.liquefaction.required).toBeCloseTo(0.4804, 4);
  });

  it("workshop-air settles far above liquefaction and says what it would take", () => {
    const result = example("workshop-air");
    expect(result.coldEnd.temperature).toBeGreaterThan(120);
    expect(result.liquefaction.reached).toBe(false);
    expect(result.liquefaction.required).toBeGreaterThan(0.3);
    const better = example("workshop-air", { "T1.efficiency": String((result.liquefaction.required as number) + 1e-4) });
    expect(better.liquefaction.reached).toBe(true);
  });

  it("two-expanders stops short of liquefaction by a hair", () => {
    const { liquefaction, coldEnd } = example("two-expanders");
    expect(liquefaction.reached).toBe(false);
    expect((liquefaction.required as number) - (liquefaction.given as number)).toBeLessThan(0.05);
    expect(coldEnd.temperature).toBeLessThan(95);
  });

  it("nitrogen-loop holds its plate between 90 and 100 K, dry, and condenses once the plate's load is small", () => {
    const { stations, refrigeration, liquid, liquefaction } = example("nitrogen-loop");
    expect(refrigeration.loads[0].inletTemperature).toBeGreaterThan(90);
    expect(refrigeration.loads[0].outletTemperature).toBeLessThan(105);
    expect(refrigeration.capacity).toBe(300);
    for (const { phase, after } of stations) expect(phase, after).not.toBe("two-phase");
    expect([liquid, liquefaction.reached]).toEqual([null, false]);
    expect(example("nitrogen-loop", { "L1.heat": "150 W" }).liquefaction.reached).toBe(true);
  });

  it("helium-loop cools its sample below 40 K, far above where helium condenses", () => {
    const { coldEnd, stations, refrigeration, liquid, liquefaction } = example("helium-loop");
    expect(coldEnd.temperature).toBeLessThan(36);
    expect(coldEnd.temperature).toBeGreaterThan(25);
    expect(refrigeration.loads[0].outletTemperature).toBeLessThan(40);
    expect(liquid).toBeNull();
    expect(liquefaction).toMatchObject({ reached: false, margin: null });
    for (const { phase, after } of stations) expect(["gas", "supercritical"], after).toContain(phase);
    // Every expander cools what passes it.
    for (const name of ["T1", "T2"]) {
      const at = stations.findIndex(({ after }) => after === name);
      expect(stations[at].temperature).toBeLessThan(stations[at - 1].temperature);
    }
  });

  it("throttle-cooler liquefies without an expander, and is lost when the load is too large", () => {
    expect(example("throttle-cooler").liquefaction).toMatchObject({ reached: true, required: null });
    expect(example("throttle-cooler", { "L1.heat": "25 W" }).coldEnd.temperature).toBeGreaterThan(250);
  });
});
