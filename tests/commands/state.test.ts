import { writeFileSync } from "node:fs";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { stateInput } from "../../src/commands/state-input.js";
import { InputError } from "../../src/cyclefile/errors.js";
import { Program } from "../program.js";

describe("two values that fix a state", () => {
  it.each([
    [["100 K", "5 bar"], { temperature: 100, pressure: 5e5 }],
    [["5 bar", "100 K"], { temperature: 100, pressure: 5e5 }],
    [["-173.15 degC", "0 barg"], { temperature: 100, pressure: 101325 }],
    [["h=200 kJ/kg", "p = 5 bar"], { enthalpy: 2e5, pressure: 5e5 }],
    [["3 kJ/(kg K)", "5 bar"], { entropy: 3000, pressure: 5e5 }],
    [["x=0.5", "1 bar"], { quality: 0.5, pressure: 1e5 }],
    [["50 %", "1 bar"], { quality: 0.5, pressure: 1e5 }],
    [["vapour fraction=50%", "1 bar"], { quality: 0.5, pressure: 1e5 }],
    [["rho=4 kg/m3", "T=300 K"], { density: 4, temperature: 300 }],
  ])("%s", (texts, input) => {
    const found = stateInput(texts) as unknown as Record<string, number>;
    expect(Object.keys(found).toSorted()).toEqual(Object.keys(input).toSorted());
    for (const [name, value] of Object.entries(input)) expect(found[name]).toBeCloseTo(value, 9);
  });

  it.each([
    [[undefined, undefined]],
    [["100 K", undefined]],
    [["100 K", "101 K"]],
    [["100 K", "200 kJ/kg"]],
    [["100", "5 bar"]],
    [["0.5", "5 bar"]],
    [["h=5 bar", "5 bar"]],
    [["x=5 bar", "5 bar"]],
    [["q=3", "5 bar"]],
    [["100 Kk", "5 bar"]],
    [["6 g/s", "5 bar"]],
    [["cold", "5 bar"]],
    [["", "5 bar"]],
  ])("%s is refused in one line", (texts) => {
    expect(() => stateInput(texts)).toThrow(InputError);
    expect(() => stateInput(texts)).toThrow(/^[^\n]+; (expected|did you mean) [^\n]+$/);
  });
});

/** A column of a table without quoted cells, by its heading. */
function column(text: string, name: string): number[] {
  const [heading, ...rows] = text.trim().split("\n").map((line) => line.split(","));
  return rows.map((cells) => Number(cells[heading.indexOf(name)]));
}

describe("state", () => {
  let program: Program;
  beforeAll(() => {
    program = new Program();
  });
  afterAll(() => program.remove());

  const table = (text: string): string => {
    writeFileSync(program.path("states.csv"), text);
    return "states.csv";
  };

  it("prints one state", () => {
    // Air's bubble point at 101.325 kPa: 78.903 K (Lemmon et al. 2000, J. Phys. Chem. Ref. Data 29, 331).
    const { status, out } = program.run("state", "air", "1 atm", "x=0", "--format", "json");
    expect(status).toBe(0);
    expect(JSON.parse(out)).toMatchObject({ temperature: expect.closeTo(78.903, 2), enthalpy: expect.closeTo(0, 3) });
    expect(program.run("state", "air", "1 atm", "x=0").out).toContain("78.90");
  });

  it("refuses a state outside the equation, an unknown fluid, and a table beside a value", () => {
    const wrong = [["air", "10 K", "5 bar"], ["ari", "100 K", "5 bar"], ["air", "100 K", "--from", "x.csv"], ["air", "--from", "missing.csv"], ["air", "--from", "."]];
    for (const words of wrong) {
      const { status, out, told } = program.run("state", ...words);
      expect({ status, out }, words.join(" ")).toEqual({ status: 2, out: "" });
      expect(told).toMatch(/^[^\n]+\n$/);
    }
  });

  it.each([
    ["temperature_K,pressure_bar\n100,5\n", 216205],
    ["p (kPa),note,T (degC)\n500,\"a, b\",-173.15\n", 216205],
    ["pressure_MPa,enthalpy_kJ/kg\n0.5,216.205\n", 216205],
    ["\uFEFFPressure_Pa,Vapour fraction\r\n101325,0\r\n", 0],
  ])("reads the table %j", (text, enthalpy) => {
    const { status, out, told } = program.run("state", "air", "--from", table(text), "--format", "json");
    expect({ status, told }).toEqual({ status: 0, told: "" });
    const [row] = JSON.parse(out) as { line: number; state: { enthalpy: number }; status: string }[];
    expect(row).toMatchObject({ line: 2, status: "ok" });
    expect(Math.abs(row.state.enthalpy - enthalpy)).toBeLessThan(1);
  });

  it("reads what points writes, and finds the same states", () => {
    const points = program.run("points", "cycles/bench-cooler.yaml", "--format", "csv").out;
    const { status, out } = program.run("state", "air", "--from", table(points), "--format", "csv");
    expect(status).toBe(0);
    for (const name of ["T (K)", "p (bar)", "density (kg/m3)"]) {
      const [given, found] = [column(points, name), column(out, name)];
      expect(found).toHaveLength(given.length);
      found.forEach((value, i) => expect(value / given[i], name).toBeCloseTo(1, 8));
    }
  });

  it("computes the rows that it can and names those that it cannot, by their line", () => {
    const file = table("temperature_K,pressure_bar\n100,5\n10,5\n\nabc,3\n200\n300,1\n");
    const { status, out, told } = program.run("state", "air", "--from", file, "--format", "csv");
    expect(status).toBe(2);
    const rows = out.trim().split("\n").slice(1);
    expect(rows.map((row) => [row.split(",")[0], row.endsWith(",ok")])).toEqual([["2", true], ["3", false], ["5", false], ["6", false], ["7", true]]);
    expect(told.trim().split("\n").map((line) => line.split(": ")[0])).toEqual(["states.csv:3", "states.csv:5", "states.csv:6"]);
  });

  it.each(["", "colour,size\n1,2\n", "temperature,pressure\n100,5\n", "temperature_K,pressure_bra\n100,5\n", "temperature_bar,pressure_bar\n1,1\n", "temperature_K\n100\n", "T_K,p_bar\n\"100,5\n", "\u0000\u0001\u001B[2J\n"])(
    "refuses the table %j in one line a fault, without control characters",
    (text) => {
      const { status, out, told } = program.run("state", "air", "--from", table(text));
      expect({ status, out }).toEqual({ status: 2, out: "" });
      expect(told).toMatch(/^(states\.csv[^\p{Cc}]+\n){1,2}$/u);
    },
  );
});
