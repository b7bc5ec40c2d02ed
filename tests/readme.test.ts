import { readFileSync } from "node:fs";
import { describe, expect, it } from "vitest";
import { solve } from "../src/index.js";
import { readCycle } from "../src/cyclefile/read.js";
import { report } from "../src/present/report.js";

const read = (path: string): string => readFileSync(new URL(`../${path}`, import.meta.url), "utf8");

describe("the README", () => {
  it("shows what a run of the bench cooler begins with", () => {
    const shown = /begins:\n\n```\n([\s\S]*?)\n```/.exec(read("README.md"))?.[1] ?? "";
    const definition = readCycle(read("cycles/bench-cooler.yaml"));
    const printed = report(definition, solve(definition), false);
    expect(shown.length).toBeGreaterThan(500);
    expect(printed.startsWith(shown)).toBe(true);
  });

  it("links to files that there are", () => {
    for (const [, path = ""] of read("README.md").matchAll(/\]\(((?!http)[^)]+)\)/g)) {
      if (path.includes(".")) expect(read(path).length, path).toBeGreaterThan(0);
    }
  });
});
