import { type Node, type YAMLMap } from "yaml";
import type { BlockKind } from "../blocks/kind.js";
import { kindOf, pairsOf, textOf, type Document } from "./document.js";
import type { LocatedProblem } from "./errors.js";

/** A value as written, with the node that tells its place. */
export interface RawValue {
  readonly text: string;
  /** The value's; its key's where there is no value. */
  readonly node: Node;
  readonly keyNode: Node;
}

/** One entry of the loop or a branch, its values still text. */
export interface RawEntry {
  readonly kind: BlockKind;
  /** Empty where it has none, which has been complained of. */
  readonly name: string;
  readonly side: string | undefined;
  readonly node: Node;
  readonly values: ReadonlyMap<string, RawValue>;
  /** True where a key could not be made out: what seems to be missing may be what was misspelt. */
  readonly misspelt: boolean;
}

/** A file as far as it can be read without evaluating anything, its values still text. */
export interface RawFile {
  readonly title: string | undefined;
  readonly fluid: string | undefined;
  readonly circuit: "closed" | "open";
  readonly flow: RawValue | undefined;
  readonly surroundings: ReadonlyMap<string, RawValue>;
  readonly let: ReadonlyMap<string, RawValue>;
  readonly loop: readonly RawEntry[];
  readonly branches: ReadonlyMap<string, readonly RawEntry[]>;
  /** Whether every entry could be made out, so that the gas can be followed through the loop. */
  readonly whole: boolean;
  /** Where a problem of a top-level key, or of the file as a whole, is shown. */
  placeOf(key: string): Node;
}

/** Every entry of the loop and the branches. */
export function entriesOf({ loop, branches }: Pick<RawFile, "loop" | "branches">): RawEntry[] {
  return [...loop, ...[...branches.values()].flat()];
}

/** A map whose every value is a text. */
export function readValues(document: Document, map: YAMLMap, where: string, problems: LocatedProblem[]): Map<string, RawValue> {
  const values = new Map<string, RawValue>();
  for (const { key, keyNode, value } of pairsOf(map)) {
    const text = textOf(value);
    if (text !== undefined) values.set(key, { text: text.trim(), node: text === "" ? keyNode : (value as Node), keyNode });
    // A key without a colon has no value at all.
    else if (value === null) values.set(key, { text: "", node: keyNode, keyNode });
    else problems.push(document.problem(value, { code: "wrong-shape", found: `${kindOf(value)} under ${where}.${key}`, expected: "a value such as 8 bar or 62 %" }));
  }
  return values;
}
