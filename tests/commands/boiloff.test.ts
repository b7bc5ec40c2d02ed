import { afterAll, beforeAll, describe, expect, it } from "vitest";
import type { Boiloff } from "../../src/studies/boiloff.js";
import { Program } from "../program.js";

const LIQUEFYING = ["cycles/bench-cooler.yaml", "--set", "T1.efficiency=60%", "--set", "L1.heat=0 W"];

let program: Program;
beforeAll(() => void (program = new Program()));
afterAll(() => program.remove());

const json = (...words: string[]): Boiloff & { origin: string } => {
  const { status, out, told } = program.run("boiloff", ...words, "--format", "json");
  expect(status, told).toBe(0);
  return JSON.parse(out) as Boiloff & { origin: string };
};

describe("boiloff", () => {
  it("prints table, chart and the marks passed, within 100 columns", () => {
    const { status, out, told } = program.run("boiloff", "air");
    expect([status, told]).toEqual([0, ""]);
    for (const line of out.split("\n")) expect(line.length, line).toBeLessThanOrEqual(100);
    // 21 fractions, and the open vessel's last row just before the end.
    expect(out.match(/^ +\d+\.\d( +(\d+\.\d+|-)){8}$/gm)).toHaveLength(22);
    expect(out).toMatch(/^ +90\.0 +86\.0\d +16\.\d +2\.\d +81\.\d /m);
    expect(out).toMatch(/23\.5 % oxygen when 15\.2 % has evaporated \(open\), 15\.6 % \(closed\)/);
    expect(out).toMatch(/90 % oxygen when 93\.\d % has evaporated \(open\); never in a closed vessel/);
  });

  it("gives the rows and units asked for as CSV and JSON", () => {
    const { out } = program.run("boiloff", "air", "--points", "4", "--format", "csv");
    const [heading, ...rows] = out.trim().split("\n");
    expect(heading).toBe("vessel,evaporated (mol/mol),temperature (K),nitrogen (mol/mol),argon (mol/mol),oxygen (mol/mol)");
    expect(rows.map((row) => row.split(",").slice(0, 2).join(" "))).toEqual([
      "open 0",
      "open 0.25",
      "open 0.5",
      "open 0.75",
      "open 0.999",
      "closed 0",
      "closed 0.25",
      "closed 0.5",
      "closed 0.75",
      "closed 1",
    ]);
    const answer = json("air", "--points", "4");
    expect(answer.pressure).toBe(101325);
    expect(Number(rows[2].split(",")[5])).toBeCloseTo(answer.open[2].liquid.oxygen, 10);
  });

  it("evaporates at the pressure given, gauge over the standard atmosphere for air", () => {
    const [low, high] = [json("air", "--points", "2"), json("air", "--points", "2", "--pressure", "2 barg")];
    expect(high.pressure).toBeCloseTo(301325, 6);
    expect(high.open[0].temperature).toBeGreaterThan(low.open[0].temperature + 8);
  });

  it("starts from what a machine condenses, at its wettest station", () => {
    const answer = json(...LIQUEFYING);
    const { stations } = JSON.parse(program.run("run", ...LIQUEFYING, "--json").out) as { stations: { after: string; vapourFraction: number; liquidOxygen: number }[] };
    const wettest = stations.reduce((wet, each) => (each.vapourFraction < wet.vapourFraction ? each : wet));
    expect(answer.origin).toContain(`behind ${wettest.after},`);
    expect(answer.start.oxygen).toBeCloseTo(wettest.liquidOxygen, 9);
    expect(answer.start.oxygen).toBeGreaterThan(0.25);
    expect(answer.open[0].liquid.oxygen).toBeCloseTo(answer.start.oxygen, 9);
  });

  it("says that nothing condenses in a dry machine", () => {
    const { status, out, told } = program.run("boiloff", "cycles/workshop-air.yaml");
    expect([status, out]).toEqual([1, ""]);
    expect(told).toMatch(/nothing condenses/);
  });

  it.each([
    ["a fluid of one component", ["nitrogen"]],
    ["a machine on such a fluid", ["cycles/claude.yaml"]],
    ["no such file", ["cycles/none.yaml"]],
    ["no pressure", ["air", "--pressure", "77 K"]],
    ["a pressure at which air freezes", ["air", "--pressure", "4 kPa"]],
    ["a pressure near vacuum", ["air", "--pressure", "10 Pa"]],
    ["a setting without a file to set it in", ["air", "--set", "T1.efficiency=60%"]],
    ["no number of points", ["air", "--points", "2.5"]],
  ])("refuses %s", (_case, words) => {
    const { status, out, told } = program.run("boiloff", ...words);
    expect([status, out]).toEqual([2, ""]);
    expect(told).toMatch(/expected|holds from/);
  });

  it("finds no equilibrium above the critical pressure", () => {
    const { status, out, told } = program.run("boiloff", "air", "--pressure", "60 bar");
    expect([status, out]).toEqual([1, ""]);
    expect(told).toMatch(/no phase equilibrium/);
  });
});
