import type { BlockDefinition, Value } from "../blocks/definition.js";
import type { Key } from "../blocks/keys.js";
import { shortened, type Complaint, type Document } from "./document.js";
import type { LocatedProblem } from "./errors.js";
import type { Evaluation } from "./evaluation.js";
import { nearest, suggested } from "./nearest.js";
import { located, written, type Given, type Override } from "./override.js";
import { needsExpression, isName } from "./quantity.js";
import { entriesOf, type RawEntry, type RawFile } from "./raw.js";
import { units } from "./units.js";

/** An entry of the loop, evaluated. */
export interface Block {
  /** With NaN under number keys that are at fault or missing. */
  readonly definition: BlockDefinition;
  readonly entry: RawEntry;
  readonly given: ReadonlyMap<string, Given>;
  readonly problems: readonly LocatedProblem[];
  /** Whether the definition is free of faults. */
  readonly sound: boolean;
  /** Whether what it says of other blocks and of branches is free of faults. */
  readonly linked: boolean;
}

/** Evaluates an entry with overrides in place. */
export function readBlock(document: Document, raw: RawFile, entry: RawEntry, overridden: ReadonlyMap<string, Override> | undefined, evaluation: Evaluation): Block {
  const problems: LocatedProblem[] = [];
  const given = givenKeys(entry, overridden);
  const label = labelOf(entry);
  const values: Record<string, Value> = {};
  const keys = entry.kind.keys.filter(({ side }) => side === undefined || side === entry.side);
  let sound = !entry.misspelt && entry.name !== "";
  let linked = !entry.misspelt || !keys.some(isLink);
  for (const key of keys) {
    const at = given.get(key.name);
    if (at === undefined) {
      if ("default" in key && key.default !== undefined) values[key.name] = key.default;
    } else if (key.type === "number") {
      const value = evaluation.number(at, { label: `${label} ${key.name}`, measure: key.dimension, range: key.range }, problems);
      // Where the fault is told elsewhere, at a name that is used here.
      sound &&= value !== undefined;
      values[key.name] = value ?? NaN;
    } else {
      const text = String(written(at));
      values[key.name] = key.type === "flag" ? text === "true" : text;
      const complaint = wordComplaint(text, key, raw);
      if (complaint === undefined) continue;
      linked &&= key.type === "flag";
      problems.push(located(document, at, { ...complaint, found: `${label} ${key.name}: ${complaint.found}` }));
    }
  }
  for (const { complaint, missing } of missingKeys(entry, keys, given)) {
    for (const key of missing) {
      if (key.type === "number") values[key.name] ??= NaN;
      linked &&= !isLink(key);
    }
    // What seems to be missing may be what is misspelt.
    if (!entry.misspelt || missing.length === 0) problems.push(located(document, entry, complaint));
  }
  const definition: BlockDefinition = { kind: entry.kind.kind, name: entry.name, ...(entry.side === undefined ? {} : { side: entry.side }), values };
  return { definition, entry, given, problems, sound: sound && problems.length === 0, linked };
}

function isLink({ type }: Key): boolean {
  return type === "block" || type === "branch";
}

/** Whether an entry's values mean the same whatever the names and surroundings are. */
export function isConstant({ values }: RawEntry): boolean {
  return [...values.values()].every(({ text }) => !isName(text) && !needsExpression(text) && !Object.entries(units).some(([name, { gauge }]) => gauge === true && text.endsWith(name)));
}

/** What messages call an entry. */
export function labelOf({ kind, name }: RawEntry): string {
  return name === "" ? kind.kind : `${kind.kind} ${name}`;
}

/** The values of an entry with overrides in their place; an override of one alternative puts out the others. */
function givenKeys(entry: RawEntry, overridden: ReadonlyMap<string, Override> | undefined): ReadonlyMap<string, Given> {
  if (overridden === undefined) return entry.values;
  const given = new Map<string, Given>(entry.values);
  const alternative = (name: string): string | undefined => {
    const key = entry.kind.keys.find((record) => record.name === name);
    return key?.type === "number" ? key.alternative : undefined;
  };
  for (const name of overridden.keys()) {
    const group = alternative(name);
    if (group !== undefined) for (const other of entry.values.keys()) if (alternative(other) === group) given.delete(other);
  }
  for (const [name, override] of overridden) given.set(name, override);
  return given;
}

/** What is wrong with a value that is a word. */
function wordComplaint(text: string, key: Exclude<Key, { type: "number" }>, raw: RawFile): Complaint | undefined {
  if (key.type === "flag") return text === "true" || text === "false" ? undefined : { code: "flag", found: `"${shortened(text)}"`, expected: "true or false" };
  const what = key.type === "block" ? key.kind : "branch";
  const known =
    key.type === "block"
      ? entriesOf(raw).flatMap((entry) => (entry.kind.kind === key.kind && entry.name !== "" ? [entry.name] : []))
      : [...key.words, ...raw.branches.keys()];
  if (known.includes(text)) return undefined;
  const expected = known.length === 0 ? `a ${what}, of which there is none` : `a ${what}: ${known.join(", ")}`;
  return { code: `no-such-${key.type}`, found: `no ${what} "${shortened(text)}"`, expected, ...suggested(nearest(text, known)) };
}

/** What is missing, with the keys that are, or is given beside what excludes it. */
function missingKeys(entry: RawEntry, keys: readonly Key[], given: ReadonlyMap<string, unknown>): { complaint: Complaint; missing: readonly Key[] }[] {
  const label = labelOf(entry);
  const found = keys
    .filter((key) => "required" in key && key.required === true && !given.has(key.name))
    .map((key): { complaint: Complaint; missing: readonly Key[] } => ({
      missing: [key],
      complaint: { code: "missing-key", found: `${label} without ${key.name}`, expected: `${key.name}: ${key.help}` },
    }));
  for (const { name, side, optional } of entry.kind.alternatives) {
    if (side !== undefined && side !== entry.side) continue;
    const group = keys.filter((key) => key.type === "number" && key.alternative === name);
    const chosen = group.filter((key) => given.has(key.name));
    if (chosen.length > 1) {
      found.push({ missing: [], complaint: { code: "alternatives", found: `${label} with ${listed(chosen, "and")}`, expected: `only one of ${listed(group, "or")}` } });
    } else if (chosen.length === 0 && optional !== true) {
      found.push({ missing: group, complaint: { code: "missing-key", found: `${label} with none of ${listed(group, "and")}`, expected: "one of them" } });
    }
  }
  return found;
}

function listed(keys: readonly Key[], word: "and" | "or"): string {
  const names = keys.map(({ name }) => name);
  return names.length < 2 ? names.join() : `${names.slice(0, -1).join(", ")} ${word} ${names.at(-1)}`;
}
