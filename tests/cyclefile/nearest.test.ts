import { describe, expect, it } from "vitest";
import { blockKinds } from "../../src/blocks/registry.js";
import { nearest } from "../../src/cyclefile/nearest.js";
import { unitMeant } from "../../src/cyclefile/quantity.js";
import { units } from "../../src/cyclefile/units.js";
import { bench, changed, problemsOf } from "./cases.js";

const UNITS = Object.keys(units);
const KINDS = blockKinds.map(({ kind }) => kind);

describe("the nearest known name", () => {
  it.each([
    ["bra", "bar"],
    ["abr", "bar"],
    ["bars", "bar"],
    ["mbra", "mbar"],
    ["brag", "barg"],
    ["dgeC", "degC"],
    ["kgh", "kg/h"],
    ["PSI", "psi"],
    ["w", "W"],
    ["pa", "Pa"],
  ])("to %s is %s", (name, expected) => expect(nearest(name, UNITS)).toBe(expected));

  it.each([
    ["laod", "load"],
    ["exapnder", "expander"],
    ["turboexpander", "expander"],
    ["vavle", "valve"],
    ["recup", "recuperator"],
    ["comp", "compressor"],
  ])("to %s is %s", (name, expected) => expect(nearest(name, KINDS)).toBe(expected));

  it("is never far off for a short one", () => {
    for (const name of ["", "x", "q", "xy", "kg", "hp", "mi", "in", "oz", "ft", "foo", "xyz", "inHg", "slpm", "BTU"]) expect(nearest(name, UNITS), name).toBeUndefined();
    for (const name of ["T2", "x"]) expect(nearest(name, ["C1", "T1", "HX1"]), name).toBeUndefined();
  });

  it("is every name's own, whatever the case, and a swapped pair's where no other name is as near", () => {
    for (const name of [...KINDS, ...UNITS]) {
      const known = UNITS.includes(name) ? UNITS : KINDS;
      expect(known).toContain(name);
      expect(nearest(name.toUpperCase(), known)?.toLowerCase()).toBe(name.toLowerCase());
    }
    for (const kind of KINDS) {
      for (let i = 1; i < kind.length; i++) expect(nearest(kind.slice(0, i - 1) + kind[i] + kind[i - 1] + kind.slice(i + 1), KINDS)).toBe(kind);
    }
  });

  it("is not looked for among endless ones", () => {
    const start = performance.now();
    expect(nearest("a".repeat(50_000), ["b".repeat(50_000), "bar"])).toBeUndefined();
    expect(performance.now() - start, "milliseconds").toBeLessThan(100);
  });

  it("is told with the fault", () => {
    expect(problemsOf(changed(bench, ["1.2 bar,", "5 bra,"]))).toMatchObject([{ code: "unknown-unit", suggestion: "bar" }]);
    expect(problemsOf(changed(bench, ["6 g/s", "250 lpm"]))).toMatchObject([{ code: "unknown-unit", suggestion: "L/min" }]);
    expect(unitMeant("\u00B0C")).toBe("degC");
  });
});
