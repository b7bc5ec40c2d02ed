import type { BlockDefinition, Value } from "../blocks/definition.js";
import type { Key } from "../blocks/keys.js";
import type { Problem } from "../blocks/problem.js";
import type { CycleDefinition, Flow } from "../cycle/definition.js";
import { planProblems } from "../cycle/plan.js";
import { fluidNames } from "../fluids/registry.js";
import type { Complaint, Document } from "./document.js";
import type { LocatedProblem } from "./errors.js";
import { nearest } from "./nearest.js";
import { accepted, misfit, type Quantity } from "./quantity.js";
import type { RawEntry, RawFile, RawValue } from "./raw.js";
import { isQuantity, keyComplaint, quantityOf, type Context, type Evaluate } from "./values.js";

/** A value put in place of one in the file, or beside those there. */
export interface Override {
  readonly address: string;
  /** An expression with units, or a number in SI units. */
  readonly value: string | number;
}

/** Overrides by what they replace. */
export interface Overrides {
  readonly flow?: Override;
  readonly surroundings: ReadonlyMap<string, Override>;
  readonly let: ReadonlyMap<string, Override>;
  readonly keys: ReadonlyMap<RawEntry, ReadonlyMap<string, Override>>;
}

const DEFAULT_SURROUNDINGS = { temperature: 293.15, pressure: 101325, relativeHumidity: 0.5 };
/** 0 degC, 101.325 kPa: DIN 1343. */
const NORMAL = { temperature: 273.15, pressure: 101325 };
/** 60 degF, 14.696 psi. */
const STANDARD = { temperature: 288.705556, pressure: 14.696 * 6894.757293168361 };

/** The definition that a file means with overrides applied; faults go to `problems`, and the result is then of no use. */
export function define(document: Document, raw: RawFile, overrides: Overrides, evaluate: Evaluate | undefined, problems: LocatedProblem[]): CycleDefinition {
  const complain = (at: RawValue | RawEntry | Override, complaint: Complaint): void => {
    problems.push("address" in at ? fromSetting(at, complaint) : document.problem(at.node, complaint));
  };
  const scope = new Map<string, Quantity>();
  const spoilt = new Set<string>();
  const read = (at: RawValue | Override | undefined, surroundingsPressure: number): Quantity | null => {
    if (at === undefined) return null;
    const given = "address" in at ? at.value : at.text;
    if (typeof given === "number") return { value: given, kind: "fraction", unit: "SI" };
    const context: Context = { scope, spoilt, surroundingsPressure, evaluate };
    const result = quantityOf(given, context);
    if (isQuantity(result)) return result;
    if (result !== null) complain(at, result);
    return null;
  };

  const surroundings = { ...DEFAULT_SURROUNDINGS };
  for (const [key, name, dimension, range] of SURROUNDINGS) {
    const at = overrides.surroundings.get(key) ?? raw.surroundings.get(key);
    const value = number(read(at, DEFAULT_SURROUNDINGS.pressure), at, dimension, range, DEFAULT_SURROUNDINGS.pressure, complain);
    if (value !== undefined) surroundings[name] = value;
  }
  const ambient = surroundings.pressure;
  for (const [name, at] of raw.let) {
    const given = overrides.let.get(name);
    const quantity = read(given ?? at, ambient);
    if (quantity === null) spoilt.add(name);
    else scope.set(name, quantity.unit === "SI" ? inKindOf(at, quantity, scope, ambient, evaluate) : quantity);
  }

  const entryOf = new Map<BlockDefinition, RawEntry>();
  const keyNodes = new Map<BlockDefinition, ReadonlyMap<string, RawValue | Override>>();
  const block = (entry: RawEntry): BlockDefinition => {
    const given = keysOf(entry, overrides.keys.get(entry));
    const values: Record<string, Value> = {};
    for (const key of entry.kind.keys) {
      if (key.side !== undefined && key.side !== entry.side) continue;
      const at = given.get(key.name);
      const value = at === undefined ? defaultOf(key) : valueOf(key, at, entry, ambient, read, complain);
      if (value !== undefined) values[key.name] = value;
    }
    if (!entry.misspelt) missingKeys(entry, given, complain);
    const definition: BlockDefinition = { kind: entry.kind.kind, name: entry.name, ...(entry.side === undefined ? {} : { side: entry.side }), values };
    entryOf.set(definition, entry);
    keyNodes.set(definition, given);
    return definition;
  };
  const loop = raw.loop.map(block);
  const branches = Object.fromEntries([...raw.branches].map(([name, entries]) => [name, entries.map(block)]));

  const fluid = raw.fluid.text;
  if (!fluidNames.includes(fluid)) {
    const suggestion = nearest(fluid, fluidNames);
    complain(raw.fluid, { code: "unknown-fluid", found: `the unknown fluid "${fluid}"`, expected: fluidNames.join(", "), ...(suggestion === undefined ? {} : { suggestion }) });
  }
  const flowAt = overrides.flow ?? raw.flow;
  const flow = flowOf(read(flowAt, ambient), flowAt, () => read(raw.flow, ambient), complain);
  const definition: CycleDefinition = {
    title: raw.title?.text ?? document.file,
    fluid,
    surroundings,
    circuit: raw.circuit?.text === "open" ? "open" : "closed",
    flow,
    loop,
    branches,
  };
  if (problems.length > 0) return definition;
  for (const entries of byBlock([...loop, ...Object.values(branches).flat()])) {
    for (const problem of entryOf.get(entries[0])?.kind.check?.(entries, { surroundings }) ?? []) locate(problem);
  }
  planProblems(definition).forEach(locate);
  return definition;

  function locate({ code, entry, key, found, expected }: Problem): void {
    const rawEntry = entry === undefined ? undefined : entryOf.get(entry);
    const at = entry === undefined || key === undefined ? undefined : keyNodes.get(entry)?.get(key);
    const label = rawEntry === undefined ? "" : `${rawEntry.kind.kind} ${rawEntry.name}: `;
    const complaint = { code, found: `${label}${found}`, expected };
    if (at !== undefined) complain(at, complaint);
    else if (rawEntry !== undefined) complain(rawEntry, complaint);
    else problems.push(document.problem(key === "surroundings" ? (raw.surroundings.values().next().value?.node ?? raw.loopNode) : raw.loopNode, complaint));
  }
}

const SURROUNDINGS = [
  ["pressure", "pressure", "pressure", { lowest: 0, open: "lowest" }],
  ["temperature", "temperature", "temperature", { lowest: 0, open: "lowest" }],
  ["relative-humidity", "relativeHumidity", "fraction", { lowest: 0, highest: 1 }],
] as const;

type Complain = (at: RawValue | RawEntry | Override, complaint: Complaint) => void;

function fromSetting({ address, value }: Override, complaint: Complaint): LocatedProblem {
  return { ...complaint, place: `--set ${address}=${value}`, line: 0, column: 0 };
}

/** The values of an entry with overrides in their place; an override of one alternative puts out the other. */
function keysOf(entry: RawEntry, overridden: ReadonlyMap<string, Override> | undefined): ReadonlyMap<string, RawValue | Override> {
  if (overridden === undefined) return entry.values;
  const given = new Map<string, RawValue | Override>(entry.values);
  const alternative = (name: string): string | undefined => {
    const key = entry.kind.keys.find((record) => record.name === name);
    return key?.type === "number" ? key.alternative : undefined;
  };
  for (const [name, override] of overridden) {
    const group = alternative(name);
    for (const other of given.keys()) if (group !== undefined && alternative(other) === group) given.delete(other);
    given.set(name, override);
  }
  return given;
}

function defaultOf(key: Key): Value | undefined {
  return key.type === "block" ? undefined : key.default;
}

function valueOf(
  key: Key,
  at: RawValue | Override,
  entry: RawEntry,
  ambient: number,
  read: (at: RawValue | Override, ambient: number) => Quantity | null,
  complain: Complain,
): Value | undefined {
  if (key.type === "number") {
    return number(read(at, ambient), at, key.dimension, key.range, ambient, (place, complaint) =>
      complain(place, { ...complaint, found: `${entry.kind.kind} ${entry.name} ${key.name}: ${complaint.found}` }),
    );
  }
  const text = String("address" in at ? at.value : at.text).trim();
  if (key.type === "block") return text;
  if (text === "true" || text === "false") return text === "true";
  complain(at, { code: "flag", found: `${entry.kind.kind} ${entry.name} ${key.name}: "${text}"`, expected: "true or false" });
  return undefined;
}

function number(
  quantity: Quantity | null,
  at: RawValue | Override | undefined,
  dimension: Parameters<typeof misfit>[1],
  range: Parameters<typeof keyComplaint>[3],
  ambient: number,
  complain: Complain,
): number | undefined {
  if (quantity === null || at === undefined) return undefined;
  const fitting = quantity.unit === "SI" ? { value: quantity.value, kind: accepted(dimension).kinds[0] } : quantity;
  const complaint = keyComplaint(fitting, String("address" in at ? at.value : at.text), dimension, range, ambient);
  if (complaint === null) return quantity.value;
  complain(at, complaint);
  return undefined;
}

/** A number in SI units put under a let name measures what the value in the file measures. */
function inKindOf(at: RawValue, { value }: Quantity, scope: ReadonlyMap<string, Quantity>, surroundingsPressure: number, evaluate: Evaluate | undefined): Quantity {
  const original = quantityOf(at.text, { scope, spoilt: new Set(), surroundingsPressure, evaluate });
  return { value, kind: isQuantity(original) ? original.kind : "fraction" };
}

function missingKeys(entry: RawEntry, given: ReadonlyMap<string, unknown>, complain: Complain): void {
  const { kind, name, side } = entry;
  const here = kind.keys.filter((key) => key.side === undefined || key.side === side);
  for (const key of here) {
    if (key.type === "number" && key.required === true && !given.has(key.name)) {
      complain(entry, { code: "missing-key", found: `${kind.kind} ${name} without ${key.name}`, expected: `${key.name}: ${key.help}` });
    }
  }
  for (const alternative of kind.alternatives) {
    if (alternative.side !== undefined && alternative.side !== side) continue;
    const group = here.filter((key) => key.type === "number" && key.alternative === alternative.name).map((key) => key.name);
    const chosen = group.filter((key) => given.has(key));
    const names = `${group.slice(0, -1).join(", ")} or ${group.at(-1)}`;
    if (chosen.length > 1) complain(entry, { code: "alternatives", found: `${kind.kind} ${name} with ${chosen.join(" and ")}`, expected: `only one of ${names}` });
    if (chosen.length === 0 && alternative.optional !== true) complain(entry, { code: "missing-key", found: `${kind.kind} ${name} with none of ${group.join(", ")}`, expected: `one of ${names}` });
  }
}

/** A number in SI units put in the flow's place is of the kind of flow that the file gives. */
function flowOf(quantity: Quantity | null, at: RawValue | Override, written: () => Quantity | null, complain: Complain): Flow {
  const nothing: Flow = { kind: "mass", value: NaN };
  if (quantity === null) return nothing;
  if (quantity.unit === "SI") {
    const original = written();
    return original === null ? nothing : { ...flowLike(original), value: quantity.value };
  }
  const complaint = keyComplaint(quantity, String("address" in at ? at.value : at.text), "flow", { lowest: 0, open: "lowest" }, 0);
  if (complaint !== null) {
    complain(at, complaint);
    return nothing;
  }
  return flowLike(quantity);
}

function flowLike({ kind, value }: Quantity): Flow {
  switch (kind) {
    case "molar flow":
      return { kind: "molar", value };
    case "normal volume flow":
      return { kind: "reference volume", value, ...NORMAL };
    case "standard volume flow":
      return { kind: "reference volume", value, ...STANDARD };
    case "volume flow":
      return { kind: "inlet volume", value };
    default:
      return { kind: "mass", value };
  }
}

function byBlock(entries: readonly BlockDefinition[]): BlockDefinition[][] {
  const groups = new Map<string, BlockDefinition[]>();
  for (const entry of entries) groups.set(entry.name, [...(groups.get(entry.name) ?? []), entry]);
  return [...groups.values()];
}
