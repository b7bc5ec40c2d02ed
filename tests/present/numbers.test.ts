import { array, assert, double, integer, nat, property, stringMatching } from "fast-check";
import { describe, expect, it } from "vitest";
import { bars, fixed, fullDigits, percent, significant, watts } from "../../src/present/numbers.js";
import { textTable } from "../../src/present/table.js";
import { wrap } from "../../src/present/wrap.js";

describe("numbers", () => {
  it.each([
    [significant(0, 3), "0"],
    [significant(0.0123456, 3), "0.0123"],
    [significant(123456, 3), "123456"],
    [significant(9.9996, 4), "10.00"],
    [significant(1.5e-7, 3), "1.50e-7"],
    [fixed(-0.001, 2), "0.00"],
    [fixed(-1.005, 1), "-1.0"],
    [percent(0.31056), "31.1 %"],
    [watts(9999), "9999 W"],
    [watts(12345), "12.35 kW"],
    [bars(101325), "1.013 bar"],
  ])("%s", (found, wanted) => expect(found).toBe(wanted));

  it.each([NaN, Infinity, -Infinity])("are refused where one is %s", (value) => {
    for (const write of [(each: number) => fixed(each, 2), (each: number) => significant(each, 4), fullDigits, percent, watts, bars]) {
      expect(() => write(value)).toThrow(String(value));
    }
  });

  it("keep their value to the digits shown", () => {
    assert(
      property(double({ min: 1e-12, max: 1e12, noNaN: true }), integer({ min: 2, max: 8 }), (value, digits) => {
        expect(Math.abs(Number(significant(value, digits)) / value - 1)).toBeLessThanOrEqual(0.5 * 10 ** (1 - digits) * (1 + 1e-9));
        expect(Math.abs(Number(fullDigits(value)) / value - 1)).toBeLessThan(1e-11);
      }),
      { seed: 20261201 },
    );
  });
});

describe("text", () => {
  it("wraps between words, loses none and stays within the width", () => {
    const words = array(stringMatching(/^[a-z]{1,20}$/), { minLength: 1, maxLength: 60 });
    assert(
      property(words, nat(12), (list, indent) => {
        const text = wrap(list.join(" "), " ".repeat(indent));
        for (const line of text.split("\n")) expect(line.length).toBeLessThanOrEqual(100);
        expect(text.trim().split(/\s+/)).toEqual(list);
      }),
      { seed: 20261201 },
    );
  });

  it("stands in columns under its headings", () => {
    const lines = textTable([{ heading: "a", align: "left" }, { heading: "T", unit: "K" }], [["x", "1.00"], ["long", "100.00"]]).split("\n");
    expect(lines).toEqual(["a          T", "           K", "------------", "x       1.00", "long  100.00"]);
  });
});
