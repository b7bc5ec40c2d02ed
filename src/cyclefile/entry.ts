import { isMap, type YAMLMap } from "yaml";
import { blockKind, blockKinds } from "../blocks/registry.js";
import { kindOf, pairsOf, textOf, type Document } from "./document.js";
import type { LocatedProblem } from "./errors.js";
import { nearest, suggested } from "./nearest.js";
import { readValues, type RawEntry } from "./raw.js";

const KINDS = blockKinds.map(({ kind }) => kind);
/** Beginnings of addresses that are no block's. */
const TAKEN = new Set(["let", "flow", "surroundings"]);
const BLOCK = "one block, as in load: { name: L1, heat: 20 W }";

/** One entry of a list of blocks; undefined, with its problem told, where it cannot be made out. */
export function readEntry(document: Document, item: unknown, problems: LocatedProblem[]): RawEntry | undefined {
  const complain = (node: unknown, code: string, found: string, expected: string, suggestion?: string): void => {
    problems.push(document.problem(node, { code, found, expected, ...suggested(suggestion) }));
  };
  if (!isMap(item)) {
    complain(item, "wrong-shape", `${kindOf(item)} in the place of a block`, BLOCK);
    return undefined;
  }
  const pairs = pairsOf(item as YAMLMap);
  const [first] = pairs;
  if (pairs.length !== 1) {
    const keys = pairs.map(({ key }) => key).join(", ");
    const unindented = pairs.length > 1 && blockKind(first.key) !== undefined && !isMap(first.value);
    complain(item, "several-kinds", pairs.length === 0 ? "an empty map" : `${pairs.length} keys beside one another (${keys})`, unindented ? `${first.key}: with its keys indented further or inside { }` : BLOCK);
    return undefined;
  }
  const { key: kindName, keyNode, value } = first;
  const kind = blockKind(kindName);
  if (kind === undefined) {
    complain(keyNode, "unknown-block", `the unknown block "${kindName}"`, KINDS.join(", "), nearest(kindName, KINDS));
    return undefined;
  }
  if (!isMap(value)) {
    const nothing = value === null || textOf(value)?.trim() === "";
    complain(nothing ? keyNode : value, "wrong-shape", `${kindName} with ${nothing ? "no keys" : kindOf(value)}`, `${kindName}: { name: …, … }`);
    return undefined;
  }
  const values = readValues(document, value as YAMLMap, kindName, problems);
  let misspelt = values.size < (value as YAMLMap).items.length;
  const name = values.get("name");
  const side = values.get("side");
  values.delete("name");
  values.delete("side");
  const label = name === undefined || name.text === "" ? kindName : `${kindName} ${name.text}`;
  const known = ["name", ...(kind.sides === undefined ? [] : ["side"]), ...new Set(kind.keys.map((key) => key.name))];
  const meant = new Set<string>();
  for (const [key, { keyNode: at }] of values) {
    const records = kind.keys.filter((record) => record.name === key);
    if (records.some((record) => record.side === undefined || record.side === side?.text)) continue;
    const [onlyOn] = records;
    if (onlyOn === undefined) {
      const suggestion = nearest(key, known);
      if (suggestion !== undefined) meant.add(suggestion);
      const digits = /^\d/.test(key) ? " (numbers have a decimal point, 1.5, and no comma)" : "";
      complain(at, "unknown-key", `the unknown key "${key}" of ${label}`, `${known.join(", ")}${digits}`, suggestion);
    } else if (side !== undefined && kind.sides?.includes(side.text) === true) {
      complain(at, "wrong-side", `"${key}" on the ${side.text} side of ${label}`, `it on the ${onlyOn.side} side`);
    }
    values.delete(key);
    misspelt = true;
  }
  checkName();
  checkSide();
  return { kind, name: name?.text ?? "", side: side?.text, node: keyNode, values, misspelt };

  function checkName(): void {
    if (name === undefined) {
      if (!meant.has("name")) complain(keyNode, "name", `a ${kindName} without a name`, "name: C1, or the like");
    } else if (TAKEN.has(name.text)) {
      complain(name.node, "name", `the name "${name.text}", which is a word of the file`, "another name");
    } else if (!/^[A-Za-z][\w-]*$/.test(name.text)) {
      complain(name.node, "name", `the name "${name.text}"`, "a name of letters, digits, _ and -, beginning with a letter, as in C1");
    }
  }

  function checkSide(): void {
    if (kind?.sides === undefined) {
      if (side !== undefined) complain(side.node, "side", `a side of ${label}`, "no side: this block stands in the loop once");
    } else if (side === undefined) {
      if (!meant.has("side")) complain(keyNode, "side", `${label} without a side`, `side: ${kind.sides.join(" or side: ")}`);
    } else if (!kind.sides.includes(side.text)) {
      complain(side.node, "side", `the side "${side.text}" of ${label}`, kind.sides.join(" or "), nearest(side.text, kind.sides));
    }
  }
}
