import { given, type BlockDefinition } from "../blocks/definition.js";
import type { Problem } from "../blocks/problem.js";
import { blockKind } from "../blocks/registry.js";
import type { CycleDefinition } from "./definition.js";
import { branchGiven, branchTaken, linesOf } from "./lines.js";

/** What is wrong with how branches leave and come back, and with what drives what. */
export function topologyProblems(definition: CycleDefinition): Problem[] {
  return [...branchProblems(definition), ...driveProblems(definition)];
}

function allEntries({ loop, branches }: CycleDefinition): BlockDefinition[] {
  return [...loop, ...Object.values(branches).flat()];
}

function branchProblems(definition: CycleDefinition): Problem[] {
  const { branches } = definition;
  const problems: Problem[] = [];
  const names = Object.keys(branches);
  const seen = new Map<string, BlockDefinition>();
  const ended = new Map<string, BlockDefinition>();
  for (const entry of allEntries(definition)) {
    const gives = branchGiven(entry);
    const takes = branchTaken(entry);
    const name = gives ?? takes;
    if (name === undefined) continue;
    const key = blockKind(entry.kind)?.joint?.key as string;
    if (!names.includes(name)) {
      problems.push({ code: "no-such-branch", entry, key, found: `the branch "${name}", which is not written`, expected: names.length > 0 ? `one of ${names.join(", ")}` : "a list of blocks under branches" });
      continue;
    }
    const met = gives === undefined ? ended : seen;
    if (met.has(name)) {
      problems.push({ code: "branch-twice", entry, key, found: `branch ${name} ${gives === undefined ? "coming back" : "leaving"} for the second time`, expected: "each branch to leave once and come back once" });
    }
    met.set(name, entry);
  }
  for (const { entries } of linesOf(definition)) {
    for (const [index, entry] of entries.entries()) {
      const name = branchTaken(entry);
      if (name === undefined || !entries.slice(index + 1).some((later) => branchGiven(later) === name)) continue;
      problems.push({ code: "mixer-before-splitter", entry, found: `branch ${name} coming back here, before it leaves further down`, expected: "the mixer behind the block that gives the branch (a closed loop may be written from any block on)" });
    }
  }
  const reached = new Set(linesOf(definition).flatMap(({ branch }) => branch ?? []));
  for (const name of names) {
    const [first] = branches[name];
    const last = branches[name].at(-1) as BlockDefinition;
    if (!reached.has(name)) {
      problems.push({ code: "branch-never-leaves", entry: first, found: `branch ${name}, into which nothing flows`, expected: "a splitter or separator that names it" });
      continue;
    }
    const leaves = blockKind(last.kind)?.leaves === true;
    if (!ended.has(name) && !leaves) {
      problems.push({ code: "branch-never-returns", entry: last, found: `branch ${name}, which ends here`, expected: "a mixer that takes it back, or a product block at its end" });
    }
    if (ended.has(name) && leaves) {
      problems.push({ code: "branch-twice", entry: last, found: `branch ${name}, which leaves as product and is taken back too`, expected: "one of the two" });
    }
  }
  for (const entry of allEntries(definition)) {
    const leavesMidway = blockKind(entry.kind)?.leaves === true && !Object.values(branches).some((entries) => entries.at(-1) === entry);
    if (leavesMidway) problems.push({ code: "product-midway", entry, found: "a product block that is not the last of a branch", expected: "it at the end of a branch" });
  }
  return problems;
}

function driveProblems(definition: CycleDefinition): Problem[] {
  const entries = allEntries(definition);
  const problems: Problem[] = [];
  const driven = new Set<string>();
  for (const entry of entries) {
    const kind = blockKind(entry.kind);
    const target = kind?.drivesKey === undefined ? undefined : entry.values[kind.drivesKey];
    if (target === undefined) continue;
    const found = entries.find(({ name }) => name === target);
    const wanted = kind?.keys.find(({ name }) => name === kind.drivesKey);
    if (found === undefined || (wanted?.type === "block" && found.kind !== wanted.kind)) {
      problems.push({ code: "no-such-block", entry, key: kind?.drivesKey as string, found: `"${String(target)}", which is no compressor`, expected: "the name of a compressor" });
      continue;
    }
    driven.add(String(target));
  }
  for (const entry of entries) {
    const kind = blockKind(entry.kind);
    if (kind?.mayFloat !== true || driven.has(entry.name)) continue;
    if (given(entry, "outlet-pressure") === undefined && given(entry, "pressure-ratio") === undefined) {
      problems.push({ code: "missing-key", entry, found: `neither outlet-pressure nor pressure-ratio`, expected: "one of them, or an expander that drives it" });
    }
  }
  return problems;
}
