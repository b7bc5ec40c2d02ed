import { describe, expect, it } from "vitest";
import { blockKinds } from "../../src/blocks/registry.js";
import { InputError } from "../../src/cyclefile/errors.js";
import { evaluateExpression } from "../../src/cyclefile/expression.js";
import { openCycleFile } from "../../src/cyclefile/open.js";
import { readCycle } from "../../src/cyclefile/read.js";
import { bench, changed, example } from "./cases.js";

const throttle = example("throttle-cooler");

describe("an opened file", () => {
  it("gives the same definition again and again, whatever was overridden between", () => {
    const file = openCycleFile(throttle, "x.yaml", evaluateExpression);
    const first = file.define();
    for (const [address, value] of [["L1.heat", "3 W"], ["let.p_low", "1.5 bar"], ["surroundings.temperature", "5 degC"], ["flow", "2 g/s"]] as const) {
      const overridden = file.define([{ address, value }]);
      expect(overridden).not.toEqual(first);
      expect(overridden).toEqual(readCycle(throttle, { file: "x.yaml", set: [{ address, value }] }));
      expect(file.define()).toEqual(first);
    }
    expect(() => file.define([{ address: "L1.heat", value: "3 K" }])).toThrow(InputError);
    expect(file.define()).toEqual(first);
  });

  it("evaluates an expression again only when something under it changes", () => {
    let evaluations = 0;
    const file = openCycleFile(throttle, "x.yaml", (text, scope) => {
      evaluations++;
      return evaluateExpression(text, scope);
    });
    for (let i = 1; i < 20; i++) file.define([{ address: "L1.heat", value: i }]);
    expect(evaluations).toBe(1);
    file.define([{ address: "let.p_low", value: "1.4 bar" }]);
    expect(evaluations).toBe(2);
  });

  it("tells whether it takes the evaluator of expressions", () => {
    expect(openCycleFile(bench, "x.yaml").needsExpressions()).toBe(false);
    expect(openCycleFile(bench, "x.yaml").needsExpressions([{ address: "T1.outlet-pressure", value: "p_high / 4" }])).toBe(true);
    expect(openCycleFile(bench, "x.yaml").needsExpressions([{ address: "T1.outlet-pressure", value: 1.2e5 }])).toBe(false);
    const file = openCycleFile(throttle, "x.yaml");
    expect(file.needsExpressions()).toBe(true);
    file.useEvaluator(evaluateExpression);
    expect(file.define().loop[3].values["outlet-pressure"]).toBeCloseTo(1.35e5, 8);
  });
});

describe("an address", () => {
  const file = openCycleFile(changed(bench, ["{ p_high: 8 bar }", "{ p_high: 8 bar, T_a: 20 degC, dT: T_a - 15 degC, n: 2, m_flow: 5 g/s }"]), "x.yaml", evaluateExpression);

  it.each([
    ["T1.efficiency", { dimension: "fraction", given: 0.5, unit: undefined, range: { lowest: 0, highest: 1, open: "lowest" } }],
    ["T1.seal-leak", { dimension: "fraction", given: undefined, unit: undefined }],
    ["HX1.effectiveness", { dimension: "fraction", given: 0.95 }],
    ["HX1.warm.effectiveness", { dimension: "fraction", given: 0.95 }],
    ["HX1.warm.pressure-drop", { dimension: "pressure difference", given: 1.5e4, unit: "bar" }],
    ["HX1.cold.pressure-drop", { dimension: "pressure difference", given: 5e3, unit: "bar" }],
    ["C1.outlet-pressure", { dimension: "pressure", given: 8e5, unit: "bar" }],
    ["A1.outlet-temperature", { dimension: "temperature", given: 303.15, unit: "degC" }],
    ["flow", { dimension: "flow", given: 0.006, unit: "g/s" }],
    ["surroundings.temperature", { dimension: "temperature", given: 295.15, unit: "degC" }],
    ["surroundings.relative-humidity", { dimension: "fraction", given: 0.5, unit: "%" }],
    ["let.p_high", { dimension: "pressure", given: 8e5, unit: "bar" }],
    ["let.T_a", { dimension: "temperature", given: 293.15, unit: "degC" }],
    ["let.dT", { dimension: "temperature difference", unit: undefined }],
    ["let.n", { dimension: "fraction", given: 2, unit: undefined }],
    ["let.m_flow", { dimension: "flow", given: 0.005, unit: "g/s" }],
  ])("%s says what it measures and what the file gives", (address, expected) => {
    const about = file.address(address);
    expect(about).toMatchObject({ address, ...expected });
    expect(about.help).toMatch(/\w/);
  });

  it("is all right with one of two sides only where one has the key or gives it", () => {
    const oneSide = openCycleFile(changed(bench, [", pressure-drop: 0.05 bar", ""]), "x.yaml");
    expect(oneSide.address("HX1.pressure-drop").given).toBe(1.5e4);
    expect(() => file.address("HX1.pressure-drop")).toThrow(/HX1\.warm\.pressure-drop or HX1\.cold\.pressure-drop/);
  });

  it.each([
    ["T1.eficiency", "T1.efficiency"],
    ["T1.eff", "T1.efficiency"],
    ["HX1.warm.conductnce", "HX1.warm.conductance"],
    ["HX2.effectiveness", "HX1.effectiveness"],
    ["flwo", "flow"],
    ["let.phigh", "let.p_high"],
    ["surroundings.temp", "surroundings.temperature"],
  ])("%s is refused with the nearest, %s", (address, suggestion) => {
    let problems: InputError["problems"] = [];
    try {
      file.address(address);
    } catch (error) {
      problems = (error as InputError).problems;
    }
    expect(problems).toMatchObject([{ code: "unknown-address", suggestion }]);
  });

  it.each(["", ".", "T1", "T1.", "T1.efficiency.x", "T1.efficiency.x.y", "let", "let.", "let.p_high.x", "surroundings", "HX1.cold.effectiveness", "T1.name", "HX1.side", "__proto__.x", "title"])("%j is refused", (address) => {
    expect(() => file.address(address)).toThrow(InputError);
  });

  it("of every number given is listed and resolves to it", () => {
    const listed = file.addresses();
    expect(listed).toContain("HX1.warm.pressure-drop");
    expect(listed).toContain("HX1.effectiveness");
    expect(listed).toHaveLength(1 + 3 + 5 + 3 + 2 + 2 + 2 + 1 + 1);
    for (const address of listed) expect(file.address(address).given, address).toEqual(expect.any(Number));
  });

  it("of every number of every kind resolves, also of what the file leaves out", () => {
    const complete = example("two-turbines-booster");
    for (const { kind, sides, keys } of blockKinds) {
      const entries = (sides ?? [undefined]).map((side) => `  - ${kind}: { name: X, ${side === undefined ? "" : `side: ${side}, `}${branchKeys(keys)} }\n`);
      const opened = openCycleFile(changed(complete, ["loop:\n", `loop:\n${entries.join("")}`]), "x.yaml");
      for (const key of keys) {
        if (key.type !== "number") continue;
        const address = sides !== undefined && key.side === undefined ? `X.${sides[0]}.${key.name}` : `X.${key.name}`;
        expect(opened.address(address)).toMatchObject({ dimension: key.dimension, range: key.range, given: undefined });
      }
    }
  });

  it("in a file with faults is answered with these", () => {
    const faulty = openCycleFile(changed(bench, ["- expander:", "- expandr:"]), "x.yaml");
    expect(() => faulty.address("T1.efficiency")).toThrow(/expandr/);
  });
});

function branchKeys(keys: (typeof blockKinds)[number]["keys"]): string {
  return keys.flatMap(({ type, name }) => (type === "branch" ? [`${name}: x`] : [])).join(", ");
}
