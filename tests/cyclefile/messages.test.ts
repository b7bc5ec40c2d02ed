import { readdirSync, readFileSync, statSync } from "node:fs";
import { join } from "node:path";
import { fileURLToPath } from "node:url";
import { describe, expect, it } from "vitest";
import { describe as lineOf } from "../../src/cyclefile/errors.js";
import { bench, changed, problemsOf } from "./cases.js";

const root = fileURLToPath(new URL("../../", import.meta.url));
const documented = [...readFileSync(join(root, "docs/messages.md"), "utf8").matchAll(/^\| `([a-z-]+)` \|/gm)].map(([, code]) => code);

/** Codes of cautions are documented by what triggers them, in docs/safety.md. */
const ELSEWHERE = "cautions";
/** A code where a problem or a warning is made: as a property, or as an argument of what makes it. */
const CODE = /(?:\bcode: |\b(?:complain|refuse|refusal|problem|warning)\((?:[^\n]*?, )?)"([a-z]+(?:-[a-z]+)*)"/g;

function sourceFiles(folder: string): string[] {
  return readdirSync(folder).flatMap((name) => {
    const path = join(folder, name);
    if (name === ELSEWHERE) return [];
    return statSync(path).isDirectory() ? sourceFiles(path) : path.endsWith(".ts") ? [path] : [];
  });
}

function codesOfSource(): Set<string> {
  const codes = new Set<string>();
  for (const path of sourceFiles(join(root, "src"))) {
    const text = readFileSync(path, "utf8");
    for (const [, code] of text.matchAll(CODE)) codes.add(code);
    const [, union = ""] = /\b\w+Code = ((?:"[a-z-]+"(?: \| )?)+);/.exec(text) ?? [];
    for (const [, code] of union.matchAll(/"([a-z-]+)"/g)) codes.add(code);
  }
  return codes;
}

describe("docs/messages.md", () => {
  it("has a row for every code that the program uses, and no other", () => {
    expect([...new Set(documented)].toSorted()).toEqual([...codesOfSource()].toSorted());
  });

  it("says of every code what it means and what to do", () => {
    const rows = readFileSync(join(root, "docs/messages.md"), "utf8").split("\n").filter((line) => line.startsWith("| `"));
    expect(rows).toHaveLength(documented.length);
    for (const row of rows) expect(row).toMatch(/^\| `[a-z-]+` \| [^|]{5,} \| [^|]{5,} \|$/);
  });

  it("finds the codes it is to find", () => {
    for (const code of ["no-file", "wrong-shape", "side-twice", "pressure-rises", "wet-inlet", "state", "no-convergence"]) expect(codesOfSource()).toContain(code);
    expect(codesOfSource().size).toBeGreaterThan(60);
  });

  it("shows messages as the program writes them", () => {
    const text = readFileSync(join(root, "docs/messages.md"), "utf8");
    const [, shown = ""] = /```\n([^]*?)```/.exec(text) ?? [];
    const problems = problemsOf(changed(bench, ["efficiency: 0.62", "efficency: 0.62"], ["pressure-drop: 0.1 bar", "pressure-drop: 0.1 K"]));
    expect(shown.trim().split("\n")).toEqual(problems.map((problem) => lineOf(problem).replace("test.yaml", "bench.yaml")));
  });
});
