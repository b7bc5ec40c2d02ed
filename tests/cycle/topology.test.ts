import { describe, expect, it } from "vitest";
import { InputError } from "../../src/cyclefile/errors.js";
import { readCycle } from "../../src/cyclefile/read.js";

/** A sound machine with a branch, into which each test puts one fault. */
const SOUND = `title: topology
fluid: air
circuit: closed
flow: 10 g/s
loop:
  - compressor:  { name: C1, outlet-pressure: 40 bar, efficiency: 0.7 }
  - aftercooler: { name: A1, approach: 8 K }
  - recuperator: { name: HX1, side: warm, effectiveness: 0.95 }
  - splitter:    { name: S1, branch: turbine, fraction: 60 % }
  - recuperator: { name: HX2, side: warm, effectiveness: 0.9 }
  - valve:       { name: V1, outlet-pressure: 1.2 bar }
  - separator:   { name: F1, liquid: product }
  - mixer:       { name: M1, branch: turbine }
  - recuperator: { name: HX2, side: cold }
  - recuperator: { name: HX1, side: cold }
branches:
  turbine:
    - expander: { name: T1, outlet-pressure: 1.2 bar, efficiency: 0.7 }
`;

function problemsOf(text: string): { code: string; line: number }[] {
  try {
    readCycle(text, { file: "machine.yaml" });
    return [];
  } catch (error) {
    if (!(error instanceof InputError)) throw error;
    return error.problems.map(({ code, line }) => ({ code, line }));
  }
}

const without = (line: string): string => SOUND.split("\n").filter((each) => !each.includes(line)).join("\n");

describe("a machine with a wrong topology", () => {
  it("is told apart from a sound one", () => {
    expect(problemsOf(SOUND)).toEqual([]);
  });

  it.each([
    ["a branch that never returns and is no product", without("mixer:"), "branch-never-returns", 17],
    ["a branch into which nothing flows", without("splitter:").replace(/ {2}- mixer.*\n/, ""), "branch-never-leaves", 16],
    ["a mixer before its splitter", without("mixer:").replace("  - splitter:", "  - mixer:       { name: M1, branch: turbine }\n  - splitter:"), "mixer-before-splitter", 9],
    ["a mixer for a branch that is not written", SOUND.replace("name: M1, branch: turbine", "name: M1, branch: turbin"), "no-such-branch", 13],
    ["a branch that leaves twice", SOUND.replace("  - valve:", "  - splitter:    { name: S2, branch: turbine, fraction: 10 % }\n  - valve:"), "branch-twice", 11],
    ["an exchanger with both sides at one place", SOUND.replace("{ name: HX2, side: cold }", "{ name: HX2, side: warm, effectiveness: 0.9 }"), "side-twice", 14],
    ["an exchanger used for a third stream", SOUND.replace("  - valve:", "  - recuperator: { name: HX1, side: cold }\n  - valve:"), "used-too-often", 16],
    ["a loop without a compressor", without("compressor:"), "no-compressor", 5],
    ["pressures that do not meet", SOUND.replace("name: T1, outlet-pressure: 1.2 bar", "name: T1, outlet-pressure: 2 bar"), "mixing-pressures", 13],
    ["a closed loop whose pressure level is free", SOUND.replace("outlet-pressure: 40 bar", "pressure-ratio: 20").replace(/ {2}- valve.*\n/, ""), "no-pressure-fixed", 5],
    ["a compressor that neither is told its pressure nor is driven", SOUND.replace("outlet-pressure: 40 bar, ", ""), "missing-key", 6],
    ["an expander that drives what is no compressor", SOUND.replace("efficiency: 0.7 }\n`", "").replace("{ name: T1, outlet-pressure: 1.2 bar, efficiency: 0.7 }", "{ name: T1, outlet-pressure: 1.2 bar, efficiency: 0.7, drives: A1 }"), "no-such-block", 18],
  ])("%s", (_what, text, code, line) => {
    const problems = problemsOf(text);
    expect(problems.map((problem) => problem.code)).toContain(code);
    expect(problems.find((problem) => problem.code === code)?.line).toBe(line);
  });
});
