import { describe, expect, it } from "vitest";
import { readCycle } from "../../src/cyclefile/read.js";
import { bench, changed, codesOf, problemsOf } from "./cases.js";

type Changes = readonly (readonly [from: string, to: string])[];

/** One fault each: what is changed in the bench cooler, and the one problem that it gives. */
const FAULTS: readonly (readonly [what: string, changes: Changes, code: string])[] = [
  ["an unknown top-level key", [["title:", "titel:"]], "unknown-key 2:1"],
  ["a missing flow", [["flow: 6 g/s\n", ""]], "missing-key 2:1"],
  ["a misspelt flow, not told as missing too", [["flow:", "flwo:"]], "unknown-key 6:1"],
  ["an unknown fluid", [["fluid: air", "fluid: aer"]], "unknown-fluid 3:8"],
  ["a fluid left empty", [["fluid: air", "fluid:"]], "wrong-shape 3:7"],
  ["an unknown key of the surroundings", [["relative-humidity", "humidity"]], "unknown-key 4:56"],
  ["surroundings that are no map", [["{ temperature: 22 degC, pressure: 1 atm, relative-humidity: 50 % }", "22 degC"]], "wrong-shape 4:15"],
  ["a humidity beyond 100 %", [["50 %", "150 %"]], "range 4:75"],
  ["an unknown circuit", [["circuit: closed", "circuit: half-open"]], "circuit 5:10"],
  ["a flow without a unit", [["6 g/s", "6"]], "dimension 6:7"],
  ["a flow of nothing", [["6 g/s", "0 g/s"]], "range 6:7"],
  ["a flow in watts", [["6 g/s", "6 W"]], "dimension 6:7"],
  ["a flow that is a list", [["6 g/s", "[6, 7]"]], "wrong-shape 6:7"],
  ["let as a list", [["{ p_high: 8 bar }", "[ 8 bar ]"], ["outlet-pressure: p_high", "outlet-pressure: 8 bar"]], "wrong-shape 7:6"],
  ["a let name that is a unit", [["p_high: 8 bar", "p_high: 8 bar, W: 3 bar"]], "let-name 7:23"],
  ["a let name that is no name", [["p_high: 8 bar", "p_high: 8 bar, p-low: 3 bar"]], "let-name 7:23"],
  ["a let name of itself", [["p_high: 8 bar", "p_high: 8 bar, a: b, b: a + 1"]], "circle 7:26"],
  ["a fault in a let name, told once and not where it is used", [["8 bar }", "8 foo }"]], "unknown-unit 7:18"],
  ["a name from nowhere", [["outlet-pressure: p_high", "outlet-pressure: p_hihg"]], "unknown-name 10:47"],
  ["a name from nowhere within an expression", [["outlet-pressure: p_high", "outlet-pressure: 2 * p_hihg"]], "unknown-name 10:51"],
  ["a unit from nowhere", [["outlet-pressure: 1.2 bar", "outlet-pressure: 1.2 baz"]], "unknown-unit 13:51"],
  ["gauge surroundings", [["pressure: 1 atm", "pressure: 1 barg"]], "circle 4:49"],
  ["an expression that is none", [["1.2 bar,", "1.2 bar *,"]], "expression-syntax 13:47"],
  ["units that do not go together", [["1.2 bar,", "1.2 bar + 3 K,"]], "expression-units 13:47"],
  ["an assignment", [["1.2 bar,", "\"x = 3\","]], "expression-refused 13:47"],
  ["a decimal comma", [["flow: 6 g/s", "flow: 6,2 g/s"]], "expression-syntax 6:7"],
  ["an unknown block", [["- expander:   ", "- expandr:    "]], "unknown-block 13:5"],
  ["two kinds in one entry", [["  - load:        { name: L1, heat: 20 W }", "  - load: { name: L1, heat: 20 W }\n    line: { name: P1 }"]], "several-kinds 14:5"],
  ["a block whose keys are not indented", [["  - load:        { name: L1, heat: 20 W }", "  - load:\n    name: L1\n    heat: 20 W"]], "several-kinds 14:5"],
  ["a block without keys", [["{ name: L1, heat: 20 W }", ""]], "wrong-shape 14:5"],
  ["a word in a block's place", [["- load:        { name: L1, heat: 20 W }", "- load"]], "wrong-shape 14:5"],
  ["a block without a name", [["{ name: L1, heat: 20 W }", "{ heat: 20 W }"]], "name 14:5"],
  ["a misspelt name key, told once", [["{ name: L1,", "{ nam: L1,"]], "unknown-key 14:20"],
  ["a name with a dot", [["name: L1", "name: L.1"]], "name 14:26"],
  ["a name that is a word of addresses", [["name: L1", "name: flow"]], "name 14:26"],
  ["an unknown key of a block, its need not told as missing too", [["{ name: L1, heat: 20 W }", "{ name: L1, heta: 20 W }"]], "unknown-key 14:30"],
  ["a required key left out", [[", efficiency: 0.5 }", " }"]], "missing-key 13:5"],
  ["every alternative left out", [[", heat: 20 W }", " }"]], "missing-key 14:5"],
  ["two alternatives at once", [["heat: 20 W }", "heat: 20 W, outlet-temperature: 90 K }"]], "alternatives 14:5"],
  ["a value left empty", [["heat: 20 W }", "heat: }"]], "no-value 14:30"],
  ["a value that is a map", [["heat: 20 W }", "heat: { a: 1 } }"]], "wrong-shape 14:36"],
  ["a side missing from the loop", [["  - recuperator: { name: HX1, side: cold, pressure-drop: 0.05 bar }", ""]], "side-missing 12:5"],
  ["a side left out", [["side: cold, ", ""]], "side 15:5"],
  ["an unknown side", [["side: cold", "side: colt"]], "side 15:37"],
  ["a side where there are none", [["{ name: L1,", "{ name: L1, side: warm,"]], "side 14:36"],
  ["the same side twice", [["side: cold", "side: warm, effectiveness: 0.9"]], "side-twice 15:5"],
  ["an exchanger used three times", [["  - load:", "  - recuperator: { name: HX1, side: cold }\n  - load:"]], "used-too-often 16:5"],
  ["a key on the wrong side", [["side: cold,", "side: cold, effectiveness: 0.9,"]], "wrong-side 15:43"],
  ["a second block of a name", [["name: A1", "name: C1"]], "name-taken 11:5"],
  ["a second block of a name and kind", [["  - load:", "  - load: { name: L1, heat: 3 W }\n  - load:"]], "name-taken 15:5"],
  ["a wrong dimension", [["pressure-drop: 0.1 bar", "pressure-drop: 0.1 K"]], "dimension 11:74"],
  ["a number where a dimension is wanted", [["heat: 20 W", "heat: 20"]], "dimension 14:36"],
  ["a percentage of stages", [["drive-efficiency: 0.88", "stages: 200 %"]], "dimension 10:81"],
  ["half a stage", [["drive-efficiency: 0.88", "stages: 1.5"]], "not-whole 10:81"],
  ["an efficiency over 100 %", [["efficiency: 0.5 }", "efficiency: 130 % }"]], "range 13:68"],
  ["an efficiency of nothing", [["efficiency: 0.5 }", "efficiency: 0 }"]], "range 13:68"],
  ["a difference in degC", [["effectiveness: 0.95", "approach: 3 degC"]], "dimension 12:53"],
  ["a difference from a name in degC", [["8 bar }", "8 bar, T_a: 3 degC }"], ["effectiveness: 0.95", "approach: T_a"]], "dimension 12:53"],
  ["a difference from a sum in degC", [["effectiveness: 0.95", "approach: 3 degC + 2 K"]], "dimension 12:53"],
  ["a temperature that is the difference of two", [["30 degC", "30 degC - 5 degC"]], "dimension 11:50"],
  ["a sum of two temperatures in degC", [["30 degC", "25 degC + 5 degC"]], "expression-units 11:50"],
  ["a gauge pressure drop", [["pressure-drop: 0.1 bar", "pressure-drop: 0.1 barg"]], "dimension 11:74"],
  ["an endless number", [["heat: 20 W", "heat: 1e999 W"]], "expression-units 14:36"],
  ["a loop without a compressor", [["  - compressor:  { name: C1, outlet-pressure: p_high, efficiency: 0.62, drive-efficiency: 0.88 }\n", ""]], "no-compressor 9:1"],
  ["a pressure that rises through an expander", [["outlet-pressure: 1.2 bar", "outlet-pressure: 7.9 bar"]], "pressure-does-not-fall 13:47"],
  ["a cooler colder than the surroundings", [["30 degC", "10 degC"]], "aftercooler-below-surroundings 11:50"],
  ["an unknown block named", [["efficiency: 0.5 }", "efficiency: 0.5, drives: C2 }"]], "no-such-block 13:81"],
  ["a branch that is nowhere", [["  - load:", "  - splitter: { name: S1, branch: side, fraction: 0.2 }\n  - load:"]], "no-such-branch 14:35"],
  ["a branch left unnamed", [["  - load:", "  - splitter: { name: S1, fraction: 0.2 }\n  - load:"]], "missing-key 14:5"],
  ["a key that stands twice", [["flow: 6 g/s", "flow: 6 g/s\nflow: 7 g/s"]], "duplicate-key 7:1"],
  ["a block's key that stands twice", [["heat: 20 W }", "heat: 20 W, heat: 30 W }"]], "duplicate-key 14:42"],
  ["an empty loop", [["loop:\n", "loop: []\nrest:\n"], ["rest:\n", "branches:\n a:\n"]], "wrong-shape 9:7"],
  ["a loop that is a word", [["loop:\n", "loop: none\nbranches:\n a:\n"]], "wrong-shape 9:7"],
];

describe("one fault in a file", () => {
  it.each(FAULTS)("%s", (_what, changes, expected) => {
    const branched = changes.some(([, to]) => to.includes("branches:"));
    const found = codesOf(changed(bench, ...changes));
    // A file whose loop has gone elsewhere has branches that nothing flows into; only the loop is looked at here.
    if (branched) expect(found[0]).toBe(expected);
    else expect(found).toEqual([expected]);
  });

  it("is told in one line with its place, what was found, and what was expected or meant", () => {
    for (const [what, changes] of FAULTS) {
      for (const problem of problemsOf(changed(bench, ...changes))) {
        expect(problem.place, what).toBe(`test.yaml:${problem.line}:${problem.column}`);
        for (const text of [problem.found, problem.expected]) {
          expect(text, what).toMatch(/\S/);
          expect(text, what).not.toMatch(/[\n\r]|undefined|NaN|\[object/);
        }
      }
    }
  });

  it("is told in one line whatever stands in the text, and a title is one", () => {
    const escapes = changed(bench, ["title: Bench", "title: \"a\\nb\\e[31mc\"\n\"ti\\ntle\": Bench"], ["heat: 20 W", "\"he\\e[1mat\": 20 W"]);
    const problems = problemsOf(escapes);
    expect(problems.map(({ code }) => code)).toEqual(["unknown-key", "unknown-key"]);
    for (const { found } of problems) expect(found).toMatch(/^[\x20-\x7E]+$/);
    expect(readCycle(changed(bench, ["title: Bench cooler", "title: \"a\\nb\\e[31mc\" #"])).title).toBe("a b [31mc");
  });

  it.each([
    [[["fluid: air", "fluid: nitrogn"]], "nitrogen"],
    [[["circuit: closed", "circuit: close"]], "closed"],
    [[["title:", "titel:"]], "title"],
    [[["- expander:", "- turboexpander:"]], "expander"],
    [[["efficiency: 0.62", "efficency: 0.62"]], "efficiency"],
    [[["efficiency: 0.62", "eff: 0.62"]], "efficiency"],
    [[["side: cold", "side: Cold"]], "cold"],
    [[["20 W }", "20 w }"]], "W"],
    [[["30 degC", "30 \u00B0C"]], "degC"],
    [[["30 degC", "30 C"]], "degC"],
    [[["6 g/s", "6 m\u00B3/h"]], "m3/h"],
    [[["outlet-pressure: p_high", "outlet-pressure: P_high"]], "p_high"],
  ] as const)("%j has a suggestion: %s", (changes, suggestion) => {
    expect(problemsOf(changed(bench, ...changes)).map((problem) => problem.suggestion)).toContain(suggestion);
  });

  it("names the units accepted, and the range in the unit as written", () => {
    const [flow] = problemsOf(changed(bench, ["6 g/s", "6"]));
    for (const unit of ["kg/s", "g/s", "mol/s", "Nm3/h", "NL/min", "scfm", "L/min", "m3/h", "cfm"]) expect(flow.expected).toContain(unit);
    expect(problemsOf(changed(bench, ["efficiency: 0.5 }", "efficiency: 130 % }"]))[0].expected).toContain("100 %");
    expect(problemsOf(changed(bench, ["30 degC", "-300 degC"]))[0].expected).toContain("-273.15 degC");
    expect(problemsOf(changed(bench, ["1.2 bar", "-2 barg"]))[0].expected).toContain("-1.01325 barg");
  });
});

describe("several faults in a file", () => {
  it("are told all at once, in the order of their places", () => {
    const text = changed(bench, ["title:", "titel:"], ["fluid: air", "fluid: ari"], ["6 g/s", "6"], ["efficiency: 0.62", "efficency: 0.62"], ["0.1 bar", "0.1 K"], ["30 degC", "10 degC"], ["- load:", "- laod:"], ["efficiency: 0.5", "efficiency: 5"]);
    expect(codesOf(text)).toEqual([
      "unknown-key 2:1",
      "unknown-fluid 3:8",
      "dimension 6:7",
      "unknown-key 10:55",
      "dimension 11:74",
      "range 13:68",
      "unknown-block 14:5",
    ]);
  });

  it("of cross-checks come with those of values elsewhere", () => {
    expect(codesOf(changed(bench, ["6 g/s", "6"], ["30 degC", "10 degC"], ["1.2 bar", "7.9 bar"]))).toEqual(["dimension 6:7", "aftercooler-below-surroundings 11:50", "pressure-does-not-fall 13:47"]);
  });

  it("come with those of settings, which are told by the setting", () => {
    const problems = problemsOf(changed(bench, ["6 g/s", "6"]), { "T1.efficiency": "130 %", "T2.efficiency": "50 %", "L1.heat": "3 K" });
    expect(problems.map(({ code, place }) => [code, place])).toEqual([
      ["unknown-address", "--set T2.efficiency=50 %"],
      ["range", "--set T1.efficiency=130 %"],
      ["dimension", "--set L1.heat=3 K"],
      ["dimension", "test.yaml:6:7"],
    ]);
  });

  it("are told at the setting that made a check fail", () => {
    expect(problemsOf(bench, { "A1.outlet-temperature": "10 degC" }).map(({ place }) => place)).toEqual(["--set A1.outlet-temperature=10 degC"]);
    expect(problemsOf(bench, { "surroundings.temperature": "3000 K" }).map(({ code, place }) => `${code} ${place}`)).toContain("temperature-outside-equation --set surroundings.temperature=3000 K");
  });

  it("in number are cut short in the message, not in the list", () => {
    const many = Array.from({ length: 500 }, (_, i) => `key${i}: 1`).join("\n");
    const problems = problemsOf(`${bench}\n${many}\n`);
    expect(problems).toHaveLength(500);
  });
});

describe("a text that is no cycle", () => {
  it.each([
    ["", "empty 1:1"],
    ["\n\n  \n", "empty 1:1"],
    ["# only a comment\n", "empty 1:1"],
    ["---\n", "empty 1:1"],
    ["- a\n- b\n", "wrong-shape 1:1"],
    ["hello", "wrong-shape 1:1"],
    ["\u0000\u0001\u0002", "not-text 1:1"],
    ["a: 1\n\tb: 2", "yaml 2:1"],
    ["a: {b: 1", "yaml 1:9"],
    ["a: [1, 2", "yaml 1:9"],
    ["a: \"x", "yaml 1:6"],
    ["a: b: c", "yaml 1:4"],
    ["a: {b: 1 c: 2}", "yaml 1:8"],
    ["a: @x", "yaml 1:4"],
    ["a: 1\n---\nb: 2", "yaml 2:1"],
    ["a: &x [1]\nb: 2", "alias 1:7"],
  ])("%j", (text, expected) => {
    expect(codesOf(text)).toEqual([expected]);
  });

  it("may have every top-level key missing", () => {
    expect(codesOf("title: x\n")).toEqual(["missing-key 1:1", "missing-key 1:1", "missing-key 1:1"]);
  });

  it("does not follow aliases, however they multiply", () => {
    const levels = Array.from({ length: 60 }, (_, i) => `x${i}: &x${i} [${i === 0 ? "1, 1" : `*x${i - 1}, *x${i - 1}`}]`).join("\n");
    const found = codesOf(levels);
    expect(found.length).toBeLessThan(10);
    for (const code of found) expect(code).toMatch(/^alias /);
  });
});
