import { describe, expect, it } from "vitest";
import { sweepChart } from "../../src/present/sweep-chart.js";
import type { ResultQuantity } from "../../src/studies/quantities.js";
import type { Swept, SweepRow } from "../../src/studies/sweep.js";

const temperature: ResultQuantity = { name: "cold-end.temperature", dimension: "temperature", help: "", get: () => null };

/** A sweep of L1.heat over points that have a value or none. */
function sweptOver(points: readonly (readonly [number, number | null])[]): [Swept, SweepRow[]] {
  const swept = { variable: { address: "L1.heat", unit: "W" }, values: points.map(([x]) => x) } as unknown as Swept;
  const rows = points.map(([x, y]): SweepRow => ({ values: [x], status: y === null ? "no steady state" : "solved", reason: null, wet: false, results: [y] }));
  return [swept, rows];
}

function drawn(points: readonly (readonly [number, number | null])[], marks: { x: number; text: string }[] = []): string[] {
  const [swept, rows] = sweptOver(points);
  return (sweepChart(swept, 0, temperature, rows, marks) ?? "").split("\n");
}

describe("the chart of a sweep", () => {
  it("spreads values by their place and not by their number", () => {
    const lines = drawn([[0, 100], [1, 200], [10, 200]]);
    const top = lines.find((line) => line.trimStart().startsWith("200.00")) ?? "";
    // The rise takes a tenth of the 78 columns.
    expect((top.match(/─/g) ?? []).length).toBeGreaterThan(65);
  });

  it("leaves a gap where there is no steady state", () => {
    const lines = drawn([[0, 100], [1, 110], [2, null], [3, 130], [4, 140]]);
    const body = lines.slice(1, 12).map((line) => line.padEnd(90).slice(12));
    for (let column = 21; column < 57; column++) expect(body.every((line) => line[column] === " "), String(column)).toBe(true);
    expect(body.some((line) => line[5] !== " ")).toBe(true);
    expect(body.some((line) => line[70] !== " ")).toBe(true);
  });

  it("draws no line through values that do not change, or change by round-off", () => {
    const [swept, rows] = sweptOver([[0, 100], [1, 100 + 1e-12], [2, 100]]);
    expect(sweepChart(swept, 0, temperature, rows, [])).toBeNull();
  });

  it("draws none of two machines", () => {
    const [swept, rows] = sweptOver([[0, 100], [1, 200]]);
    expect(sweepChart(swept, 0, temperature, rows, [])).toBeNull();
  });

  it("puts the text of a mark on the side where there is room, and leaves out marks beyond the range", () => {
    const points = [[0, 100], [5, 150], [10, 200]] as const;
    const marks = [{ x: 0, text: "left" }, { x: 10, text: "right" }, { x: 11, text: "beyond" }];
    const pointers = drawn(points, marks).filter((line) => line.includes("^"));
    expect(pointers).toEqual([`${" ".repeat(12)}^ left`, "right ^".padStart(12 + 78)]);
  });

  it("draws values in any order of the sweep", () => {
    expect(drawn([[10, 200], [5, 150], [0, 100]])).toEqual(drawn([[0, 100], [5, 150], [10, 200]]));
  });
});
