import type { Dimension } from "../blocks/keys.js";
import type { CycleDefinition } from "../cycle/definition.js";
import { resolve, sortOverrides, type Addressed } from "./address.js";
import { define, type Override } from "./define.js";
import { Document } from "./document.js";
import { InputError, type LocatedProblem } from "./errors.js";
import { needsExpression, type Quantity } from "./quantity.js";
import { readRaw, type RawEntry, type RawFile, type RawValue } from "./raw.js";
import { shapeProblems } from "./shape.js";
import { structureProblems } from "./structure.js";
import type { UnitKind } from "./units.js";
import { isQuantity, quantityOf, type Evaluate } from "./values.js";

/** A cycle file, read once and ready to be evaluated with any values put in place of those written. */
export interface CycleFile {
  readonly file: string;
  /**
   * The checked definition, with overrides applied in their order.
   * @throws InputError with every fault at once
   */
  define(overrides?: readonly Override[]): CycleDefinition;
  /**
   * What an address stands for.
   * @throws InputError with the nearest address
   */
  address(address: string): Addressed;
  /** Whether evaluating the file, with overrides, takes the evaluator of expressions. */
  needsExpressions(overrides?: readonly Override[]): boolean;
  /** Gives the evaluator of expressions, which is large and loaded only when needed. */
  useEvaluator(evaluate: Evaluate): void;
}

/**
 * Reads a cycle file's text as far as it can be read without evaluating anything.
 *
 * @param file the name that messages give it
 * @throws InputError with every fault of form at once
 */
export function openCycleFile(text: string, file: string, evaluator?: Evaluate): CycleFile {
  const document = new Document(text, file);
  const misshapen = shapeProblems(document);
  if (misshapen.length > 0) throw new InputError(ordered(misshapen));
  const faults: LocatedProblem[] = [];
  const raw = readRaw(document, faults);
  faults.push(...structureProblems(document, raw));
  let evaluate = evaluator;

  return {
    file,
    define(overrides = []) {
      const sorted = sortOverrides(overrides, raw);
      const problems = [...faults];
      const definition = define(document, raw, sorted, evaluate, problems);
      if (problems.length > 0) throw new InputError(ordered(problems));
      return definition;
    },
    address: (address) => addressed(address, raw, evaluate),
    needsExpressions: (overrides = []) =>
      [...valuesOf(raw)].some(({ text: value }) => needsExpression(value)) ||
      overrides.some(({ value }) => typeof value === "string" && needsExpression(value)),
    useEvaluator(given) {
      evaluate = given;
    },
  };
}

function* valuesOf(raw: RawFile): Generator<RawValue> {
  yield raw.flow;
  yield* raw.surroundings.values();
  yield* raw.let.values();
  const entries: RawEntry[] = [...raw.loop, ...[...raw.branches.values()].flat()];
  for (const entry of entries) yield* entry.values.values();
}

function ordered(problems: readonly LocatedProblem[]): LocatedProblem[] {
  const seen = new Set<string>();
  return problems
    .toSorted((a, b) => a.line - b.line || a.column - b.column)
    .filter(({ place, found }) => !seen.has(`${place} ${found}`) && seen.add(`${place} ${found}`));
}

function addressed(address: string, raw: RawFile, evaluate: Evaluate | undefined): Addressed {
  const target = resolve(address, raw);
  const scope = new Map<string, Quantity>();
  const read = (at: RawValue | undefined): Quantity | undefined => {
    if (at === undefined) return undefined;
    const result = quantityOf(at.text, { scope, spoilt: new Set(), surroundingsPressure: 101325, evaluate });
    return isQuantity(result) ? result : undefined;
  };
  for (const [name, at] of raw.let) {
    const quantity = read(at);
    if (quantity !== undefined) scope.set(name, quantity);
  }
  const about = (at: RawValue | undefined, dimension: Addressed["dimension"], range: Addressed["range"], help: string): Addressed => {
    const quantity = read(at);
    return { address, dimension, range, given: quantity?.value, unit: quantity?.unit, help };
  };
  const positive = { lowest: 0, open: "lowest" } as const;
  switch (target.at) {
    case "flow":
      return about(raw.flow, "flow", positive, "flow at the compressor's inlet");
    case "surroundings":
      return target.key === "relative-humidity"
        ? about(raw.surroundings.get(target.key), "fraction", { lowest: 0, highest: 1 }, "relative humidity of the surroundings")
        : about(raw.surroundings.get(target.key), target.key as Dimension, positive, `${target.key} of the surroundings`);
    case "let": {
      const at = raw.let.get(target.name);
      return about(at, dimensionOfKind(read(at)?.kind ?? "fraction"), {}, `${target.name} under let`);
    }
    case "key": {
      const { entry, key, record } = target;
      if (record === undefined) {
        throw new InputError([{ code: "not-a-number", place: address, line: 0, column: 0, found: `${key}, which is no number`, expected: "the address of a number" }]);
      }
      return about(entry.values.get(key), record.dimension, record.range, record.help);
    }
  }
}

/** The dimension in which a named quantity is shown and swept. */
function dimensionOfKind(kind: UnitKind): Addressed["dimension"] {
  return kind.endsWith("flow") ? "flow" : (kind as Dimension);
}
