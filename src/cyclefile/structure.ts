import { blockKinds } from "../blocks/registry.js";
import type { Document } from "./document.js";
import type { LocatedProblem } from "./errors.js";
import { entriesOf, type RawEntry, type RawFile } from "./raw.js";

/** Faults of the loop's make-up that show before any value is read: names, sides, and a compressor that there must be. */
export function structureProblems(document: Document, raw: RawFile): LocatedProblem[] {
  const problems: LocatedProblem[] = [];
  const complain = (node: unknown, code: string, found: string, expected: string): void => {
    problems.push(document.problem(node, { code, found, expected }));
  };
  const all = entriesOf(raw);
  for (const [name, entries] of byName(all)) {
    const [first] = entries;
    const { kind } = first;
    const same = entries.filter((entry) => entry.kind === kind);
    for (const other of entries.filter((entry) => entry.kind !== kind)) {
      complain(other.node, "name-taken", `the name ${name} for a ${other.kind.kind}`, `another name: ${name} is a ${kind.kind} already`);
    }
    if (kind.sides === undefined) {
      for (const again of same.slice(1)) complain(again.node, "name-taken", `a second ${kind.kind} ${name}`, "a name of its own for each block");
      continue;
    }
    const sides: readonly string[] = kind.sides;
    if (same.some(({ side }) => side === undefined || !sides.includes(side))) continue;
    const standing = new Set<string | undefined>();
    same.forEach((entry, i) => {
      if (i >= sides.length) {
        complain(entry.node, "used-too-often", `${kind.kind} ${name} for the ${ordinal(i + 1)} time`, `it in the loop ${sides.length === 2 ? "twice" : `${sides.length} times`}, once a side; another pair of streams is another ${kind.kind}`);
      } else if (standing.has(entry.side)) {
        complain(entry.node, "side-twice", `the ${entry.side} side of ${kind.kind} ${name} for the second time`, `each of ${sides.join(" and ")} once`);
      }
      standing.add(entry.side);
    });
    // In a loop with an entry that could not be made out, that entry may be the other side.
    if (!raw.whole || same.length >= sides.length) continue;
    for (const side of sides.filter((each) => !standing.has(each))) {
      complain(first.node, "side-missing", `${kind.kind} ${name} without its ${side} side`, `it in the loop twice, once a side: ${sides.join(" and ")}`);
    }
  }
  if (raw.whole && !all.some(({ kind }) => kind.pressureChange === "rises")) {
    const kinds = blockKinds.filter(({ pressureChange }) => pressureChange === "rises").map(({ kind }) => kind);
    complain(raw.placeOf("loop"), "no-compressor", `a loop without a ${kinds[0]}`, `a block that raises the pressure: ${kinds.join(", ")}`);
  }
  return problems;
}

function byName(entries: readonly RawEntry[]): Map<string, [RawEntry, ...RawEntry[]]> {
  const groups = new Map<string, [RawEntry, ...RawEntry[]]>();
  for (const entry of entries) {
    if (entry.name === "") continue;
    const group = groups.get(entry.name);
    if (group === undefined) groups.set(entry.name, [entry]);
    else group.push(entry);
  }
  return groups;
}

function ordinal(count: number): string {
  return ["first", "second", "third", "fourth", "fifth"][count - 1] ?? `${count}th`;
}
