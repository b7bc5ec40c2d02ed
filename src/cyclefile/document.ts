import { isMap, isNode, isScalar, isSeq, LineCounter, parseDocument, visit, type Document as YamlDocument, type Node, type YAMLMap } from "yaml";
import { InputError, type LocatedProblem } from "./errors.js";
import { yamlFault } from "./yaml-faults.js";

/** What a problem says, without its place. */
export interface Complaint {
  readonly code: string;
  readonly found: string;
  readonly expected: string;
  readonly suggestion?: string;
  /** The name within a value that the problem is about, where it is only a part of it. */
  readonly part?: string;
}

/**
 * Characters beyond which a text is taken for something else: cycle files have a few thousand, and ill-meant text of this
 * length is still read in half a second.
 */
export const LONGEST = 100_000;
/** Anchors and aliases reported; more of them say nothing more. */
const MOST_ALIASES = 5;

/** A YAML text as a tree whose every node knows its line and column. Scalars stay the text they are written as. */
export class Document {
  readonly root: YAMLMap;
  /** Faults that leave the rest readable. */
  readonly problems: LocatedProblem[] = [];
  private readonly lines = new LineCounter();

  /** @throws InputError where the text is no YAML map of plain values */
  constructor(
    private readonly text: string,
    readonly file: string,
  ) {
    if (text.length > LONGEST) throw this.refusal("too-long", `a text of ${Math.round(text.length / 1000)} kB`, "a cycle file, which has a few kB");
    if (text.includes("\0") || text.includes("\uFFFD")) throw this.refusal("not-text", "bytes that are no text", "a cycle file in UTF-8");
    try {
      this.root = this.read();
    } catch (error) {
      // The stack is too small to walk what the parser could still read.
      throw error instanceof RangeError ? this.tooDeep() : error;
    }
  }

  private read(): YAMLMap {
    const options = { lineCounter: this.lines, schema: "failsafe", prettyErrors: false, uniqueKeys: false } as const;
    const document = parseDocument(this.text, options);
    const [first] = document.errors;
    if (first?.code === "RESOURCE_EXHAUSTION") throw this.tooDeep();
    // Whatever follows the first fault of form may be a consequence of it.
    if (first !== undefined) throw new InputError([this.problemAt(first.pos[0], { code: "yaml", ...yamlFault(first) })]);
    this.refuseAliases(document);
    const root: unknown = document.contents;
    if (root === null || (isScalar(root) && String(root.value ?? "").trim() === "")) {
      throw this.refusal("empty", "nothing but blanks and comments", "a cycle: title, fluid, flow and loop");
    }
    if (!isMap(root)) {
      throw new InputError([this.problem(root, { code: "wrong-shape", found: kindOf(root), expected: "keys such as fluid, flow and loop, each with a value" })]);
    }
    visit(document, { Map: (_key, map) => this.checkKeys(map) });
    return root as YAMLMap;
  }

  /** Nodes that stand for other nodes can stand for very many of them. */
  private refuseAliases(document: YamlDocument): void {
    const problems: LocatedProblem[] = [];
    visit(document, (_key, node) => {
      if (problems.length === MOST_ALIASES) return visit.BREAK;
      const found = nameOfAlias(node);
      if (found !== undefined) problems.push(this.problem(node, { code: "alias", found, expected: "values written out, or named under let" }));
      return undefined;
    });
    if (problems.length > 0) throw new InputError(problems);
  }

  private checkKeys(map: YAMLMap): void {
    const seen = new Map<string, Node>();
    for (const { key } of map.items) {
      if (!isScalar(key)) {
        this.problems.push(this.problem(key, { code: "wrong-shape", found: `${kindOf(key)} in place of a key`, expected: "key: value" }));
        continue;
      }
      const name = String(key.value);
      const first = seen.get(name);
      if (first === undefined) seen.set(name, key as Node);
      else {
        const { line } = this.lines.linePos(first.range?.[0] ?? 0);
        this.problems.push(this.problem(key, { code: "duplicate-key", found: `the key "${name}" a second time`, expected: `it once; it stands in line ${line} already` }));
      }
    }
  }

  /** A complaint at the start of a node, or of the part of it that it is about. */
  problem(node: unknown, { part, ...complaint }: Complaint): LocatedProblem {
    const [start = 0, end = start] = (isNode(node) ? node.range : undefined) ?? [];
    const within = part === undefined ? null : new RegExp(`(?<!\\w)${escaped(part)}(?!\\w)`).exec(this.text.slice(start, end));
    return this.problemAt(start + (within?.index ?? 0), complaint);
  }

  private problemAt(offset: number, complaint: Complaint): LocatedProblem {
    const { line, col } = this.lines.linePos(offset);
    return { ...complaint, found: oneLine(complaint.found), expected: oneLine(complaint.expected), line: Math.max(1, line), column: Math.max(1, col), place: `${this.file}:${Math.max(1, line)}:${Math.max(1, col)}` };
  }

  private tooDeep(): InputError {
    return this.refusal("too-deep", "lists or maps nested hundreds deep", "a cycle file, which has four levels");
  }

  private refusal(code: string, found: string, expected: string): InputError {
    return new InputError([{ code, found, expected, line: 1, column: 1, place: `${this.file}:1:1` }]);
  }
}

function nameOfAlias(node: unknown): string | undefined {
  if (!isNode(node)) return undefined;
  if ("source" in node && !isScalar(node)) return `the alias *${String(node.source)}`;
  return "anchor" in node && node.anchor !== undefined ? `the anchor &${String(node.anchor)}` : undefined;
}

function escaped(text: string): string {
  return text.replaceAll(/[.*+?^${}()|[\]\\/-]/g, "\\$&");
}

/** What a node is, in words. */
export function kindOf(node: unknown): string {
  if (isMap(node)) return "a map of keys";
  if (isSeq(node)) return node.items.length === 0 ? "an empty list" : "a list";
  const text = textOf(node)?.trim() ?? "";
  return text === "" ? "nothing" : `"${shortened(text)}"`;
}

/** Text without what would break a line or speak to a terminal. */
export function oneLine(text: string): string {
  return text.replaceAll(/[\s\p{C}]+/gu, " ");
}

/** Text to show in a message: one line, not too long. */
export function shortened(text: string): string {
  const line = oneLine(text);
  return line.length <= 60 ? line : `${line.slice(0, 57)}…`;
}

/** The pairs of a map, with the text of each key; of equal keys the first. */
export function pairsOf(map: YAMLMap): { key: string; keyNode: Node; value: unknown }[] {
  const seen = new Set<string>();
  return map.items.flatMap(({ key, value }) => {
    if (!isScalar(key)) return [];
    const name = String(key.value);
    return seen.has(name) || !seen.add(name) ? [] : [{ key: name, keyNode: key as Node, value }];
  });
}

/** The text of a scalar; undefined for anything else. */
export function textOf(node: unknown): string | undefined {
  return isScalar(node) ? String(node.value ?? "") : undefined;
}
