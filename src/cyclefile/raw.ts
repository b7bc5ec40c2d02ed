import type { Node, YAMLMap, YAMLSeq } from "yaml";
import type { BlockKind } from "../blocks/kind.js";
import { blockKind, blockKinds } from "../blocks/registry.js";
import { pairsOf, textOf, type Document } from "./document.js";
import type { LocatedProblem } from "./errors.js";
import { nearest } from "./nearest.js";

/** A value as written, with the nodes that tell its place. */
export interface RawValue {
  readonly text: string;
  readonly node: Node;
  readonly keyNode: Node;
}

/** One entry of the loop or a branch, its values still text. */
export interface RawEntry {
  readonly kind: BlockKind;
  readonly name: string;
  readonly side: string | undefined;
  readonly node: Node;
  readonly values: ReadonlyMap<string, RawValue>;
  /** True where a key could not be made out: what seems to be missing may be what was misspelt. */
  readonly misspelt: boolean;
}

/** A file of the right shape, its values still text. */
export interface RawFile {
  readonly title: RawValue | undefined;
  readonly fluid: RawValue;
  readonly circuit: RawValue | undefined;
  readonly flow: RawValue;
  readonly surroundings: ReadonlyMap<string, RawValue>;
  readonly let: ReadonlyMap<string, RawValue>;
  readonly loop: readonly RawEntry[];
  readonly branches: ReadonlyMap<string, readonly RawEntry[]>;
  /** The node of the loop itself, for what concerns the whole of it. */
  readonly loopNode: Node;
}

/** Reads a document whose shape has been checked; unknown kinds and keys go to `problems`. */
export function readRaw(document: Document, problems: LocatedProblem[]): RawFile {
  const top = new Map(pairsOf(document.root).map((pair) => [pair.key, pair]));
  const value = (key: string): RawValue | undefined => {
    const pair = top.get(key);
    return pair === undefined ? undefined : rawValue(pair);
  };
  const map = (key: string): Map<string, RawValue> => rawMap(top.get(key)?.value as YAMLMap | undefined);
  const entries = (list: unknown): RawEntry[] =>
    (list as YAMLSeq).items.flatMap((item) => rawEntry(document, item as YAMLMap, problems) ?? []);
  const branches = (top.get("branches")?.value as YAMLMap | undefined) ?? undefined;
  return {
    title: value("title"),
    fluid: value("fluid") as RawValue,
    circuit: value("circuit"),
    flow: value("flow") as RawValue,
    surroundings: map("surroundings"),
    let: map("let"),
    loop: entries(top.get("loop")?.value),
    branches: new Map(branches === undefined ? [] : pairsOf(branches).map(({ key, value: list }) => [key, entries(list)])),
    loopNode: top.get("loop")?.keyNode as Node,
  };
}

function rawValue({ keyNode, value }: { keyNode: Node; value: unknown }): RawValue {
  return { text: textOf(value) ?? "", node: value as Node, keyNode };
}

function rawMap(map: YAMLMap | undefined): Map<string, RawValue> {
  return new Map(map === undefined ? [] : pairsOf(map).map((pair) => [pair.key, rawValue(pair)]));
}

function rawEntry(document: Document, item: YAMLMap, problems: LocatedProblem[]): RawEntry | undefined {
  const [{ key: kindName, keyNode, value }] = pairsOf(item);
  const kind = blockKind(kindName);
  if (kind === undefined) {
    const known = blockKinds.map((record) => record.kind);
    const suggestion = nearest(kindName, known);
    problems.push(
      document.problem(keyNode, {
        code: "unknown-block",
        found: `the unknown block "${kindName}"`,
        expected: known.join(", "),
        ...(suggestion === undefined ? {} : { suggestion }),
      }),
    );
    return undefined;
  }
  const values = rawMap(value as YAMLMap);
  const name = values.get("name");
  const side = values.get("side");
  values.delete("name");
  values.delete("side");
  const label = name === undefined ? kindName : `${kindName} ${name.text}`;
  if (name === undefined || !/^[A-Za-z]\w*$/.test(name.text)) {
    problems.push(
      document.problem(name?.node ?? keyNode, {
        code: "name",
        found: name === undefined ? `a ${kindName} without a name` : `the name "${name.text}"`,
        expected: "a name of letters, digits and _, beginning with a letter: name: C1",
      }),
    );
  }
  if (kind.sides === undefined ? side !== undefined : side === undefined || !kind.sides.includes(side.text)) {
    problems.push(
      document.problem(side?.node ?? keyNode, {
        code: "side",
        found: side === undefined ? `${label} without a side` : `${label} with the side "${side.text}"`,
        expected: kind.sides === undefined ? "no side: this block stands in the loop once" : `side: ${kind.sides.join(" or side: ")}`,
      }),
    );
  }
  let misspelt = false;
  for (const [key, { keyNode: at }] of values) {
    const records = kind.keys.filter((record) => record.name === key);
    if (records.some((record) => record.side === undefined || record.side === side?.text)) continue;
    const known = ["name", ...(kind.sides === undefined ? [] : ["side"]), ...new Set(kind.keys.map((record) => record.name))];
    const wrongSide = records[0]?.side;
    const suggestion = wrongSide === undefined ? nearest(key, known) : undefined;
    problems.push(
      document.problem(at, {
        code: wrongSide === undefined ? "unknown-key" : "wrong-side",
        found: wrongSide === undefined ? `the unknown key "${key}" of ${label}` : `"${key}" on the ${side?.text ?? "unnamed"} side of ${label}`,
        expected: wrongSide === undefined ? known.join(", ") : `it on the ${wrongSide} side`,
        ...(suggestion === undefined ? {} : { suggestion }),
      }),
    );
    values.delete(key);
    misspelt = true;
  }
  return { kind, name: name?.text ?? "", side: side?.text, node: keyNode, values, misspelt };
}
