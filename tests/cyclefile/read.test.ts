import { describe, expect, it } from "vitest";
import { readCycle } from "../../src/cyclefile/read.js";
import { bench, changed, example } from "./cases.js";

const set = (values: Record<string, string | number>) => ({ set: Object.entries(values).map(([address, value]) => ({ address, value })) });

describe("a cycle file", () => {
  it("becomes a definition in SI units with defaults filled in", () => {
    const { loop, ...rest } = readCycle(bench);
    expect(rest).toEqual({
      title: "Bench cooler for a detector stage",
      fluid: "air",
      surroundings: { temperature: 295.15, pressure: 101325, relativeHumidity: 0.5, carbonDioxide: 420e-6 },
      circuit: "closed",
      flow: { kind: "mass", value: 0.006 },
      branches: {},
    });
    expect(loop.map(({ kind, name, side }) => [kind, name, side])).toEqual([
      ["compressor", "C1", undefined],
      ["aftercooler", "A1", undefined],
      ["recuperator", "HX1", "warm"],
      ["expander", "T1", undefined],
      ["load", "L1", undefined],
      ["recuperator", "HX1", "cold"],
    ]);
    expect(loop[0].values).toMatchObject({ "outlet-pressure": 8e5, efficiency: 0.62, "drive-efficiency": 0.88, stages: 1, "intercooler-pressure-drop": 0 });
    expect(loop[1].values).toMatchObject({ "outlet-temperature": 303.15, "pressure-drop": 1e4 });
    expect(loop[2].values).toMatchObject({ effectiveness: 0.95, "heat-leak": 0, "pressure-drop": 1.5e4 });
    expect(loop[5].values).toEqual({ "pressure-drop": 5e3 });
  });

  it("is surrounded by 20 degC, 1 atm, 50 % where it does not say", () => {
    const without = changed(bench, ["surroundings: { temperature: 22 degC, pressure: 1 atm, relative-humidity: 50 % }\n", ""]);
    expect(readCycle(without).surroundings).toEqual({ temperature: 293.15, pressure: 101325, relativeHumidity: 0.5, carbonDioxide: 420e-6 });
  });

  it("may leave out title and circuit, and be written in any order", () => {
    const lines = changed(bench, ["title: Bench cooler for a detector stage\n", ""], ["circuit: closed\n", ""], ["flow: 6 g/s\n", ""]);
    expect(readCycle(`${lines}\nflow: 6 g/s\n`, { file: "bench.yaml" })).toEqual({ ...readCycle(bench), title: "bench.yaml" });
  });

  // DIN 1343: 0 degC, 101.325 kPa; standard cubic foot: 60 degF, 14.696 psi; ISO 1217: the volume at the inlet's own state.
  it.each([
    ["6 g/s", { kind: "mass", value: 0.006 }],
    ["0.2 mol/s", { kind: "molar", value: 0.2 }],
    ["36 Nm3/h", { kind: "reference volume", value: 0.01, temperature: 273.15, pressure: 101325 }],
    ["60 NL/min", { kind: "reference volume", value: 0.001, temperature: 273.15, pressure: 101325 }],
    ["10 scfm", { kind: "reference volume", value: 10 * 4.719474e-4, temperature: 288.7056, pressure: 101325.4 }],
    ["250 L/min", { kind: "inlet volume", value: 0.25 / 60 }],
    ["2 * 3 g/s", { kind: "mass", value: 0.006 }],
  ])("takes a flow of %s", (text, expected) => {
    const { flow } = readCycle(changed(bench, ["flow: 6 g/s", `flow: ${text}`]));
    expect(flow.kind).toBe(expected.kind);
    for (const [key, value] of Object.entries(expected)) if (typeof value === "number") expect((flow as unknown as Record<string, number>)[key] / value).toBeCloseTo(1, 5);
  });

  it("uses names wherever a value stands, whatever their order, and each other", () => {
    const text = changed(bench, ["{ p_high: 8 bar }", "{ p_high: 4 * p_low, p_low: 2 bar, T_room: 18 degC }"], ["temperature: 22 degC", "temperature: T_room"], ["30 degC", "T_room + 12 K"]);
    const { surroundings, loop } = readCycle(text);
    expect(surroundings.temperature).toBeCloseTo(291.15, 10);
    expect(loop[0].values["outlet-pressure"]).toBeCloseTo(8e5, 6);
    expect(loop[1].values["outlet-temperature"]).toBeCloseTo(303.15, 10);
  });

  it("counts gauge pressures from the surroundings' own pressure", () => {
    const text = changed(bench, ["pressure: 1 atm", "pressure: 900 mbar"], ["8 bar }", "7 barg }"], ["1.2 bar", "0.1 bar + 0.2 barg"]);
    const { loop } = readCycle(text);
    expect(loop[0].values["outlet-pressure"]).toBe(7.9e5);
    expect(loop[3].values["outlet-pressure"]).toBeCloseTo(1.2e5, 8);
  });

  it("reads block style as well as flow style, quoted values and a byte-order mark", () => {
    const block = changed(bench, ["- load:        { name: L1, heat: 20 W }", "- load:\n      name: L1\n      heat: \"20 W\""]);
    expect(readCycle(block)).toEqual(readCycle(bench));
    expect(readCycle(`\uFEFF${bench}`)).toEqual(readCycle(bench));
    expect(readCycle(bench.replaceAll("\n", "\r\n"))).toEqual(readCycle(bench));
  });

  it("reads branches with the loop", () => {
    const text = changed(bench, ["  - load:", "  - splitter: { name: S1, branch: side, fraction: 30 % }\n  - mixer: { name: M1, branch: side }\n  - load:"]);
    const { branches } = readCycle(`${text}\nbranches:\n  side:\n    - line: { name: P1, heat-leak: 3 W }\n`);
    expect(branches).toEqual({ side: [{ kind: "line", name: "P1", values: { "heat-leak": 3, "pressure-drop": 0 } }] });
  });
});

describe("an override", () => {
  it("takes the place of the file's value, in units or in SI", () => {
    const values = (overrides: Record<string, string | number>) => readCycle(bench, set(overrides));
    expect(values({ "T1.efficiency": "55 %" }).loop[3].values.efficiency).toBeCloseTo(0.55, 15);
    expect(values({ "T1.efficiency": 0.55 }).loop[3].values.efficiency).toBe(0.55);
    expect(values({ "A1.outlet-temperature": 310 }).loop[1].values["outlet-temperature"]).toBe(310);
    expect(values({ "surroundings.temperature": "15 degC" }).surroundings.temperature).toBeCloseTo(288.15, 10);
    expect(values({ flow: "2 * 60 NL/min" }).flow).toMatchObject({ kind: "reference volume" });
    expect(values({ "T1.outlet-pressure": "p_high / 4" }).loop[3].values["outlet-pressure"]).toBe(2e5);
    expect(values({ "HX1.cold.pressure-drop": "30 mbar" }).loop[5].values["pressure-drop"]).toBe(3e3);
    expect(values({ "HX1.warm.pressure-drop": "30 mbar" }).loop[2].values["pressure-drop"]).toBe(3e3);
  });

  it("sets what the file leaves out", () => {
    expect(readCycle(bench, set({ "T1.seal-leak": "3 %" })).loop[3].values["seal-leak"]).toBeCloseTo(0.03, 15);
    expect(readCycle(bench, set({ "surroundings.pressure": "950 mbar" })).surroundings.pressure).toBe(9.5e4);
  });

  it("of one alternative puts out the other", () => {
    const { values } = readCycle(bench, set({ "HX1.conductance": "120 W/K" })).loop[2];
    expect(values).toMatchObject({ conductance: 120 });
    expect(values).not.toHaveProperty("effectiveness");
  });

  it("of a name reaches everything that uses it", () => {
    const text = changed(bench, ["{ p_high: 8 bar }", "{ p_high: 8 bar, p_low: p_high / 6 }"], ["1.2 bar", "p_low"]);
    const { loop } = readCycle(text, set({ "let.p_high": "9 bar" }));
    expect([loop[0].values["outlet-pressure"], loop[3].values["outlet-pressure"]]).toEqual([9e5, 1.5e5]);
    expect(readCycle(text, set({ "let.p_high": 9e5 })).loop).toEqual(loop);
  });

  it("of the surroundings' pressure moves the zero of gauge units", () => {
    const { loop } = readCycle(example("workshop-air"), set({ "surroundings.pressure": "900 mbar" }));
    expect(loop[0].values["outlet-pressure"]).toBe(7.9e5);
  });

  it("in SI units of the flow is of the kind that the file gives", () => {
    expect(readCycle(bench, set({ flow: 0.01 })).flow).toEqual({ kind: "mass", value: 0.01 });
    expect(readCycle(example("workshop-air"), set({ flow: 0.01 })).flow).toEqual({ kind: "inlet volume", value: 0.01 });
  });

  it("given last counts", () => {
    const overrides = [{ address: "T1.efficiency", value: "40 %" }, { address: "T1.efficiency", value: "60 %" }];
    expect(readCycle(bench, { set: overrides }).loop[3].values.efficiency).toBeCloseTo(0.6, 15);
  });
});
