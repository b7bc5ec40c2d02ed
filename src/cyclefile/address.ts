import type { NumberKey } from "../blocks/keys.js";
import { FLOW_RANGE } from "./define.js";
import { InputError, type LocatedProblem } from "./errors.js";
import type { Evaluation } from "./evaluation.js";
import { nearest, suggested } from "./nearest.js";
import { written, type Given, type Override, type Overrides } from "./override.js";
import type { Measure, Quantity } from "./quantity.js";
import { entriesOf, type RawEntry, type RawFile } from "./raw.js";
import { surroundingsKeys, type SurroundingsKey } from "./surroundings.js";

/** What an address stands for. */
type Target =
  | { readonly at: "flow" }
  | { readonly at: "surroundings"; readonly key: SurroundingsKey }
  | { readonly at: "let"; readonly name: string }
  | { readonly at: "key"; readonly entry: RawEntry; readonly key: string; readonly record: NumberKey | undefined };

/** An addressable number: what it measures, its legal range and what the file gives. */
export interface Addressed {
  readonly address: string;
  readonly dimension: Measure;
  readonly range: NumberKey["range"];
  /** SI; undefined where the file leaves it out */
  readonly given: number | undefined;
  /** The unit as written; undefined for a bare number, an expression, or a value left out. */
  readonly unit: string | undefined;
  readonly help: string;
}

/**
 * The place in a file that an address names: NAME.key, NAME.side.key, flow, let.NAME or surroundings.KEY.
 * @throws InputError with the nearest address
 */
export function resolve(address: string, raw: RawFile): Target {
  const refuse = (found: string, expected: string, suggestion?: string): never => {
    throw new InputError([{ code: "unknown-address", place: address, line: 0, column: 0, found, expected, ...suggested(suggestion) }]);
  };
  const meant = (name: string, known: Iterable<string>, prefix: string): string | undefined => {
    const near = nearest(name, known);
    return near === undefined ? undefined : `${prefix}${near}`;
  };
  if (address === "flow") return { at: "flow" };
  const [first, ...rest] = address.split(".");
  const last = rest.at(-1) ?? "";
  if (first === "let") {
    if (rest.length === 1 && raw.let.has(last)) return { at: "let", name: last };
    return refuse(`no name "${last}" under let`, [...raw.let.keys()].join(", ") || "a file with names under let", meant(last, raw.let.keys(), "let."));
  }
  if (first === "surroundings") {
    const key = rest.length === 1 ? surroundingsKeys.find(({ name }) => name === last) : undefined;
    if (key !== undefined) return { at: "surroundings", key };
    const names = surroundingsKeys.map(({ name }) => name);
    return refuse(`no "${last}" of the surroundings`, names.join(", "), meant(last, names, "surroundings."));
  }
  const entries = entriesOf(raw).filter(({ name }) => name !== "");
  const named = entries.filter(({ name }) => name === first);
  if (named.length === 0) {
    const names = [...new Set(entries.map(({ name }) => name))];
    const near = nearest(first, [...names, "flow", "surroundings", "let"]);
    return refuse(`no block "${first}"`, `one of ${names.join(", ")}, or flow, let.NAME, surroundings.KEY`, near === undefined ? undefined : [near, ...(near === "flow" ? [] : rest)].join("."));
  }
  if (rest.length === 0 || rest.length > 2) return refuse(`"${address}"`, `${first}.KEY`);
  const side = rest.length === 2 ? rest[0] : undefined;
  const candidates = named.filter((entry) => (side === undefined || entry.side === side) && keyOf(entry, last) !== undefined);
  const given = candidates.filter(({ values }) => values.has(last));
  const entry = candidates.length === 1 ? candidates[0] : given.length === 1 ? given[0] : undefined;
  if (entry !== undefined) {
    const record = keyOf(entry, last);
    return { at: "key", entry, key: last, record: record?.type === "number" ? record : undefined };
  }
  if (candidates.length > 1) return refuse(`${address}, which both sides have`, candidates.map((each) => `${first}.${each.side}.${last}`).join(" or "));
  const keys = [...new Set(named.flatMap(({ kind }) => kind.keys.map((record) => record.name)))];
  const sides = keys.includes(last) && side !== undefined ? ` on the ${side} side` : "";
  return refuse(`no key "${last}" of ${named[0].kind.kind} ${first}${sides}`, keys.join(", "), sides === "" ? meant(last, keys, `${first}.${side === undefined ? "" : `${side}.`}`) : undefined);
}

function keyOf({ kind, side }: RawEntry, name: string) {
  return kind.keys.find((record) => record.name === name && (record.side === undefined || record.side === side));
}

/** Overrides by what they replace, and what is wrong with their addresses; of two for one address the later counts. */
export function sortOverrides(overrides: readonly Override[], target: (address: string) => Target): { sorted: Overrides; refused: LocatedProblem[] } {
  const surroundings = new Map<string, Override>();
  const lets = new Map<string, Override>();
  const keys = new Map<RawEntry, Map<string, Override>>();
  let flow: Override | undefined;
  const refused: LocatedProblem[] = [];
  for (const override of overrides) {
    try {
      const named = target(override.address);
      if (named.at === "flow") flow = override;
      else if (named.at === "surroundings") surroundings.set(named.key.name, override);
      else if (named.at === "let") lets.set(named.name, override);
      else keys.set(named.entry, (keys.get(named.entry) ?? new Map<string, Override>()).set(named.key, override));
    } catch (error) {
      if (!(error instanceof InputError)) throw error;
      refused.push(...error.problems.map((problem) => ({ ...problem, place: `--set ${override.address}=${override.value}` })));
    }
  }
  return { sorted: { ...(flow === undefined ? {} : { flow }), surroundings, let: lets, keys }, refused };
}

/**
 * What an address measures and what the file gives for it.
 * @throws InputError where no number stands there
 */
export function addressed(address: string, raw: RawFile, target: Target, evaluation: Evaluation): Addressed {
  const about = (at: Given | undefined, asked: { dimension?: Measure; range: NumberKey["range"]; help: string }): Addressed => {
    const quantity = at === undefined ? null : target.at === "let" ? evaluation.get(target.name) : evaluation.quantity(at, address, []);
    const dimension = asked.dimension ?? measureOf(quantity ?? undefined);
    return { address, dimension, range: asked.range, given: quantity?.value, unit: quantity?.unit, help: asked.help };
  };
  switch (target.at) {
    case "flow":
      return about(raw.flow, { dimension: "flow", range: FLOW_RANGE, help: "flow at the compressor's inlet" });
    case "surroundings":
      return about(raw.surroundings.get(target.key.name), target.key);
    case "let":
      return about(raw.let.get(target.name), { range: {}, help: `${target.name} under let` });
    case "key": {
      const { entry, key, record } = target;
      if (record !== undefined) return about(entry.values.get(key), record);
      const at = entry.values.get(key);
      const found = `${key}, which is no number${at === undefined ? "" : ` (${written(at)})`}`;
      throw new InputError([{ code: "not-a-number", place: address, line: 0, column: 0, found, expected: "the address of a number" }]);
    }
  }
}

/** What a named quantity measures: any flow can stand in a flow's place. */
function measureOf(quantity: Quantity | undefined): Measure {
  if (quantity === undefined) return "fraction";
  if (quantity.kind.endsWith("flow")) return "flow";
  return quantity.scale === "difference" && (quantity.kind === "temperature" || quantity.kind === "pressure") ? `${quantity.kind} difference` : quantity.kind;
}

/** The addresses of every number that a file gives, in its order. */
export function addressesOf(raw: RawFile): string[] {
  const ofBlocks = entriesOf(raw).flatMap((entry) =>
    [...entry.values.keys()].flatMap((key) => {
      const record = keyOf(entry, key);
      if (record?.type !== "number" || entry.name === "") return [];
      const several = entry.side !== undefined && entry.kind.keys.filter(({ name, side }) => name === key && side === undefined).length > 0;
      return several ? `${entry.name}.${entry.side}.${key}` : `${entry.name}.${key}`;
    }),
  );
  return [
    ...(raw.flow === undefined ? [] : ["flow"]),
    ...Array.from(raw.surroundings.keys(), (key) => `surroundings.${key}`),
    ...Array.from(raw.let.keys(), (name) => `let.${name}`),
    ...ofBlocks,
  ];
}
