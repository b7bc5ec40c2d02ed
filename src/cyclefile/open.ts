import type { CycleDefinition } from "../cycle/definition.js";
import { addressed, addressesOf, resolve, sortOverrides, type Addressed } from "./address.js";
import { Definer } from "./define.js";
import { Document } from "./document.js";
import { InputError, inOrder, type LocatedProblem } from "./errors.js";
import { written, type Given, type Override } from "./override.js";
import { needsExpression } from "./quantity.js";
import { entriesOf } from "./raw.js";
import { structureProblems } from "./structure.js";
import { readRaw } from "./top-level.js";
import type { Evaluate } from "./values.js";

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
   * @throws InputError with the nearest address, or with the faults of the file's form where it has any
   */
  address(address: string): Addressed;
  /** The addresses of every number that the file gives. */
  addresses(): string[];
  /** Whether evaluating the file, with overrides, takes the evaluator of expressions. */
  needsExpressions(overrides?: readonly Override[]): boolean;
  /** Gives the evaluator of expressions, which is large and loaded only when needed. */
  useEvaluator(evaluate: Evaluate): void;
}

/**
 * Reads a cycle file's text as far as it can be read without evaluating anything.
 *
 * @param file the name that messages give it
 * @param evaluator without it, a text that holds expressions cannot be defined until `useEvaluator` has given one
 * @throws InputError where the text is no YAML map; all other faults are told by `define`
 */
export function openCycleFile(text: string, file: string, evaluator?: Evaluate): CycleFile {
  const document = new Document(text, file);
  const faults: LocatedProblem[] = [...document.problems];
  const raw = readRaw(document, faults);
  const structure = structureProblems(document, raw);
  faults.push(...structure);
  let evaluate = evaluator;
  const definer = new Definer(document, raw, faults, raw.whole && raw.fluid !== undefined && structure.length === 0, () => evaluate);
  const targets = new Map<string, ReturnType<typeof resolve>>();
  const target = (address: string): ReturnType<typeof resolve> => {
    const known = targets.get(address) ?? resolve(address, raw);
    targets.set(address, known);
    return known;
  };
  const values: readonly Given[] = [
    ...(raw.flow === undefined ? [] : [raw.flow]),
    ...raw.surroundings.values(),
    ...raw.let.values(),
    ...entriesOf(raw).flatMap((entry) => [...entry.values.values()]),
  ];

  return {
    file,
    define(overrides = []) {
      const { sorted, refused } = sortOverrides(overrides, target);
      return definer.define(sorted, refused);
    },
    address(address) {
      // What seems to be missing may be what the file misspells.
      if (faults.length > 0) throw new InputError(inOrder(faults));
      return addressed(address, raw, target(address), definer.evaluation(sortOverrides([], target).sorted));
    },
    addresses: () => addressesOf(raw),
    needsExpressions: (overrides = []) => [...values, ...overrides].map(written).some((each) => typeof each === "string" && needsExpression(each)),
    useEvaluator(given) {
      evaluate = given;
    },
  };
}
