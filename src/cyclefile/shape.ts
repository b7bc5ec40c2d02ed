import * as v from "valibot";
import { isMap, isPair, isSeq, type Node, type YAMLMap } from "yaml";
import { kindOf, pairsOf, textOf, type Document } from "./document.js";
import type { LocatedProblem } from "./errors.js";
import { nearest } from "./nearest.js";

const entry = v.pipe(
  v.record(v.string(), v.record(v.string(), v.string())),
  v.check((blocks) => Object.keys(blocks).length === 1),
);

/** The shape of a cycle file, before any value is read: every scalar is the text as written. */
const cycleFile = v.strictObject({
  title: v.optional(v.string()),
  fluid: v.string(),
  surroundings: v.optional(
    v.strictObject({
      temperature: v.optional(v.string()),
      pressure: v.optional(v.string()),
      "relative-humidity": v.optional(v.string()),
    }),
  ),
  circuit: v.optional(v.picklist(["closed", "open"])),
  flow: v.string(),
  let: v.optional(v.record(v.string(), v.string())),
  loop: v.pipe(v.array(entry), v.minLength(1)),
  branches: v.optional(v.record(v.string(), v.pipe(v.array(entry), v.minLength(1)))),
});

/** What stands where, in words, for messages. */
const EXPECTED: Readonly<Record<string, string>> = {
  "": "the keys title, fluid, surroundings, circuit, flow, let, loop and branches",
  title: "a line of text",
  fluid: "the name of a fluid",
  surroundings: "a map of temperature, pressure and relative-humidity",
  circuit: "closed or open",
  flow: "a flow such as 6 g/s or 250 L/min",
  let: "names with a value each",
  loop: "a list of blocks in the order in which the gas meets them, each as  - kind: { name: …, … }",
  branches: "names with a list of blocks each",
};

const KNOWN_KEYS: Readonly<Record<string, readonly string[]>> = {
  "": Object.keys(cycleFile.entries),
  surroundings: ["temperature", "pressure", "relative-humidity"],
};

/** A file's faults of shape, each at its place. */
export function shapeProblems(document: Document): LocatedProblem[] {
  const result = v.safeParse(cycleFile, plain(document.root));
  if (result.success) return [];
  return result.issues.map((issue) => {
    const path = issue.path?.map(({ key }) => key as string | number) ?? [];
    const { node, parent } = nodeAt(document.root, path);
    const [top = ""] = path;
    const key = String(path.at(-1) ?? "");
    if (issue.type === "strict_object" && issue.expected === "never") {
      const known = KNOWN_KEYS[path.slice(0, -1).join(".")] ?? [];
      const suggestion = nearest(key, known);
      return document.problem(node ?? parent, {
        code: "unknown-key",
        found: `the unknown key "${key}"`,
        expected: known.join(", "),
        ...(suggestion === undefined ? {} : { suggestion }),
      });
    }
    if (node === undefined) {
      return document.problem(parent, { code: "missing-key", found: `no "${key}"`, expected: EXPECTED[String(top)] ?? EXPECTED[""] });
    }
    return document.problem(node, {
      code: "wrong-shape",
      found: found(node, path),
      expected: expectedAt(path),
    });
  });
}

function found(node: unknown, path: readonly (string | number)[]): string {
  const value = isPair(node) ? node.value : node;
  if (isMap(value) && (value as YAMLMap).items.length !== 1 && typeof path.at(-1) === "number") {
    const kinds = pairsOf(value as YAMLMap).map(({ key }) => key);
    return `${kinds.length} keys where one block kind should stand (${kinds.join(", ")})`;
  }
  if (isSeq(value) && value.items.length === 0) return "an empty list";
  return path.length === 0 ? kindOf(value) : `${kindOf(value)} under ${path.filter((part) => typeof part === "string").join(".")}`;
}

function expectedAt(path: readonly (string | number)[]): string {
  if (path[0] === "loop" || path[0] === "branches") {
    const depth = path[0] === "loop" ? path.length : path.length - 1;
    if (depth >= 4) return "a value such as 8 bar or 62 %";
    if (depth >= 2) return "one block as  kind: { name: …, … }";
  }
  if (path.length > 1) return "a value such as 8 bar or 62 %";
  return EXPECTED[String(path[0] ?? "")] ?? "";
}

/** The tree as plain maps, lists and texts; the first of equal keys counts. */
function plain(node: unknown): unknown {
  if (isMap(node)) {
    const map = Object.create(null) as Record<string, unknown>;
    for (const { key, value } of pairsOf(node as YAMLMap)) if (!Object.hasOwn(map, key)) map[key] = plain(value);
    return map;
  }
  if (isSeq(node)) return node.items.map(plain);
  return textOf(node) ?? null;
}

/** The node (for a key of a map: its pair) at a path, and the last node there is on the way. */
function nodeAt(root: YAMLMap, path: readonly (string | number)[]): { node: unknown; parent: unknown } {
  let node: unknown = root;
  let parent: unknown = root;
  for (const part of path) {
    const value: unknown = isPair(node) ? node.value : node;
    parent = node;
    if (isMap(value)) node = pairsOf(value as YAMLMap).find(({ key }) => key === part)?.pair;
    else if (isSeq(value)) node = (value.items as Node[])[Number(part)];
    else node = undefined;
    if (node === undefined) break;
  }
  return { node, parent };
}
