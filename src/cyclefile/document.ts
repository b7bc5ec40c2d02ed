import { isAlias, isMap, isNode, isPair, isScalar, isSeq, LineCounter, parseDocument, visit, type Node, type Pair, type YAMLMap } from "yaml";
import { InputError, type LocatedProblem } from "./errors.js";

/** What a problem says, without its place. */
export interface Complaint {
  readonly code: string;
  readonly found: string;
  readonly expected: string;
  readonly suggestion?: string;
}

/** Characters beyond which a cycle file is taken for something else. */
const LONGEST = 1_000_000;

/** A YAML text as a tree whose every node knows its line and column. Scalars stay the text they are written as. */
export class Document {
  readonly root: YAMLMap;
  private readonly lines = new LineCounter();

  /** @throws InputError where the text is no YAML map of plain values */
  constructor(
    text: string,
    readonly file: string,
  ) {
    if (text.length > LONGEST) throw this.refusal("too-long", `a text of ${Math.round(text.length / 1e6)} MB`, "a cycle file, which has a few kB");
    if (text.includes("\0") || text.includes("\uFFFD")) throw this.refusal("not-text", "bytes that are no text", "a cycle file in UTF-8");
    const document = this.parse(text);
    const problems = document.errors.map(({ code, message, pos: [at] }) =>
      this.problemAt(at, { code: "yaml", found: yamlFault(code, message), expected: "YAML 1.2 as a cycle file uses it" }),
    );
    visit(document, {
      Alias: (_key, node) => {
        problems.push(this.problem(node, { code: "alias", found: `the alias *${node.source}`, expected: "values written out, or named under let" }));
      },
      Node: (_key, node) => {
        if (!isAlias(node) && node.anchor !== undefined) {
          problems.push(this.problem(node, { code: "alias", found: `the anchor &${node.anchor}`, expected: "values written out, or named under let" }));
          return visit.SKIP;
        }
        return undefined;
      },
    });
    if (problems.length > 0) throw new InputError(problems.slice(0, MOST_PROBLEMS));
    const root = document.contents;
    if (root === null || (isScalar(root) && String(root.value ?? "").trim() === "")) {
      throw this.refusal("empty", "nothing but blanks and comments", "a cycle: title, fluid, flow and loop");
    }
    if (!isMap(root)) throw new InputError([this.problem(root, { code: "not-a-map", found: kindOf(root), expected: "keys such as fluid, flow and loop, each with a value" })]);
    this.root = root as YAMLMap;
  }

  private parse(text: string) {
    try {
      return parseDocument(text, { lineCounter: this.lines, schema: "failsafe", prettyErrors: false, maxAliasCount: 0 } as Parameters<typeof parseDocument>[1]);
    } catch {
      // Only nesting deeper than the reader's own stack gets here.
      throw this.refusal("too-deep", "lists or maps nested thousands deep", "a cycle file");
    }
  }

  /** A complaint at the start of a node. */
  problem(node: unknown, complaint: Complaint): LocatedProblem {
    const start = isPair(node) ? isNode(node.key) ? node.key.range?.[0] : 0 : isNode(node) ? node.range?.[0] : 0;
    return this.problemAt(start ?? 0, complaint);
  }

  private problemAt(offset: number, complaint: Complaint): LocatedProblem {
    const { line, col } = this.lines.linePos(offset);
    return { ...complaint, line: Math.max(1, line), column: Math.max(1, col), place: `${this.file}:${Math.max(1, line)}:${Math.max(1, col)}` };
  }

  private refusal(code: string, found: string, expected: string): InputError {
    return new InputError([{ code, found, expected, line: 1, column: 1, place: `${this.file}:1:1` }]);
  }
}

/** More faults of form than this say nothing more about a file. */
const MOST_PROBLEMS = 20;

function yamlFault(code: string, message: string): string {
  const [sentence = message] = message.split("\n");
  return code === "DUPLICATE_KEY" ? "a key that stands here twice" : `a fault of form (${sentence.trim()})`;
}

/** What a node is, in words. */
export function kindOf(node: unknown): string {
  if (isMap(node)) return "a map of keys";
  if (isSeq(node)) return "a list";
  if (isScalar(node)) return `"${String(node.value)}"`;
  return "nothing";
}

/** The pairs of a map, with the text of each key. */
export function pairsOf(map: YAMLMap): { key: string; keyNode: Node; value: unknown; pair: Pair }[] {
  return map.items.map((pair) => ({
    key: isScalar(pair.key) ? String(pair.key.value) : "",
    keyNode: pair.key as Node,
    value: pair.value,
    pair,
  }));
}

/** The text of a scalar; undefined for anything else. */
export function textOf(node: unknown): string | undefined {
  return isScalar(node) && node.value !== null ? String(node.value) : undefined;
}
