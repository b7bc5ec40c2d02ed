import type { Document } from "./document.js";
import type { LocatedProblem } from "./errors.js";
import type { RawEntry, RawFile } from "./raw.js";

/** Faults of the loop's make-up that show before any value is read: names, sides, and a compressor that there must be. */
export function structureProblems(document: Document, raw: RawFile): LocatedProblem[] {
  const problems: LocatedProblem[] = [];
  const all = [...raw.loop, ...[...raw.branches.values()].flat()];
  const byName = new Map<string, RawEntry[]>();
  for (const entry of all) {
    if (entry.name === "") continue;
    byName.set(entry.name, [...(byName.get(entry.name) ?? []), entry]);
  }
  for (const [name, entries] of byName) {
    const [first] = entries;
    const { kind } = first;
    const other = entries.find((entry) => entry.kind !== kind);
    if (other !== undefined) {
      problems.push(
        document.problem(other.node, { code: "name-taken", found: `the name ${name} for a ${other.kind.kind}`, expected: `another name: ${name} is a ${kind.kind} already` }),
      );
      continue;
    }
    if (kind.sides === undefined) {
      for (const again of entries.slice(1)) {
        problems.push(document.problem(again.node, { code: "name-taken", found: `a second ${kind.kind} ${name}`, expected: "a name of its own for each block" }));
      }
      continue;
    }
    const allowed = kind.sides.length;
    for (const again of entries.slice(allowed)) {
      problems.push(
        document.problem(again.node, {
          code: "used-too-often",
          found: `${kind.kind} ${name} for the ${ordinal(entries.indexOf(again) + 1)} time`,
          expected: `it in the loop ${allowed === 2 ? "twice" : `${allowed} times`}, once a side; more streams are two exchangers of their own`,
        }),
      );
    }
    const within = entries.slice(0, allowed);
    for (const side of kind.sides) {
      const standing = within.filter((entry) => entry.side === side);
      if (standing.length > 1) {
        problems.push(document.problem(standing[1].node, { code: "side-twice", found: `the ${side} side of ${kind.kind} ${name} for the second time`, expected: `each of ${kind.sides.join(" and ")} once` }));
      } else if (standing.length === 0 && within.every((entry) => entry.side !== undefined && kind.sides?.includes(entry.side)) && within.length < allowed) {
        problems.push(document.problem(first.node, { code: "side-missing", found: `${kind.kind} ${name} without its ${side} side`, expected: `it in the loop once a side: ${kind.sides.join(" and ")}` }));
      }
    }
  }
  if (!all.some(({ kind }) => kind.pressureChange === "rises")) {
    problems.push(document.problem(raw.loopNode, { code: "no-compressor", found: "a loop without a compressor", expected: "a block that raises the pressure" }));
  }
  return problems;
}

function ordinal(count: number): string {
  return ["first", "second", "third", "fourth", "fifth"][count - 1] ?? `${count}th`;
}
