import { readdirSync, readFileSync } from "node:fs";
import { describe, expect, it } from "vitest";
import { assessed } from "../../src/cautions/registry.js";
import type { CycleDefinition } from "../../src/cycle/definition.js";
import type { CycleResult, Station } from "../../src/cycle/result.js";
import { blockKind } from "../../src/blocks/registry.js";
import { NoSteadyState } from "../../src/cycle/failure.js";
import { solve } from "../../src/cycle/solve.js";
import { readCycle } from "../../src/cyclefile/read.js";
import { blockFigures } from "../../src/present/figures.js";
import { lossTable } from "../../src/present/losses.js";
import { noSteadyState } from "../../src/present/no-steady-state.js";
import { report } from "../../src/present/report.js";
import { stationTable } from "../../src/present/stations.js";
import { understood } from "../../src/present/understood.js";
import { summary } from "../../src/present/summary.js";

const folder = new URL("../../cycles/", import.meta.url);

function definitionOf(file: string): CycleDefinition {
  return readCycle(readFileSync(new URL(file, folder), "utf8"), { file });
}

function example(file: string): CycleResult {
  const definition = definitionOf(file);
  return assessed(definition, solve(definition));
}

const solved = readdirSync(folder).map((file) => [file, example(file)] as const);
const bench = example("bench-cooler.yaml");
const benchDefinition = definitionOf("bench-cooler.yaml");

function expectNarrow(text: string): void {
  for (const line of text.split("\n")) {
    expect(line.length, line).toBeLessThanOrEqual(100);
    expect(line).toBe(line.trimEnd());
  }
}

/** The bench cooler's summary, had its expander another efficiency given and required. */
function withThreshold(given: number | null, required: number | null): string {
  const reason = required === null ? "it stays dry at 100 %" : null;
  return summary({ ...bench, liquefaction: { ...bench.liquefaction, given, required, reason } }).replaceAll(/\s+/g, " ");
}

describe("the report", () => {
  it.each(solved)("of %s fits a terminal, and holds every block, station, caution and warning", (file, result) => {
    const text = report(definitionOf(file), result, false);
    expectNarrow(text);
    expect(text).not.toMatch(/NaN|undefined|null|Infinity|\[object/);
    for (const { name, kind } of result.blocks) if (blockKind(kind) !== undefined) expect(text).toContain(`\n${name} (`);
    for (const { after } of result.stations) expect(text).toContain(` ${after} `);
    for (const { title } of result.cautions) expect(text).toContain(title);
    const flat = text.replaceAll(/\s+/g, " ");
    for (const { message } of result.warnings) expect(flat).toContain(message.replaceAll(/\s+/g, " "));
  });

  it("has colour only when asked", () => {
    expect(report(benchDefinition, bench, false).includes("\u001B")).toBe(false);
    const coloured = report(benchDefinition, bench, true);
    expect(coloured).toContain("\u001B[1m");
    // eslint-disable-next-line no-control-regex
    expect(coloured.replaceAll(/\u001B\[\d+m/g, "").split("\n").map((line) => line.trimEnd()).join("\n")).toBe(report(benchDefinition, bench, false));
  });

  it("says where there is a colder steady state too", () => {
    const other = { ...bench, solver: { ...bench.solver, otherSteadyStates: true } };
    expect(report(benchDefinition, bench, false)).not.toContain("colder steady state");
    expect(report(benchDefinition, other, false)).toContain("colder steady state");
  });
});

describe("the summary", () => {
  it("begins with the cold end and names the largest losses in their order", () => {
    const lines = summary(bench).split("\n");
    expect(lines[0]).toContain(`${bench.coldEnd.temperature.toFixed(2)} K`);
    const [first, second] = bench.exergy.toSorted((a, b) => b.destroyed - a.destroyed);
    const text = summary(bench);
    expect(text.indexOf(first.block, text.indexOf("lost in"))).toBeLessThan(text.indexOf(` ${second.block}`, text.indexOf("lost in")));
  });

  it("tells how many points the expanders have to spare, or are short", () => {
    expect(withThreshold(0.5, 0.31)).toContain("19.0 points to spare");
    expect(withThreshold(0.25, 0.31)).toContain("6.0 points short");
    expect(withThreshold(null, 0.31)).not.toContain("points");
    expect(withThreshold(0.5, null)).toContain("it stays dry at 100 %");
  });

  it("says that a machine without a load has none, and gives no COP", () => {
    const idle = { ...bench, refrigeration: { capacity: 0, loads: [] }, performance: { cop: null, carnotCop: null, secondLawEfficiency: null } };
    expect(summary(idle)).not.toMatch(/COP|null|second-law/);
  });
});

describe("the table of losses", () => {
  it("is in one unit, the largest first, without those too small to matter", () => {
    const text = lossTable([
      { block: "V1", destroyed: 250, share: 0.0196 },
      { block: "C1", destroyed: 12500, share: 0.9803 },
      { block: "L1", destroyed: 0.1, share: 8e-6 },
    ]);
    const rows = text.split("\n").slice(3).map((line) => line.trim().split(/ +/));
    expect(rows).toEqual([["C1", "12.50", "98.0", "#".repeat(39)], ["V1", "0.25", "2.0", "#"]]);
    expect(text).toContain("kW");
  });

  it("says so where nothing is lost", () => {
    expect(lossTable([])).toMatch(/nothing/);
  });
});

describe("the state-point table", () => {
  it("spares columns where long names leave no room, and never a row or the temperature", () => {
    const long: Station[] = [];
    for (const station of bench.stations) long.push({ ...station, after: `${station.after} in the upper part of the cold box`, phase: "supercritical" });
    expectNarrow(stationTable(long));
    expect(stationTable(long)).toContain("82.47");
    expect(stationTable(long)).not.toContain("exergy");
    expect(stationTable(bench.stations)).toContain("exergy");
  });

  it("gives a spreadsheet all digits and every column, with a value or nothing in each cell", () => {
    const csv = stationTable([...bench.stations, { ...bench.stations[0], after: 'a "b", c', vapourFraction: null }], "csv");
    const [heading, ...rows] = csv.split("\n");
    expect(heading.split(",")).toHaveLength(11);
    expect(rows).toHaveLength(7);
    rows.slice(0, 6).forEach((row, i) => {
      const cells = row.split(",");
      expect(cells).toHaveLength(11);
      expect(Number(cells[2]) / bench.stations[i].temperature).toBeCloseTo(1, 10);
      expect((Number(cells[3]) * 1e5) / bench.stations[i].pressure).toBeCloseTo(1, 10);
    });
    expect(rows[6]).toContain('"a ""b"", c"');
    expect(rows[6]).toContain(",,");
  });

  it("is a Markdown table of equal rows", () => {
    const [heading, rule, ...rows] = stationTable(bench.stations, "md").split("\n");
    expect(rule).toMatch(/^\|( :?-+:? \|)+$/);
    for (const line of [rule, ...rows]) expect(line.split("|")).toHaveLength(heading.split("|").length);
  });
});

describe("a block's figures", () => {
  it("leave out what is zero by default, what one stage repeats of the whole, and the profile", () => {
    const text = blockFigures(bench.blocks);
    expect(text).not.toMatch(/heat leak|ratio of each stage|discharge of each stage|profile/);
    expect(text).toContain("pressure ratio 6.957");
  });

  it("keep what is equal by nature or by chance", () => {
    const text = blockFigures([
      { name: "C2", kind: "compressor", power: 800, drivePower: 0, recoveredPower: 800, stageDischargeTemperatures: [310, 320], dischargeTemperature: 320 },
      { name: "L1", kind: "load", heat: 5, inletTemperature: 77.36, outletTemperature: 77.36 },
    ]).replaceAll(/\s+/g, " ");
    expect(text.match(/800\.0 W/g)).toHaveLength(2);
    expect(text.match(/77\.36 K/g)).toHaveLength(2);
    expect(text).toContain("310.00 K, 320.00 K");
  });

  it("are broken within a list that is longer than a line, never between a number and its unit", () => {
    const text = blockFigures([{ name: "C1", kind: "compressor", dischargeTemperature: 400, stageDischargeTemperatures: Array.from({ length: 20 }, (_, i) => 320.25 + i) }]);
    expectNarrow(text);
    expect(text.match(/\d K[,;]?/g)).toHaveLength(21);
  });

  it("are printed for every kind, from its record, with a name of any length", () => {
    for (const block of bench.blocks) expectNarrow(blockFigures([{ ...block, name: "a name that is longer than usual" }]));
    expect(blockFigures([{ name: "Z", kind: "unheard-of" }])).toBe("");
  });
});

describe("what check understood of a file", () => {
  it.each(readdirSync(folder))("%s fits a terminal and names every block", (file) => {
    const definition = definitionOf(file);
    const text = understood(definition);
    expectNarrow(text);
    for (const { name } of definition.loop) expect(text).toContain(`\n${name} `);
  });
});

describe("no steady state", () => {
  it("names block and quantity, the reason and what to change, within a terminal's width", () => {
    const text = noSteadyState(new NoSteadyState("L1", "heat", "the loads ask for 900 W but the machine lifts about 384 W at the temperature of the surroundings.", "Lower the load."));
    expectNarrow(text);
    expect(text.replaceAll(/\s+/g, " ")).toMatch(/L1, heat.*900 W.*Lower the load/);
    expect(noSteadyState(new NoSteadyState(null, "balance", "it drifts.", "Run again."))).not.toContain("null");
  });
});
