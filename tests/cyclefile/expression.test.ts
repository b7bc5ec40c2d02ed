import { describe, expect, it } from "vitest";
import { evaluateExpression } from "../../src/cyclefile/expression.js";
import type { Quantity } from "../../src/cyclefile/quantity.js";
import { isQuantity } from "../../src/cyclefile/values.js";
import { scopeOf } from "./cases.js";

const scope = scopeOf({
  p_high: { value: 8e5, kind: "pressure", unit: "bar" },
  p_gauge: { value: 8.01325e5, kind: "pressure", unit: "barg", scale: "point" },
  T_room: { value: 295.15, kind: "temperature", unit: "degC", scale: "point" },
  T_cold: { value: 100, kind: "temperature", unit: "K" },
  eta: { value: 0.6, kind: "fraction" },
});

function evaluated(text: string): Quantity {
  const result = evaluateExpression(text, scope);
  if (isQuantity(result)) return result;
  throw new Error(`${text}: ${result?.code} ${result?.found}`);
}

function codeOf(text: string): string {
  const result = evaluateExpression(text, scope);
  return result === null ? "null" : isQuantity(result) ? `${result.value} ${result.kind}` : result.code;
}

describe("an expression", () => {
  it.each([
    ["p_high - 0.2 bar", 7.8e5, "pressure"],
    ["1.3^4 * 1 bar", 2.8561e5, "pressure"],
    ["p_high / 3", 8e5 / 3, "pressure"],
    ["p_high/(2 bar)", 4, "fraction"],
    ["2 p_high", 1.6e6, "pressure"],
    ["(1 bar + 200 mbar) * 2", 2.4e5, "pressure"],
    ["1 - 5 %", 0.95, "fraction"],
    ["62 % * eta", 0.372, "fraction"],
    ["sqrt(p_high / 2 bar)", 2, "fraction"],
    ["sqrt(p_high / (2 bar))", 2, "fraction"],
    ["sqrt(8 bar * 2 bar)", 4e5, "pressure"],
    ["max(p_high, 9 bar)", 9e5, "pressure"],
    ["min(eta, 0.5)", 0.5, "fraction"],
    ["abs(-3) + exp(0) + log(1)", 4, "fraction"],
    ["2 * 3 W", 6, "power"],
    ["6 g / s", 0.006, "mass flow"],
    ["360 g/min", 0.006, "mass flow"],
    ["1 kg/h * 3.6", 0.001, "mass flow"],
    ["40 NL/min / 2", 20e-3 / 60, "normal volume flow"],
    ["250 L / min", 0.25 / 60, "volume flow"],
    ["25 cm3/min", 25e-6 / 60, "volume flow"],
    ["20 W / (4 K)", 5, "conductance"],
    ["10 W/K * 3 K", 30, "power"],
    ["pi", Math.PI, "fraction"],
    ["T_cold * 2", 200, "temperature"],
  ] as const)("%s", (text, value, kind) => {
    expect(evaluated(text).kind).toBe(kind);
    expect(evaluated(text).value / value).toBeCloseTo(1, 13);
  });

  it.each([
    ["T_room + 5 K", 300.15, "point"],
    ["T_room - 5 K", 290.15, "point"],
    ["22 degC + 5 K", 300.15, "point"],
    ["max(T_room, 20 degC)", 295.15, "point"],
    ["-5 degC + 3 K", 271.15, "point"],
    ["30 degC - T_room", 8, "difference"],
    ["50 degF - 32 degF", 10, "difference"],
    ["(30 degC - T_room) * 2", 16, "difference"],
    ["T_cold + 5 K", 105, undefined],
    ["(20 + 2) degC", 295.15, "point"],
    ["p_gauge - 0.2 bar", 7.81325e5, "point"],
    ["7 barg", 8.01325e5, "point"],
    ["p_gauge - 1 barg", 6e5, "difference"],
    ["p_high - 0.2 bar", 7.8e5, undefined],
  ] as const)("%s keeps its zero", (text, value, scale) => {
    expect(evaluated(text).value).toBeCloseTo(value, value > 1e4 ? 6 : 10);
    expect(evaluated(text).scale).toBe(scale);
  });

  it.each(["22 degC + 5 degC", "T_room + 5 degC", "T_room + T_room", "1 barg + 0.5 barg", "p_gauge + (2 * 1 barg)"])("refuses %s: a sum of two places on a scale", (text) => {
    expect(codeOf(text)).toBe("expression-units");
  });

  it("takes ratios and powers of temperatures from absolute zero", () => {
    expect(evaluated("T_room / (20 degC)").value).toBeCloseTo(295.15 / 293.15, 14);
    expect(evaluated("T_room * (p_high / (1 bar))^0.2857").value).toBeCloseTo(295.15 * 8 ** 0.2857, 9);
  });

  it.each(["3 K + 2 bar", "8 bar + 3", "sqrt(4 bar) * 1 bar", "exp(2 K)", "2 ^ (3 K)", "8 bar * 2 bar", "1 Nm3/h + 1 m3/h", "1 / 0", "0 / 0", "log(-1)", "sqrt(-1)", "1e999"])(
    "refuses %s: units that do not go together, or no value",
    (text) => expect(codeOf(text)).toBe("expression-units"),
  );

  it.each([
    "import(\"fs\")", "evaluate(\"1\")", "parse(\"1\")", "createUnit(\"x\")", "unit(3)", "f(x) = x", "x = 3", "a.b", "a[1]", "[1, 2]", "{ a: 1 }", "\"text\"", "1:3", "5!", "3 > 2", "1 ? 2 : 3", "8 bar to psi",
    "10 % 3", "true", "1; 2", "cos(0)", "degC", "sqrt", "(import(\"fs\")) degC", "(x = 3) barg", "toString(1)", "constructor(1)", "eta.constructor", "eta()", "bar(3)",
  ])("refuses %s: only arithmetic", (text) => {
    expect(codeOf(text)).toMatch(/^(expression-refused|unknown-name)$/);
  });

  it.each(["8 bar +", "(8 bar", "8 ** 2", ")", "3 @ 4"])("says that %s cannot be read", (text) => {
    expect(codeOf(text)).toBe("expression-syntax");
  });

  it("names what is unknown and the nearest let name or unit", () => {
    expect(evaluateExpression("p_hihg * 2", scope)).toMatchObject({ code: "unknown-name", suggestion: "p_high", part: "p_hihg" });
    expect(evaluateExpression("3 * 2 Bar", scope)).toMatchObject({ code: "unknown-name", suggestion: "bar" });
    expect(evaluateExpression("3 * __proto__", scope)).toMatchObject({ code: "unknown-name" });
  });

  it("follows the values of its names", () => {
    const at = (value: number) => evaluateExpression("2 * p", scopeOf({ p: { value, kind: "pressure" } }));
    expect([at(1e5), at(3e5)]).toEqual([{ value: 2e5, kind: "pressure" }, { value: 6e5, kind: "pressure" }]);
  });
});
