import { isMap, isSeq, type Node, type YAMLMap } from "yaml";
import { fluidNames } from "../fluids/registry.js";
import { kindOf, oneLine, pairsOf, textOf, type Document } from "./document.js";
import { readEntry } from "./entry.js";
import type { LocatedProblem } from "./errors.js";
import { nearest, suggested } from "./nearest.js";
import { readValues, type RawEntry, type RawFile, type RawValue } from "./raw.js";
import { surroundingsKeys } from "./surroundings.js";
import { meaning } from "./vocabulary.js";

/** The top-level keys, with what each takes. */
const EXPECTED: Readonly<Record<string, string>> = {
  title: "a line of text",
  fluid: `the name of a fluid: ${fluidNames.join(", ")}`,
  surroundings: "a map of temperature, pressure, relative-humidity and carbon-dioxide",
  circuit: "closed or open",
  flow: "a flow, as in 6 g/s or 250 L/min",
  let: "names with a value each, as in { p_high: 8 bar }",
  loop: "a list of blocks in the order in which the gas meets them, as in - load: { name: L1, heat: 20 W }",
  branches: "names with a list of blocks each",
};
const SURROUNDINGS: readonly string[] = surroundingsKeys.map(({ name }) => name);
const REQUIRED = ["fluid", "flow", "loop"];

/** Reads a document; all that does not fit goes to `problems`. */
export function readRaw(document: Document, problems: LocatedProblem[]): RawFile {
  const complain = (node: unknown, code: string, found: string, expected: string, suggestion?: string): void => {
    problems.push(document.problem(node, { code, found, expected, ...suggested(suggestion) }));
  };
  const top = new Map(pairsOf(document.root).map((pair) => [pair.key, pair]));
  const placeOf = (key: string): Node => top.get(key)?.keyNode ?? document.root;
  const misspelt = new Set<string>();
  for (const { key, keyNode } of top.values()) {
    if (Object.hasOwn(EXPECTED, key)) continue;
    const meant = nearest(key, Object.keys(EXPECTED));
    if (meant !== undefined) misspelt.add(meant);
    complain(keyNode, "unknown-key", `the unknown key "${key}"`, Object.keys(EXPECTED).join(", "), meant);
  }
  for (const key of REQUIRED) {
    if (!top.has(key) && !misspelt.has(key)) complain(document.root, "missing-key", `no "${key}"`, EXPECTED[key]);
  }

  /** The text of a key; undefined where it has none, which is complained of. */
  const text = (key: string): RawValue | undefined => {
    const pair = top.get(key);
    if (pair === undefined) return undefined;
    const written = textOf(pair.value)?.trim() ?? "";
    if (written !== "") return { text: written, node: pair.value as Node, keyNode: pair.keyNode };
    complain(pair.value ?? pair.keyNode, "wrong-shape", `${kindOf(pair.value)} under ${key}`, EXPECTED[key]);
    return undefined;
  };
  const texts = (key: string): Map<string, RawValue> => {
    const pair = top.get(key);
    if (pair === undefined || textOf(pair.value)?.trim() === "") return new Map();
    if (isMap(pair.value)) return readValues(document, pair.value as YAMLMap, key, problems);
    complain(pair.value ?? pair.keyNode, "wrong-shape", `${kindOf(pair.value)} under ${key}`, EXPECTED[key]);
    return new Map();
  };
  let whole = true;
  const entries = (list: unknown, place: Node, where: string, expected: string): RawEntry[] => {
    if (!isSeq(list) || list.items.length === 0) {
      whole = false;
      complain(list === null || textOf(list) === "" ? place : list, "wrong-shape", `${kindOf(list)} under ${where}`, expected);
      return [];
    }
    return list.items.flatMap((item) => {
      const entry = readEntry(document, item ?? list, problems);
      whole &&= entry !== undefined;
      return entry ?? [];
    });
  };
  const loop = top.has("loop") ? entries(top.get("loop")?.value, placeOf("loop"), "loop", EXPECTED.loop) : [];
  const branches = new Map<string, RawEntry[]>();
  const branchMap = top.get("branches")?.value;
  if (isMap(branchMap)) {
    for (const { key, keyNode, value } of pairsOf(branchMap as YAMLMap)) branches.set(key, entries(value, keyNode, `branches.${key}`, EXPECTED.loop));
  } else if (top.has("branches")) complain(branchMap ?? placeOf("branches"), "wrong-shape", `${kindOf(branchMap)} under branches`, EXPECTED.branches);

  const surroundings = texts("surroundings");
  for (const [key, { keyNode }] of surroundings) {
    if (SURROUNDINGS.includes(key)) continue;
    complain(keyNode, "unknown-key", `the unknown key "${key}" of the surroundings`, SURROUNDINGS.join(", "), nearest(key, SURROUNDINGS));
    surroundings.delete(key);
  }
  const names = texts("let");
  for (const [name, { keyNode }] of names) {
    const taken = meaning(name);
    if (taken === undefined && /^[A-Za-z_]\w*$/.test(name)) continue;
    complain(keyNode, "let-name", taken === undefined ? `the name "${name}"` : `the name "${name}", which is ${taken}`, "a name of letters, digits and _ that means nothing else, as in p_high");
    names.delete(name);
  }
  const fluid = text("fluid");
  const known = fluid !== undefined && fluidNames.includes(fluid.text);
  if (fluid !== undefined && !known) complain(fluid.node, "unknown-fluid", `the unknown fluid "${fluid.text}"`, fluidNames.join(", "), nearest(fluid.text, fluidNames));
  const circuit = text("circuit");
  if (circuit !== undefined && circuit.text !== "open" && circuit.text !== "closed") {
    complain(circuit.node, "circuit", `the circuit "${circuit.text}"`, EXPECTED.circuit, nearest(circuit.text, ["closed", "open"]));
  }
  const title = text("title")?.text;
  return {
    title: title === undefined ? undefined : oneLine(title),
    fluid: known ? fluid.text : undefined,
    circuit: circuit?.text === "open" ? "open" : "closed",
    flow: text("flow"),
    surroundings,
    let: names,
    loop,
    branches,
    whole: whole && top.has("loop"),
    placeOf,
  };
}
