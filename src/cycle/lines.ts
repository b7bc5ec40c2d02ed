import type { BlockDefinition } from "../blocks/definition.js";
import { blockKind } from "../blocks/registry.js";
import type { CycleDefinition } from "./definition.js";

/** A line of blocks that the gas passes one after another: the loop, or a branch. */
export interface Line {
  /** undefined for the loop */
  readonly branch: string | undefined;
  readonly entries: readonly BlockDefinition[];
}

/** The loop and its branches, each after the line from which it leaves. */
export function linesOf({ loop, branches }: CycleDefinition): Line[] {
  const lines: Line[] = [{ branch: undefined, entries: loop }];
  for (let i = 0; i < lines.length; i++) {
    for (const entry of lines[i].entries) {
      const name = branchGiven(entry);
      const entries = name === undefined ? undefined : branches[name];
      if (entries !== undefined && !lines.some(({ branch }) => branch === name)) lines.push({ branch: name, entries });
    }
  }
  return lines;
}

/** The branch that begins at an entry; undefined where none does, or where what leaves is product. */
export function branchGiven(entry: BlockDefinition): string | undefined {
  const joint = blockKind(entry.kind)?.joint;
  if (joint?.direction !== "gives") return undefined;
  const name = entry.values[joint.key];
  return name === PRODUCT ? undefined : String(name);
}

/** The branch that ends at an entry. */
export function branchTaken(entry: BlockDefinition): string | undefined {
  const joint = blockKind(entry.kind)?.joint;
  return joint?.direction === "takes" ? String(entry.values[joint.key]) : undefined;
}

/** Whether what leaves the line at an entry leaves the machine. */
export function givesProduct(entry: BlockDefinition): boolean {
  const joint = blockKind(entry.kind)?.joint;
  return joint?.direction === "gives" && entry.values[joint.key] === PRODUCT;
}

/** What a joint's key says instead of a branch's name where the gas leaves the machine. */
const PRODUCT = "product";
