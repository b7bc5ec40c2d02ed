import type { Dimension, NumberKey } from "../blocks/keys.js";
import type { Override, Overrides } from "./define.js";
import { InputError } from "./errors.js";
import { nearest } from "./nearest.js";
import type { RawEntry, RawFile } from "./raw.js";

/** What an address stands for. */
export type Target =
  | { readonly at: "flow" }
  | { readonly at: "surroundings"; readonly key: string }
  | { readonly at: "let"; readonly name: string }
  | { readonly at: "key"; readonly entry: RawEntry; readonly key: string; readonly record: NumberKey | undefined };

const SURROUNDINGS_KEYS = ["temperature", "pressure", "relative-humidity"];

/**
 * The place in a file that an address names: NAME.key, NAME.side.key, flow, let.NAME or surroundings.KEY.
 * @throws InputError with the nearest address
 */
export function resolve(address: string, raw: RawFile): Target {
  const refuse = (found: string, expected: string, suggestion?: string): never => {
    throw new InputError([
      { code: "unknown-address", place: address, line: 0, column: 0, found, expected, ...(suggestion === undefined ? {} : { suggestion }) },
    ]);
  };
  if (address === "flow") return { at: "flow" };
  const [first, ...rest] = address.split(".");
  if (first === "let") {
    const [name = ""] = rest;
    if (rest.length === 1 && raw.let.has(name)) return { at: "let", name };
    return refuse(`no name "${name}" under let`, [...raw.let.keys()].join(", ") || "a file with names under let", nearest(name, raw.let.keys()));
  }
  if (first === "surroundings") {
    const [key = ""] = rest;
    if (rest.length === 1 && SURROUNDINGS_KEYS.includes(key)) return { at: "surroundings", key };
    return refuse(`no "${key}" of the surroundings`, SURROUNDINGS_KEYS.join(", "), nearest(key, SURROUNDINGS_KEYS));
  }
  const entries = [...raw.loop, ...[...raw.branches.values()].flat()];
  const named = entries.filter(({ name }) => name === first);
  if (named.length === 0) {
    const names = [...new Set(entries.map(({ name }) => name))];
    return refuse(`no block "${first}"`, `one of ${names.join(", ")}, or flow, let.NAME, surroundings.KEY`, nearest(first, [...names, "flow"]));
  }
  const [side, key] = rest.length === 2 ? [rest[0], rest[1]] : [undefined, rest[0] ?? ""];
  if (rest.length === 0 || rest.length > 2) return refuse(`"${address}"`, `${first}.KEY`);
  const allows = (entry: RawEntry): boolean =>
    (side === undefined || entry.side === side) && entry.kind.keys.some((record) => record.name === key && (record.side === undefined || record.side === entry.side));
  const candidates = named.filter(allows);
  const given = candidates.filter(({ values }) => values.has(key));
  const entry = candidates.length === 1 ? candidates[0] : given.length === 1 ? given[0] : undefined;
  if (entry !== undefined) {
    const record = entry.kind.keys.find((each) => each.name === key && (each.side === undefined || each.side === entry.side));
    return { at: "key", entry, key, record: record?.type === "number" ? record : undefined };
  }
  if (candidates.length > 1) return refuse(`"${address}", which both sides have`, candidates.map((each) => `${first}.${each.side}.${key}`).join(" or "));
  const keys = [...new Set(named[0].kind.keys.map((record) => record.name))];
  return refuse(`no key "${key}" of ${named[0].kind.kind} ${first}`, keys.join(", "), nearest(key, keys));
}

/**
 * Overrides sorted by what they replace; of two for one address the later counts.
 * @throws InputError with every address that names nothing
 */
export function sortOverrides(overrides: readonly Override[], raw: RawFile): Overrides {
  const surroundings = new Map<string, Override>();
  const lets = new Map<string, Override>();
  const keys = new Map<RawEntry, Map<string, Override>>();
  let flow: Override | undefined;
  const problems: InputError["problems"][number][] = [];
  for (const override of overrides) {
    try {
      const target = resolve(override.address, raw);
      if (target.at === "flow") flow = override;
      else if (target.at === "surroundings") surroundings.set(target.key, override);
      else if (target.at === "let") lets.set(target.name, override);
      else keys.set(target.entry, new Map([...(keys.get(target.entry) ?? []), [target.key, override]]));
    } catch (error) {
      if (!(error instanceof InputError)) throw error;
      problems.push(...error.problems.map((problem) => ({ ...problem, place: `--set ${override.address}=${override.value}` })));
    }
  }
  if (problems.length > 0) throw new InputError(problems);
  return { ...(flow === undefined ? {} : { flow }), surroundings, let: lets, keys };
}

/** An addressable number: what it measures, its legal range and what the file gives. */
export interface Addressed {
  readonly address: string;
  readonly dimension: Dimension | "flow";
  readonly range: NumberKey["range"];
  /** SI; undefined where the file leaves it out */
  readonly given: number | undefined;
  /** The unit as written; undefined for a bare number, an expression, or a value left out. */
  readonly unit: string | undefined;
  readonly help: string;
}
