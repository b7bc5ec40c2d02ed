import { describe, expect, test } from "vitest";
import { purityClass, purityClassDewPoint } from "../../src/fluids/air-purity.js";
import { carbonDioxideFrostPoint, carbonDioxideSublimationPressure } from "../../src/fluids/carbon-dioxide.js";
import { dewPoint, frostPoint, humidityRatio, waterAtSaturation } from "../../src/fluids/moist-air.js";
import { liquidWaterVapourPressure, waterDewPoint, waterVapourPressure } from "../../src/fluids/water.js";

const close = (value: number, expected: number, relative: number): void => expect(Math.abs(value / expected - 1)).toBeLessThanOrEqual(relative);

describe("water", () => {
  test("over ice at 230 K (IAPWS R14-08(2011), table 3: 8.94735 Pa)", () => close(waterVapourPressure(230), 8.94735, 1e-6));

  // ASHRAE Handbook Fundamentals 2017, chapter 1, table 3; its own formula is an older one.
  test.each([
    [-60, 1.08, 1e-2],
    [-20, 103.24, 3e-4],
    [-5, 401.74, 3e-4],
    [5, 872.6, 3e-4],
    [25, 3169.7, 3e-4],
    [50, 12351.3, 3e-4],
    [100, 101418, 3e-4],
  ])("saturation at %d degC", (celsius, expected, tolerance) => close(waterVapourPressure(celsius + 273.15), expected, tolerance));

  test("the two curves meet at the triple point to 1e-5", () => close(waterVapourPressure(273.16), waterVapourPressure(273.16 - 1e-9), 1e-5));

  test("over supercooled water it is higher than over ice, by 21.5 % at -20 degC (125.4 Pa over water, 103.2 over ice: meteorological tables, from memory)", () =>
    close(liquidWaterVapourPressure(253.15), 125.4, 3e-3));

  test.each([60, 120, 200, 250, 273.159, 273.17, 280, 300, 400, 640])("the dew point at the saturation pressure of %d K is that temperature", (temperature) =>
    expect(waterDewPoint(waterVapourPressure(temperature))).toBeCloseTo(temperature, 7));

  test("pressures beyond the curves give their ends", () => {
    expect(waterDewPoint(0)).toBe(50);
    expect(waterDewPoint(1e9)).toBe(647.096);
  });
});

describe("carbon dioxide", () => {
  test("sublimes at 194.6857 K under 101325 Pa (Bedford et al., Metrologia 20 (1984))", () => close(carbonDioxideSublimationPressure(194.6857), 101325, 1e-4));
  test("triple point (Span and Wagner 1996)", () => close(carbonDioxideSublimationPressure(216.592), 517950, 1e-12));

  // An independent fit: N. Fray and B. Schmitt, Planet. Space Sci. 57 (2009) 2053.
  test.each([
    [120, 4.13514, 0.1],
    [140, 186.013, 0.02],
    [160, 3131.7, 0.006],
    [180, 27496.5, 0.003],
  ])("within a few tenths of a kelvin of another fit at %d K", (temperature, expected, tolerance) =>
    close(carbonDioxideSublimationPressure(temperature), expected, tolerance));

  // Frost points of 420 ppm by this equation, recomputed outside this program; Fray and Schmitt give 131.41, 140.75 and 145.22 K.
  test.each([
    [1e5, 131.6141, 131.41],
    [5e5, 140.8241, 140.75],
    [1e6, 145.2435, 145.22],
  ])("420 ppm at %d Pa", (pressure, expected, other) => {
    const found = frostPoint(420e-6, pressure) as number;
    expect(found).toBeCloseTo(expected, 3);
    expect(Math.abs(found - other)).toBeLessThan(0.3);
  });

  test.each([60, 100, 150, 216])("inverse at %d K", (temperature) =>
    expect(carbonDioxideFrostPoint(carbonDioxideSublimationPressure(temperature))).toBeCloseTo(temperature, 7));
});

describe("moist air", () => {
  // Mole fractions at 8 bar from IAPWS pressures; g/m3 of vapour at the dew point as compressed-air pages quote the classes.
  test.each([
    [1, 0.3272, 0.003],
    [2, 16.05, 0.11],
    [3, 129, 0.88],
    [4, 947.6, 6],
    [5, 1253, 7.8],
    [6, 1535, 9.4],
  ])("ISO 8573-1 class %d", (waterClass, ppm, gramsPerCubicMetre) => {
    const limit = purityClassDewPoint(waterClass) as number;
    const water = waterAtSaturation(limit, 8e5);
    close((water / (1 + water)) * 1e6, ppm, 1e-3);
    const content = (waterVapourPressure(limit) * 18.015268) / (8.314462618 * limit);
    close(content, gramsPerCubicMetre, 0.1);
    expect(purityClass(limit)).toBe(waterClass);
    expect(purityClass(dewPoint(waterAtSaturation(limit, 8e5), 8e5) as number)).toBe(waterClass);
  });

  test("numbers that are no class, and air wetter than any", () => {
    expect(purityClassDewPoint(0)).toBeUndefined();
    expect(purityClassDewPoint(7)).toBeUndefined();
    expect(purityClass(300)).toBeNull();
  });

  test("humidity: a dew point of 12.0 degC at 20 degC and 60 % (the known rule of psychrometric charts)", () => {
    const water = humidityRatio(293.15, 101325, 0.6);
    close(water / (1 + water), (0.6 * 2339.3) / 101325, 1e-3); // 2339.3 Pa at 20 degC, steam tables
    expect((dewPoint(water, 101325) as number) - 273.15).toBeCloseTo(12, 1);
  });

  test("gas without water or carbon dioxide has no dew or frost point", () => {
    expect(dewPoint(0, 1e5)).toBeNull();
    expect(frostPoint(0, 1e5)).toBeNull();
  });
});
