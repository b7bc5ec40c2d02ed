import { readFileSync } from "node:fs";
import { describe, expect, it } from "vitest";
import type { CycleDefinition } from "../../src/cycle/definition.js";
import type { SteadyState } from "../../src/cycle/result.js";
import { solve } from "../../src/cycle/solve.js";
import { readCycle } from "../../src/cyclefile/read.js";
import { fluid } from "../../src/fluids/registry.js";
import { entry } from "./definitions.js";

const example = (name: string, set: Record<string, string> = {}): SteadyState =>
  solve(
    readCycle(readFileSync(new URL(`../../cycles/${name}.yaml`, import.meta.url), "utf8"), {
      set: Object.entries(set).map(([address, value]) => ({ address, value })),
    }),
    { threshold: false },
  );
const enthalpy = (result: SteadyState, after: string): number => {
  const station = result.stations.find((each) => each.after === after);
  if (station === undefined) throw new Error(`no station behind ${after}`);
  return station.enthalpy;
};

describe("the simple Linde-Hampson liquefier, 300 K, 101.3 kPa to 20.265 MPa, ideal", () => {
  // Source: R. F. Barron, Cryogenic Systems, 2nd ed., table of the simple Linde-Hampson system (from memory): yield, work per kg
  // compressed, work per kg liquefied (kJ/kg), figure of merit; the tolerance is how far the book's property data are off.
  it.each([
    { name: "air", yield: 0.0808, compressed: 454.1, liquefied: 5621, merit: 0.1313, tolerance: 0.01 },
    { name: "nitrogen", yield: 0.0708, compressed: 472.5, liquefied: 6673, merit: 0.1151, tolerance: 0.06 },
    { name: "argon", yield: 0.1183, compressed: 325.3, liquefied: 2750, merit: 0.1741, tolerance: 0.025 },
    { name: "oxygen", yield: 0.1065, compressed: 405, liquefied: 3804, merit: 0.1671, tolerance: 0.006 },
  ])("$name", ({ name, yield: liquid, compressed, liquefied, merit, tolerance }) => {
    const machine = readCycle(readFileSync(new URL("../../cycles/linde-hampson.yaml", import.meta.url), "utf8").replace("fluid: air", `fluid: ${name}`));
    const result = solve(machine, { threshold: false });
    const near = (got: number, expected: number) => expect(Math.abs(got / expected - 1)).toBeLessThan(tolerance);
    near(result.liquid?.fractionOfFlow ?? 0, liquid);
    near(result.power.compression / result.massFlow / 1e3, compressed);
    near(result.power.compression / (result.liquid?.massFlow ?? 0) / 1e3, liquefied);
    near(result.performance.secondLawEfficiency ?? 0, merit);
  });

  it("yields what its own energy balance says: (h1 - h2) / (h1 - hf)", () => {
    const gas = fluid("air");
    const warm = gas.at({ temperature: 300, pressure: 101325 }).enthalpy;
    const compressed = gas.at({ temperature: 300, pressure: 20.265e6 }).enthalpy;
    const liquid = gas.at({ pressure: 101325, quality: 0 }).enthalpy;
    expect(example("linde-hampson").liquid?.fractionOfFlow).toBeCloseTo((warm - compressed) / (warm - liquid), 9);
  });

  it("throttling from 160 atm at 25 degC liquefies 7 %", () => {
    // Source: a textbook on chemical engineering thermodynamics, example 11.3, read from a chart to one figure.
    const result = example("linde-hampson", { "C1.outlet-pressure": "160 atm", "surroundings.temperature": "25 degC" });
    expect(Math.abs((result.liquid?.fractionOfFlow ?? 0) - 0.07)).toBeLessThan(0.003);
  });
});

describe("the Claude liquefier of nitrogen, 300 K, 1 to 40 atm", () => {
  const atmosphere = 101325;
  const claude = (share: number): CycleDefinition => ({
    title: "ideal Claude",
    fluid: "nitrogen",
    surroundings: { temperature: 300, pressure: atmosphere, relativeHumidity: 0.5 },
    circuit: "closed",
    flow: { kind: "mass", value: 1 },
    loop: [
      entry("compressor", "C1", { "outlet-pressure": 40 * atmosphere, "isothermal-efficiency": 1 }),
      entry("aftercooler", "A1", { approach: 0 }),
      entry("recuperator", "HX1", { effectiveness: 1 }, "warm"),
      entry("splitter", "S1", { branch: "turbine", fraction: share }),
      entry("recuperator", "HX2", { effectiveness: 0.97 }, "warm"),
      entry("valve", "V1", { "outlet-pressure": atmosphere }),
      entry("separator", "F1", { liquid: "product" }),
      entry("mixer", "M1", { branch: "turbine" }),
      entry("recuperator", "HX2", {}, "cold"),
      entry("recuperator", "HX1", {}, "cold"),
    ],
    branches: { turbine: [entry("expander", "T1", { "outlet-pressure": atmosphere, efficiency: 1 })] },
  });

  // Source: the first law over the cold box (Barron, Cryogenic Systems, the Claude system): with no difference at the warm end,
  // y = (h1 - h2) / (h1 - hf) + x (h3 - he) / (h1 - hf).
  it.each([0.2, 0.4, 0.6])("yields by the expander's share, %d, as the book's formula says", (share) => {
    const result = solve(claude(share), { threshold: false });
    const gas = fluid("nitrogen");
    const warm = gas.at({ temperature: 300, pressure: atmosphere }).enthalpy;
    const compressed = gas.at({ temperature: 300, pressure: 40 * atmosphere }).enthalpy;
    const liquid = gas.at({ pressure: atmosphere, quality: 0 }).enthalpy;
    const drop = enthalpy(result, "HX1 warm") - enthalpy(result, "T1");
    expect(result.liquid?.fractionOfFlow).toBeCloseTo((warm - compressed + share * drop) / (warm - liquid), 7);
  });

  it("at 225 K before a reversible expander that takes 20 % would yield 8.47 % by that formula", () => {
    // Source: computed with the reference property library; checks the formula's own figures against these properties.
    const gas = fluid("nitrogen");
    const warm = gas.at({ temperature: 300, pressure: atmosphere });
    const before = gas.at({ temperature: 225, pressure: 40 * atmosphere });
    const behind = gas.at({ pressure: atmosphere, entropy: before.entropy });
    const liquid = gas.at({ pressure: atmosphere, quality: 0 });
    const compressed = gas.at({ temperature: 300, pressure: 40 * atmosphere });
    const share = (warm.enthalpy - compressed.enthalpy + 0.2 * (before.enthalpy - behind.enthalpy)) / (warm.enthalpy - liquid.enthalpy);
    expect(share).toBeCloseTo(0.08469361, 6);
  });
});

describe("the first law over the cold box, as the handbook writes it for each system", () => {
  // Source: R. F. Barron, Cryogenic Systems, 2nd ed., chapter on liquefaction systems (from memory), y yield, x expander's share:
  //   Claude, Kapitza, Heylandt   y (h1 - hf) = (h1 - h2) + x (h3 - he)
  //   precooled Linde-Hampson     y (h1 - hf) = (h1 - h2) + heat taken by the precooler per kg
  // with the return stream's own enthalpy for h1, since real exchangers leave a difference at the warm end.
  it.each([["claude", 0.6], ["kapitza", 0.92], ["heylandt", 0.55]] as const)("%s", (name, share) => {
    const result = example(name);
    const returned = enthalpy(result, "HX1 cold");
    const expanded = share * (enthalpy(result, "S1 branch") - enthalpy(result, "T1"));
    const expected = (returned - enthalpy(result, "A1") + expanded) / (returned - enthalpy(result, "F1 liquid"));
    expect((result.liquid?.fractionOfFlow ?? 0) / expected).toBeCloseTo(1, 8);
  });

  it("precooled-linde-hampson", () => {
    const result = example("precooled-linde-hampson");
    const returned = enthalpy(result, "HX1 cold");
    const taken = Number(result.blocks.find(({ name }) => name === "R1")?.heatTaken) / result.massFlow;
    const expected = (returned - enthalpy(result, "A1") + taken) / (returned - enthalpy(result, "F1 liquid"));
    expect((result.liquid?.fractionOfFlow ?? 0) / expected).toBeCloseTo(1, 8);
  });

  it("two-turbines-booster: the load is the turbines' work less what the warm end loses", () => {
    const result = example("two-turbines-booster");
    const work = enthalpy(result, "HX1 warm") - enthalpy(result, "T1") + enthalpy(result, "HX2 warm") - enthalpy(result, "T2");
    const lost = enthalpy(result, "A2") - enthalpy(result, "HX1 cold");
    expect((result.massFlow * (work - lost)) / result.refrigeration.capacity).toBeCloseTo(1, 7);
  });
});

describe("the real liquefiers of the examples", () => {
  it("precooling raises the throttle's yield, the more the colder (common practice, no source)", () => {
    const yields = ["-20 degC", "-35 degC", "-45 degC"].map((outlet) => example("precooled-linde-hampson", { "R1.outlet-temperature": outlet }).liquid?.fractionOfFlow ?? 0);
    expect(yields[1]).toBeGreaterThan(1.1 * yields[0]);
    expect(yields[2]).toBeGreaterThan(1.1 * yields[1]);
    expect(yields[2]).toBeGreaterThan(1.8 * (example("linde-hampson").liquid?.fractionOfFlow ?? 1));
  });

  it("an expander beside the throttle makes more of less pressure: Claude at 40 bar over Linde-Hampson at 200", () => {
    expect(example("claude").liquid?.fractionOfFlow).toBeGreaterThan(0.1);
    expect(example("claude").performance.secondLawEfficiency).toBeGreaterThan(example("linde-hampson").performance.secondLawEfficiency as number);
  });

  it("Kapitza makes liquid at 7 bar, and little of it with a poor turbine", () => {
    const good = example("kapitza").liquid?.fractionOfFlow ?? 0;
    expect(good).toBeGreaterThan(0.05);
    expect(example("kapitza", { "T1.efficiency": "40 %" }).liquid?.fractionOfFlow).toBeLessThan(0.6 * good);
  });

  it("Heylandt liquefies a fifth of its flow with the expander at the warm end", () => {
    const result = example("heylandt");
    expect(result.liquid?.fractionOfFlow).toBeCloseTo(0.2, 1);
    expect(enthalpy(result, "S1 branch")).toBeCloseTo(enthalpy(result, "A1"), 6);
  });

  it("the booster takes exactly what its turbine delivers", () => {
    const result = example("two-turbines-booster");
    const turbine = result.blocks.find(({ name }) => name === "T1");
    const booster = result.blocks.find(({ name }) => name === "C2");
    expect(Number(booster?.power) / Number(turbine?.shaftPower)).toBeCloseTo(1, 9);
    expect(result.power.recovered).toBeCloseTo(Number(booster?.power), 6);
    expect(booster?.drivePower).toBeCloseTo(0, 6);
    expect(result.coldEnd.temperature).toBeLessThan(90);
  });

  it("matter is conserved: the make-up replaces the product", () => {
    for (const name of ["linde-hampson", "claude", "kapitza", "heylandt"]) {
      const result = example(name);
      const makeUp = result.blocks.find((block) => block.name === "make-up");
      expect(Number(makeUp?.makeUpFlow) / (result.liquid?.massFlow ?? 0), name).toBeCloseTo(1, 9);
    }
  });
});
