import { readdirSync } from "node:fs";
import { fileURLToPath } from "node:url";
import { describe, expect, it } from "vitest";
import { FluidError, NotFiniteError, OutOfRangeError, UnknownFluidError } from "../../src/fluids/errors.js";
import type { StateInput } from "../../src/fluids/fluid-state.js";
import { fluid, fluidNames } from "../../src/fluids/registry.js";
import { State } from "../../src/fluids/state.js";

function errorOf(ask: () => unknown): unknown {
  try {
    return expect.fail(`no error, but ${JSON.stringify(ask())}`);
  } catch (error) {
    return error;
  }
}

describe("the registry of fluids", () => {
  it("names every data file once", () => {
    const folder = fileURLToPath(new URL("../../src/fluids/data/", import.meta.url));
    const files = readdirSync(folder).map((file) => file.replace(".ts", "")).filter((file) => !file.includes("-"));
    expect(fluidNames.toSorted()).toEqual(files.toSorted());
  });

  it("gives the same object each time", () => {
    expect(fluid("air")).toBe(fluid("air"));
  });

  it("names the fluids it knows when asked for another", () => {
    const error = errorOf(() => fluid("phlogiston"));
    expect(error).toBeInstanceOf(UnknownFluidError);
    expect((error as UnknownFluidError).message).toContain("air");
    expect((error as UnknownFluidError).code).toBe("unknown-fluid");
  });
});

describe.each(fluidNames)("out of range of %s", (name) => {
  const gas = fluid(name);
  const { minimumTemperature, maximumTemperature, maximumPressure, criticalPressure, lowestSaturationPressure } = gas;
  const hot = gas.at({ temperature: maximumTemperature, pressure: 1e5 });
  const cold = gas.at({ temperature: minimumTemperature, pressure: 1e6 });
  const inputs: [what: string, input: StateInput][] = [
    ["too cold", { temperature: minimumTemperature * 0.999, pressure: 1e5 }],
    ["too hot", { temperature: maximumTemperature * 1.001, pressure: 1e5 }],
    ["below zero temperature", { temperature: -5, pressure: 1e5 }],
    ["too high a pressure", { temperature: 300, pressure: maximumPressure * 1.001 }],
    ["no pressure", { temperature: 300, pressure: 0 }],
    ["less than no pressure", { temperature: 300, pressure: -1e5 }],
    ["too high an enthalpy", { pressure: 1e5, enthalpy: hot.enthalpy * 1.001 }],
    ["too low an enthalpy", { pressure: 1e6, enthalpy: cold.enthalpy - 10 }],
    ["too low an enthalpy of gas", { pressure: lowestSaturationPressure * 0.2, enthalpy: cold.enthalpy - 10 }],
    ["too low an enthalpy above the critical pressure", { pressure: maximumPressure, enthalpy: cold.enthalpy - 1e6 }],
    ["too high an entropy", { pressure: 1e5, entropy: hot.entropy + 1 }],
    ["too low an entropy", { pressure: 1e6, entropy: cold.entropy - 1 }],
    ["enthalpy at too high a pressure", { pressure: maximumPressure * 2, enthalpy: 0 }],
    ["quality above one", { pressure: 101325, quality: 1.01 }],
    ["quality below zero", { pressure: 101325, quality: -0.01 }],
    ["quality above the critical pressure", { pressure: criticalPressure * 1.001, quality: 0.5 }],
    ["quality where the liquid freezes", { pressure: lowestSaturationPressure * 0.99, quality: 0.5 }],
    ["no density", { temperature: 300, density: 0 }],
    ["so dense that pressure is out of range", { temperature: 300, density: cold.density * 1.5 }],
    ["dense, but too cold", { temperature: minimumTemperature * 0.9, density: 1 }],
  ];

  it.each(inputs)("%s", (_, input) => {
    const error = errorOf(() => gas.at(input));
    expect(error).toBeInstanceOf(OutOfRangeError);
    const { code, message, minimum, maximum, value, quantity, unit } = error as OutOfRangeError;
    expect(code).toBe("out-of-range");
    expect(value < minimum || value > maximum || (value === minimum && minimum === 0)).toBe(true);
    expect(message.startsWith(`${name}: ${quantity} `)).toBe(true);
    expect(message).toContain(unit);
    expect(message).not.toMatch(/NaN|undefined|Infinity Pa/);
  });

  it.each(["temperature", "pressure", "density", "enthalpy", "entropy", "quality"])("%s that is no number", (quantity) => {
    const base = { temperature: 300, pressure: 1e5, density: 1, enthalpy: 0, entropy: 0, quality: 0 };
    const pairs = [["temperature", "pressure"], ["temperature", "density"], ["pressure", "enthalpy"], ["pressure", "entropy"], ["pressure", "quality"]] as const;
    for (const [a, b] of pairs) {
      if (a !== quantity && b !== quantity) continue;
      for (const value of [NaN, Infinity, -Infinity]) {
        const error = errorOf(() => gas.at({ [a]: base[a], [b]: base[b], [quantity]: value } as unknown as StateInput));
        expect(error, `${a}, ${b} with ${value}`).toBeInstanceOf(NotFiniteError);
      }
    }
  });

  it("saturation has no value from the critical pressure on, and below the lowest", () => {
    expect(() => gas.saturation(criticalPressure)).toThrow(OutOfRangeError);
    expect(() => gas.saturation(criticalPressure * 10)).toThrow(OutOfRangeError);
    expect(() => gas.saturation(lowestSaturationPressure * 0.999)).toThrow(OutOfRangeError);
    expect(() => gas.saturation(NaN)).toThrow(NotFiniteError);
    expect(() => gas.bubblePressure(gas.criticalTemperature * 1.01)).toThrow(OutOfRangeError);
    expect(() => gas.dewPressure(minimumTemperature * 0.99)).toThrow(OutOfRangeError);
    expect(gas.saturation(criticalPressure * 0.9999).liquidDensity).toBeGreaterThan(0);
    expect(gas.saturation(lowestSaturationPressure).liquidDensity).toBeGreaterThan(0);
  });

  it("the limits themselves are in range, and come back from every pair", () => {
    for (const pressure of [1, maximumPressure]) {
      for (const temperature of [gas.lowestTemperature(pressure), maximumTemperature]) {
        const { enthalpy, entropy, density } = gas.temperaturePressure(temperature, pressure, new State());
        expect(gas.at({ pressure, enthalpy }).temperature).toBeCloseTo(temperature, 6);
        expect(gas.at({ pressure, entropy }).temperature).toBeCloseTo(temperature, 6);
        expect(gas.at({ temperature, density }).pressure / pressure).toBeCloseTo(1, 8);
      }
    }
  });

  it("a pair that fixes no state is an error", () => {
    const error = errorOf(() => gas.at({ enthalpy: 1 } as unknown as StateInput));
    expect(error).toBeInstanceOf(FluidError);
    expect((error as FluidError).code).toBe("unknown-input");
  });
});

describe("messages", () => {
  it("say what is out of range, and the range", () => {
    expect(() => fluid("air").at({ temperature: 45, pressure: 1e5 })).toThrow(
      "air: temperature 45 K is below 59.75 K, where it freezes; the equation holds from 59.75 to 2000 K",
    );
  });
});

describe("freezing", () => {
  it("air between bubble and dew, with a bubble point below its freezing, is out of range", () => {
    expect(() => fluid("air").at({ temperature: 61, pressure: 4000 })).toThrow("where the liquid part freezes");
    // The gas beside it is not.
    expect(fluid("air").at({ temperature: 63, pressure: 4000 }).phase).toBe("gas");
    expect(() => fluid("air").at({ temperature: 61, density: 0.3 })).toThrow(OutOfRangeError);
  });

  it("liquid under pressure is out of range where it is solid", () => {
    // Nitrogen melts at 82.8 K under 100 MPa (Span et al. 2000), helium at 4.2 K under 14 MPa (Mills and Grilly 1955).
    expect(() => fluid("nitrogen").at({ temperature: 75, pressure: 1e8 })).toThrow("where it freezes");
    expect(fluid("nitrogen").at({ temperature: 83, pressure: 1e8 }).phase).toBe("liquid");
    expect(() => fluid("helium").at({ temperature: 3, pressure: 14e6 })).toThrow("where it freezes");
    expect(fluid("helium").at({ temperature: 4.3, pressure: 14e6 }).phase).toBe("liquid");
    expect(fluid("nitrogen").lowestTemperature(1e8)).toBeCloseTo(81.8, 0);
    expect(fluid("nitrogen").lowestTemperature(1e5)).toBe(63.151);
    expect(() => fluid("nitrogen").at({ temperature: 70, density: 1000 })).toThrow(OutOfRangeError);
  });
});

describe("saturation", () => {
  it("is remembered by pressure, to its last digit", () => {
    const air = fluid("air");
    for (let i = 0; i < 3000; i++) {
      const pressure = 1e5 + 0.25 * i;
      expect(air.saturation(pressure).pressure).toBe(pressure);
    }
    expect(air.saturation(1e5)).toBe(air.saturation(1e5));
    expect(air.saturation(1e5 + 1e-9).bubbleTemperature).toBeCloseTo(air.saturation(1e5).bubbleTemperature, 12);
  });
});

describe("what has no meaning", () => {
  it("is null in `at`", () => {
    const wet = fluid("air").at({ pressure: 101325, quality: 0.5 });
    expect([wet.isobaricHeatCapacity, wet.isochoricHeatCapacity, wet.speedOfSound]).toEqual([null, null, null]);
    expect(wet.phase).toBe("two-phase");
    const dense = fluid("air").at({ temperature: 300, pressure: 1e7 });
    expect(dense.vapourFraction).toBeNull();
    expect(dense.phase).toBe("supercritical");
    expect(fluid("air").at({ temperature: 80, pressure: 1e7 }).phase).toBe("liquid");
    expect(fluid("air").at({ temperature: 80, pressure: 1e6 })).toMatchObject({ phase: "liquid", vapourFraction: 0 });
    expect(fluid("air").at({ temperature: 300, pressure: 1e5 })).toMatchObject({ phase: "gas", vapourFraction: 1 });
  });
});
