import { readFileSync } from "node:fs";
import { fileURLToPath } from "node:url";
import { describe, expect, it } from "vitest";
import { evaluateExpression } from "../../src/cyclefile/expression.js";
import { openCycleFile } from "../../src/cyclefile/open.js";
import { InputError } from "../../src/cyclefile/errors.js";
import { solve } from "../../src/cycle/solve.js";
import { breakEven, type BreakEven } from "../../src/studies/breakeven.js";
import { parseCondition } from "../../src/studies/condition.js";
import { resultQuantity } from "../../src/studies/quantities.js";
import { parseVariation } from "../../src/studies/variation.js";

const text = readFileSync(fileURLToPath(new URL("../../cycles/bench-cooler.yaml", import.meta.url)), "utf8");
const file = openCycleFile(text, "bench-cooler.yaml", evaluateExpression);
const WITHOUT_LOAD = [
  { address: "HX1.effectiveness", value: "0.90" },
  { address: "L1.heat", value: "0 W" },
];

function ask(vary: string, until: string, overrides: { address: string; value: string }[] = []): BreakEven {
  const { variable, range } = parseVariation(vary, file, overrides, 2);
  return breakEven(file, variable, parseCondition(until, file.define(overrides)), { range, overrides });
}

function coldEndUnder(heat: number): number {
  return solve(file.define([{ address: "L1.heat", value: heat }]), { threshold: false }).coldEnd.temperature;
}

describe("break-even", () => {
  it("is the efficiency at which the bench cooler begins to liquefy", () => {
    const { turns } = ask("T1.efficiency", "liquefies", WITHOUT_LOAD);
    expect(turns).toHaveLength(1);
    expect(turns[0]).toMatchObject({ kind: "root", metAbove: true });
    // 0.4804: computed independently with a compiled reference property library and the same equations of the blocks.
    expect(turns[0].x).toBeCloseTo(0.4804, 4);
    // The same threshold, by the solver's own search.
    expect(turns[0].x).toBeCloseTo(solve(file.define(WITHOUT_LOAD)).liquefaction.required as number, 6);
  });

  it("is known to 1e-6: on either side of it the condition differs", () => {
    const { turns } = ask("L1.heat=100 W..400 W", "cold-end.temperature < 150 K");
    expect(turns).toHaveLength(1);
    expect(coldEndUnder(turns[0].x * (1 - 1e-6))).toBeLessThan(150);
    expect(coldEndUnder(turns[0].x * (1 + 1e-6))).toBeGreaterThan(150);
  });

  it("answers in the unit in which the number is written", () => {
    const [percent, bare] = ["T1.efficiency=20%..100%", "T1.efficiency=0.2..1"].map((vary) => ask(vary, "liquefies", WITHOUT_LOAD).turns[0].x);
    expect(percent).toBeCloseTo(100 * bare, 5);
    const bars = ask("C1.outlet-pressure=4 bar..12 bar", "net-power > 2500 W").turns[0].x;
    const gauge = ask("C1.outlet-pressure=50..150 psig", "net-power > 2500 W").turns[0].x;
    expect(bars).toBeCloseTo(1.01325 + gauge * 0.0689475729, 5);
  });

  it("shows the machine on either side of where it turns", () => {
    const [{ x, below, above }] = ask("T1.efficiency=10%..100%", "liquefies", WITHOUT_LOAD).turns;
    expect([below.met, below.wet, above.met, above.wet]).toEqual([false, false, true, true]);
    expect(below.x).toBeLessThan(x);
    expect(above.x).toBeGreaterThan(x);
    const alone = solve(file.define([...WITHOUT_LOAD, { address: "T1.efficiency", value: above.x / 100 }]), { threshold: false });
    expect(above.value).toBeCloseTo(alone.liquefaction.margin as number, 6);
    expect(above.coldEnd).toBeCloseTo(alone.coldEnd.temperature, 9);
  });

  it("looks on either side no further than the next place at which anything changes", () => {
    // 384.5 W is what the machine lifts at most; the load's own turn lies 0.1 W below.
    const { turns, edges } = ask("L1.heat=1 W..400 W", "capacity < 384.4 W");
    const [edge] = edges;
    expect(turns[0].above.x).toBeLessThan(edge.x);
    expect(turns[0].above).toMatchObject({ met: false, reason: null });
  });

  it("says why there is nothing beyond an edge", () => {
    const edge = ask("L1.heat=1 W..400 W", "capacity > 10 W").turns[1];
    expect(edge.below).toMatchObject({ met: true, reason: null });
    expect(edge.above.coldEnd).toBeNull();
    expect(edge.above.reason).toContain("L1");
  });

  it("is the same by way of the efficiency required", () => {
    // The file's expander has 50 %: where more is required it stays dry.
    const [byRequired] = ask("HX1.effectiveness", "liquefaction.required <= 50 %").turns;
    const [byMargin] = ask("HX1.effectiveness", "liquefies").turns;
    expect(byRequired.x).toBeCloseTo(byMargin.x, 6);
  });

  it("counts a result equal to the limit for >= and not for >", () => {
    const [atLeast, more] = [">=", ">"].map((operator) => ask("T1.efficiency=30%..80%", `capacity ${operator} 20 W`));
    expect([atLeast, more].map(({ turns }) => turns.length)).toEqual([0, 0]);
    expect(atLeast.ends.map(({ met }) => met)).toEqual([true, true]);
    expect(more.ends.map(({ met }) => met)).toEqual([false, false]);
  });

  it("says that a condition never turns, with the values at both ends", () => {
    const { turns, ends } = ask("T1.efficiency=30%..80%", "net-power > 1 W");
    expect(turns).toEqual([]);
    for (const { met, value } of ends) {
      expect(met).toBe(true);
      expect(value).toBeGreaterThan(1);
    }
  });

  it("turns where steady states end", () => {
    const { turns } = ask("L1.heat=1 W..400 W", "capacity > 10 W");
    expect(turns.map(({ kind, metAbove }) => [kind, metAbove])).toEqual([["root", true], ["edge", false]]);
    expect(turns[0].x).toBeCloseTo(10, 6);
    expect(turns[1].reason).toContain("L1");
    expect(() => solve(file.define([{ address: "L1.heat", value: turns[1].x * 0.999 }]))).not.toThrow();
    expect(() => solve(file.define([{ address: "L1.heat", value: turns[1].x * 1.001 }]))).toThrow();
  });

  it("looks around the file's own number where a key has no bounds", () => {
    const { range } = ask("C1.outlet-pressure", "net-power > 2500 W");
    expect(range[0]).toBeCloseTo(0.8, 6);
    expect(range[1]).toBeCloseTo(80, 6);
    expect(() => ask("L1.heat", "net-power > 1 kW", [{ address: "L1.heat", value: "0 W" }])).toThrow(InputError);
    expect(() => ask("C1.stages", "net-power > 1 kW")).toThrow(InputError);
  });
});

describe("conditions", () => {
  const definition = file.define();
  const result = solve(definition, { threshold: false });
  it.each([
    ["capacity > 19 W", true],
    ["capacity > 21 W", false],
    ["capacity<=0.021 kW", true],
    ["capacity >= 20 W", true],
    ["capacity <= 20 W", true],
    ["capacity > 20 W", false],
    ["capacity < 20 W", false],
    ["station-4.temperature < 90 K", true],
    ["station 1.pressure > 7.9 bar", true],
    ["station 1.pressure >8.1bar", false],
    ["cold-end.temperature < -100 degC", true],
    ["C1.discharge-temperature > 200 degC", true],
    ["C1.dischargeTemperature < 200 degC", false],
    ["second-law-efficiency < 50 %", true],
    ["mass-flow > 5.9 g/s", true],
  ])("%s is %s", (condition, met) => {
    expect((parseCondition(condition, definition).excess(result) as number) < 0).toBe(met);
  });

  it.each(["capacity > 20", "capacity > 20 bar", "capacity", "capasity > 20 W", "capacity > 20 Wat", "HX1.smallest-difference > 2 degC", "C9.power > 2 W", "station-99.pressure > 2 bar", "station-4.colour > 2 K", "capacity = 20 W", "mass-flow > 2 L/min"])(
    "refuses %s",
    (condition) => {
      expect(() => parseCondition(condition, definition)).toThrow(InputError);
    },
  );

  it("suggests the nearest result", () => {
    try {
      resultQuantity("T1.outlet-temprature", definition);
      expect.unreachable();
    } catch (error) {
      expect((error as InputError).problems[0].suggestion).toBe("T1.outlet-temperature");
    }
  });
});
