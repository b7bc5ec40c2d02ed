import { readFileSync } from "node:fs";
import { fileURLToPath } from "node:url";
import { describe, expect, it } from "vitest";
import { InputError } from "../../src/cyclefile/errors.js";
import { evaluateExpression } from "../../src/cyclefile/expression.js";
import { openCycleFile } from "../../src/cyclefile/open.js";
import { solve } from "../../src/cycle/solve.js";
import { blockQuantities, resultQuantities, resultQuantity } from "../../src/studies/quantities.js";
import { stationQuantities } from "../../src/studies/station-quantities.js";
import { MOST_POINTS, sweep, type SweepRow } from "../../src/studies/sweep.js";
import { parseVariation } from "../../src/studies/variation.js";

const example = (name: string) => openCycleFile(readFileSync(fileURLToPath(new URL(`../../cycles/${name}`, import.meta.url)), "utf8"), name, evaluateExpression);
const file = example("bench-cooler.yaml");
const definition = file.define();

function rows(varies: readonly string[], shown: readonly string[], steps = 5): SweepRow[] {
  const swept = varies.map((vary) => {
    const { variable, values } = parseVariation(vary, file, [], steps);
    return { variable, values: values ?? [] };
  });
  return [...sweep(file, swept, shown.map((name) => resultQuantity(name, definition)))];
}

const values = (vary: string, steps = 3) => parseVariation(vary, file, [], steps);

describe("variations", () => {
  it.each([
    ["T1.efficiency=30%..80%", "%", [30, 55, 80]],
    ["T1.efficiency=30..80 %", "%", [30, 55, 80]],
    ["T1.efficiency=0.3..0.8", undefined, [0.3, 0.55, 0.8]],
    ["T1.efficiency=0.5,0.3", undefined, [0.5, 0.3]],
    ["A1.outlet-temperature=30..40 degC", "degC", [30, 35, 40]],
    ["let.p_high=6 bar..10bar", "bar", [6, 8, 10]],
    ["C1.outlet-pressure=10..6 barg", "barg", [10, 8, 6]],
    ["flow=100..300 L/min", "L/min", [100, 200, 300]],
    ["L1.heat=1e-1..3e-1 W", "W", [0.1, 0.2, 0.3]],
  ])("%s", (vary, unit, expected) => {
    const { variable, values: found } = values(vary);
    expect(variable.unit).toBe(unit);
    found?.forEach((value, i) => expect(value).toBeCloseTo(expected[i], 9));
    expect(found).toHaveLength(expected.length);
  });

  it("moves a count in whole steps, once each", () => {
    expect(values("C1.stages=1..4", 26).values).toEqual([1, 2, 3, 4]);
  });

  it("without a range has the unit of the file and no values", () => {
    const { variable, values: found } = values("flow");
    expect([variable.unit, variable.given, found]).toEqual(["g/s", 6, undefined]);
  });

  it("knows a number that --set has put in the file's place", () => {
    const { variable } = parseVariation("flow", file, [{ address: "flow", value: "12 kg/h" }], 2);
    expect([variable.unit, variable.given]).toEqual(["kg/h", 12]);
  });

  it.each(["T1.efficiency=", "T1.efficiency=30%..", "T1.efficiency=30%..120%", "T1.efficiency=1..2..3", "T1.efficiency=0.5..0.5", "T1.efficiency=0.5 bar,0.6 bar", "T1.efficency=0.3..0.4", "L1.heat=1..2", "T1.efficiency=a..b"])(
    "refuses %s",
    (vary) => {
      expect(() => values(vary)).toThrow(InputError);
    },
  );
});

describe("sweeps", () => {
  it("solve the machine at every value, ends included", () => {
    const found = rows(["T1.efficiency=30%..80%"], ["cold-end.temperature", "T1.power"]);
    expect(found.map((row) => row.values[0])).toEqual([30, 42.5, 55, 67.5, 80]);
    const alone = solve(file.define([{ address: "T1.efficiency", value: 0.425 }]), { threshold: false });
    expect(found[1].results[0]).toBeCloseTo(alone.coldEnd.temperature, 9);
    expect(found[1].results[1]).toBeCloseTo(alone.power.expansion, 9);
    expect(found.map(({ wet }) => wet)).toEqual(found.map((row) => solve(file.define([{ address: "T1.efficiency", value: row.values[0] / 100 }]), { threshold: false }).liquefaction.reached));
  });

  it("keep a machine without a steady state as a row that says why", () => {
    const found = rows(["L1.heat=20 W,5 kW"], ["capacity"]);
    expect(found.map(({ status }) => status)).toEqual(["solved", "no steady state"]);
    expect(found[1].reason).toContain("L1");
    expect(found[1].results).toEqual([null]);
  });

  it("keep values that contradict one another as a row too", () => {
    const [fine, wrong] = rows(["T1.outlet-pressure=1.2 bar,9 bar"], ["capacity"]);
    expect([fine.status, wrong.status]).toEqual(["solved", "not allowed"]);
    expect(wrong.reason).not.toBe("");
  });

  it("of two variables move the second fastest", () => {
    const found = rows(["T1.efficiency=0.4,0.5", "L1.heat=0,20 W"], ["capacity"]);
    expect(found.map((row) => row.values)).toEqual([[0.4, 0], [0.4, 20], [0.5, 0], [0.5, 20]]);
    expect(found[3].results[0]).toBe(20);
  });

  it("find what costs more only where it is shown", () => {
    const [[required, oxygen], [power]] = [["liquefaction.required", "station-4.liquid-oxygen"], ["net-power"]].map((shown) => rows(["T1.efficiency=50%,60%"], shown)[0].results);
    const alone = solve(definition);
    expect(required).toBeCloseTo(alone.liquefaction.required as number, 9);
    expect(oxygen).toBeCloseTo(alone.stations[3].liquidOxygen as number, 9);
    expect(power).toBeCloseTo(alone.power.net, 6);
  });

  it("refuse more points than can be waited for, before the first", () => {
    const { variable } = parseVariation("T1.efficiency", file, [], 2);
    expect(() => sweep(file, [{ variable, values: Array.from({ length: MOST_POINTS + 1 }, () => 0.5) }], [])).toThrow(InputError);
  });
});

describe("the register of results", () => {
  const all = [...resultQuantities, ...blockQuantities(definition), ...stationQuantities(definition)];
  it("has each name once, in kebab-case behind a block's name, with a text", () => {
    expect(new Set(all.map(({ name }) => name)).size).toBe(all.length);
    for (const { name, help } of all) {
      expect(name).toMatch(/^(?:[A-Z]\w*|station-\d+|[a-z]+(?:-[a-z]+)*)(?:\.[a-z]+(?:-[a-z]+)*)?$/);
      expect(help).not.toBe("");
    }
  });

  it("answers a number for a machine with a load, but where it has no such number", () => {
    const result = solve(definition);
    const none = all.filter(({ get }) => !Number.isFinite(get(result))).map(({ name }) => name);
    // The warm gas condenses in this recuperator: its stations' liquid alone has a composition.
    const dry = result.stations.filter(({ liquidOxygen }) => liquidOxygen === null).map(({ station }) => `station-${station}.liquid-oxygen`);
    expect(none.filter((name) => !["HX1.conductance", "HX1.transfer-units"].includes(name))).toEqual(dry);
  });

  it("numbers stations as the state points are, an open circuit's intake being 0", () => {
    const opened = example("workshop-air.yaml").define();
    expect(opened.circuit).toBe("open");
    const result = solve(opened, { threshold: false });
    const names = stationQuantities(opened).filter(({ name }) => name.endsWith(".temperature"));
    expect(names.map(({ name }) => name)).toEqual(result.stations.map(({ station }) => `station-${station}.temperature`));
    expect(names.map(({ get }) => get(result))).toEqual(result.stations.map(({ temperature }) => temperature));
    expect(names[0].name).toBe("station-0.temperature");
  });
});
