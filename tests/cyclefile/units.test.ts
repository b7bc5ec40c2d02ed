import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { evaluateExpression } from "../../src/cyclefile/expression.js";
import { accepted, needsExpression, plainQuantity, type Quantity } from "../../src/cyclefile/quantity.js";
import { fromSI, toSI, unitNames, units } from "../../src/cyclefile/units.js";
import { isQuantity } from "../../src/cyclefile/values.js";
import { scopeOf } from "./cases.js";

const SURROUNDINGS = 97_000;

function plain(text: string): Quantity {
  const quantity = plainQuantity(text, SURROUNDINGS);
  if (quantity === "not plain" || "unknownUnit" in quantity) throw new Error(`${text} is not plain`);
  return quantity;
}

describe("the table of units", () => {
  // NIST Special Publication 811 (2008), appendix B, to its seven digits.
  it.each([
    ["1 psi", 6.894757e3, "pressure"],
    ["1 atm", 1.01325e5, "pressure"],
    ["1 torr", 1.333224e2, "pressure"],
    ["1 mmHg", 1.333224e2, "pressure"],
    ["1 cfm", 4.719474e-4, "volume flow"],
    ["1 lb/h", 1.259979e-4, "mass flow"],
    ["1 lb/min", 7.559873e-3, "mass flow"],
    ["212 degF", 373.15, "temperature"],
    ["32 degF", 273.15, "temperature"],
    ["491.67 degR", 273.15, "temperature"],
    ["22 degC", 295.15, "temperature"],
  ] as const)("%s is %d", (text, value, kind) => {
    expect(plain(text).kind).toBe(kind);
    expect(plain(text).value / value).toBeCloseTo(1, 6);
  });

  it("counts gauge units from the surroundings' pressure", () => {
    expect(plain("0 barg").value).toBe(SURROUNDINGS);
    expect(plain("7 barg").value).toBe(SURROUNDINGS + 7e5);
    expect(plain("-50 kPag").value).toBe(SURROUNDINGS - 5e4);
    expect(plain("100 psig").value).toBeCloseTo(SURROUNDINGS + 6.894757e5, -1);
  });

  it("holds everything that the cycle file's description promises", () => {
    const promised = "Pa kPa MPa bar mbar psi atm torr mmHg barg psig kPag K degC degF degR kg/s g/s kg/h g/min lb/h mol/s kmol/h Nm3/h NL/min NL/s scfm scfh L/min L/s m3/h m3/min m3/s cfm W kW mW W/K kW/K L mL m3 cm3 %";
    for (const name of promised.split(" ")) expect(units, name).toHaveProperty([name]);
  });

  it("tells a measure by all its units, a difference by none with a zero of its own", () => {
    for (const name of unitNames(["pressure"])) expect(accepted("pressure").split(/[:,] /)).toContain(name);
    expect(accepted("pressure difference")).not.toMatch(/barg|psig|kPag/);
    expect(accepted("temperature difference")).not.toMatch(/degC/);
  });

  it("comes back from writing and reading again", () => {
    fc.assert(
      fc.property(fc.constantFrom(...Object.keys(units)), fc.double({ min: 1e-6, max: 1e9, noNaN: true }), (name, value) => {
        const written = `${fromSI(value, units[name], SURROUNDINGS)} ${name}`;
        const scaled = Math.max(value, units[name].offset ?? 0, units[name].gauge === true ? SURROUNDINGS : 0);
        expect(Math.abs(plain(written).value - value)).toBeLessThanOrEqual(1e-14 * scaled);
        expect(toSI(fromSI(value, units[name], SURROUNDINGS), units[name], SURROUNDINGS)).toBe(plain(written).value);
      }),
      { seed: 1 },
    );
  });
});

describe("the two ways of reading a value", () => {
  it.each(Object.keys(units))("agree for %s", (name) => {
    for (const number of [0, 1, 3.7, 0.2, 1e-3, 12345.678, -2.5]) {
      const text = `${number} ${name}`;
      const evaluated = evaluateExpression(text, scopeOf({}, SURROUNDINGS));
      const { unit: _unit, ...quick } = plain(text);
      if (!isQuantity(evaluated)) throw new Error(`${text}: ${evaluated?.found}`);
      const { value, ...rest } = evaluated;
      const { value: quickValue, ...quickRest } = quick;
      expect({ text, ...rest }).toEqual({ text, ...quickRest });
      expect(Math.abs(value - quickValue), text).toBeLessThanOrEqual(1e-15 * Math.max(Math.abs(quickValue), units[name].offset ?? 0, units[name].gauge === true ? SURROUNDINGS : 0));
    }
  });

  it("agree for bare numbers", () => {
    for (const text of ["0.62", "-3", "+4", "1e3", "2.5E-3", ".5", "7."]) {
      expect(evaluateExpression(text, scopeOf())).toEqual(plain(text));
    }
  });

  it("are told apart by the form of the text alone", () => {
    for (const text of ["8 bar", "0.62", "62 %", "62%", "22degC", "p_high", "5 J/(kg K)", "-40 degC", "1e3 W", "3 foo", "22 \u00B0C", ""]) expect(needsExpression(text), text).toBe(false);
    for (const text of ["8 bar - 0.2 bar", "8 bar-0.2 bar", "1.3^4 * 1 bar", "(8 bar)", "2 * p", "6 g / s", "10 % 3", "sqrt(2)", "1e999"]) expect(needsExpression(text), text).toBe(true);
  });
});
