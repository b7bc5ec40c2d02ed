import type { BlockDefinition } from "../blocks/definition.js";
import type { Problem } from "../blocks/problem.js";
import type { CycleDefinition, Flow } from "../cycle/definition.js";
import { planProblems } from "../cycle/plan.js";
import { isConstant, labelOf, readBlock, type Block } from "./block.js";
import type { Document } from "./document.js";
import { InputError, inOrder, type LocatedProblem } from "./errors.js";
import { Evaluation } from "./evaluation.js";
import { located, written, type Given, type Overrides } from "./override.js";
import { fits, type Quantity } from "./quantity.js";
import { entriesOf, type RawEntry, type RawFile } from "./raw.js";
import type { Evaluate } from "./values.js";

export type { Override } from "./override.js";

/** 0 degC, 101.325 kPa: DIN 1343. */
const NORMAL = { temperature: 273.15, pressure: 101325 };
/** 60 degF, 14.696 psi. */
const STANDARD = { temperature: 288.705556, pressure: 14.696 * 6894.757293168361 };
/** The range of a flow. */
export const FLOW_RANGE = { lowest: 0, open: "lowest" } as const;

/** Turns a file into definitions; what overrides leave as it is, is evaluated once. */
export class Definer {
  private asWritten: Evaluation | undefined;
  private readonly blocksAsWritten = new Map<RawEntry, Block>();
  private readonly constantBlocks = new Map<RawEntry, Block>();
  private readonly constant: ReadonlySet<RawEntry>;

  constructor(
    private readonly document: Document,
    private readonly raw: RawFile,
    /** Faults found before anything was evaluated. */
    private readonly faults: readonly LocatedProblem[],
    /** Whether the loop's make-up is free of faults, so that the gas can be followed through it. */
    private readonly followable: boolean,
    private readonly evaluator: () => Evaluate | undefined,
  ) {
    this.constant = new Set(entriesOf(raw).filter(isConstant));
  }

  /** The names and surroundings with overrides in place. */
  evaluation(overrides: Overrides): Evaluation {
    const evaluate = (): Evaluation => new Evaluation(this.document, this.raw, overrides, this.evaluator());
    if (overrides.let.size > 0 || overrides.surroundings.size > 0) return evaluate();
    return (this.asWritten ??= evaluate());
  }

  /**
   * The definition with overrides in place.
   * @throws InputError with every fault at once
   */
  define(overrides: Overrides, refused: readonly LocatedProblem[]): CycleDefinition {
    const { raw } = this;
    const evaluation = this.evaluation(overrides);
    const problems: LocatedProblem[] = [...this.faults, ...refused, ...evaluation.problems];
    const blocks = new Map<BlockDefinition, Block>();
    const define = (entry: RawEntry): BlockDefinition => {
      const block = this.block(entry, overrides, evaluation);
      blocks.set(block.definition, block);
      problems.push(...block.problems);
      return block.definition;
    };
    const loop = raw.loop.map(define);
    const branches = Object.fromEntries(Array.from(raw.branches, ([name, entries]) => [name, entries.map(define)]));
    const flowGiven = overrides.flow ?? raw.flow;
    const flow = flowGiven === undefined ? undefined : this.flow(flowGiven, evaluation, problems);
    const definition: CycleDefinition = {
      title: raw.title ?? this.document.file,
      fluid: raw.fluid ?? "",
      surroundings: evaluation.surroundings,
      circuit: raw.circuit,
      flow: flow ?? { kind: "mass", value: NaN },
      loop,
      branches,
    };
    for (const problem of this.crossChecks(definition, blocks)) problems.push(this.locate(problem, blocks, overrides));
    if (problems.length > 0) throw new InputError(inOrder(problems));
    return definition;
  }

  private block(entry: RawEntry, overrides: Overrides, evaluation: Evaluation): Block {
    const read = (): Block => readBlock(this.document, this.raw, entry, overrides.keys.get(entry), evaluation);
    if (overrides.keys.has(entry)) return read();
    const kept = this.constant.has(entry) ? this.constantBlocks : evaluation === this.asWritten ? this.blocksAsWritten : undefined;
    const known = kept?.get(entry);
    if (known !== undefined) return known;
    const block = read();
    kept?.set(entry, block);
    return block;
  }

  /** Checks between values, of what is free of faults so far: no fault is told a second time by its consequences. */
  private crossChecks(definition: CycleDefinition, blocks: ReadonlyMap<BlockDefinition, Block>): Problem[] {
    const sound = (entry: BlockDefinition | undefined): boolean => entry === undefined || blocks.get(entry)?.sound === true;
    const { surroundings } = definition;
    const problems: Problem[] = [];
    const surroundingsSound = !Object.values(surroundings).some(Number.isNaN);
    for (const entries of surroundingsSound ? byName(blocks.keys()) : []) {
      const kind = blocks.get(entries[0])?.entry.kind;
      const complete = entries.length === (kind?.sides?.length ?? 1) && entries.every((entry) => entry.kind === kind?.kind && sound(entry));
      if (complete) problems.push(...(kind?.check?.(entries, { surroundings }) ?? []));
    }
    const followable = this.followable && surroundingsSound && [...blocks.values()].every(({ linked, definition: { values } }) => linked && pressuresKnown(values));
    if (followable) problems.push(...planProblems(definition).filter(({ entry }) => sound(entry)));
    return problems;
  }

  private locate({ code, entry, key, found, expected }: Problem, blocks: ReadonlyMap<BlockDefinition, Block>, overrides: Overrides): LocatedProblem {
    const block = entry === undefined ? undefined : blocks.get(entry);
    if (block !== undefined) {
      const at = key === undefined ? undefined : block.given.get(key);
      return located(this.document, at ?? block.entry, { code, found: `${labelOf(block.entry)}: ${found}`, expected });
    }
    const set = key === "surroundings" ? overrides.surroundings.values().next().value : key === "flow" ? overrides.flow : undefined;
    const complaint = { code, found: key === undefined ? found : `${key}: ${found}`, expected };
    return set === undefined ? this.document.problem(this.raw.placeOf(key ?? "loop"), complaint) : located(this.document, set, complaint);
  }

  private flow(given: Given, evaluation: Evaluation, problems: LocatedProblem[]): Flow | undefined {
    const value = evaluation.number(given, { label: "flow", measure: "flow", range: FLOW_RANGE }, problems);
    if (value === undefined) return undefined;
    // A number in SI units is of the kind of flow that the file gives.
    const kindFrom = typeof written(given) === "number" ? this.raw.flow : given;
    const quantity = kindFrom === undefined ? null : evaluation.quantity(kindFrom, "flow", problems);
    return quantity === null || !fits(quantity.kind, "flow") ? undefined : flowLike(quantity.kind, value);
  }
}

function flowLike(kind: Quantity["kind"], value: number): Flow {
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

/** Whether the numbers that decide pressures are free of faults. */
function pressuresKnown(values: BlockDefinition["values"]): boolean {
  return Object.entries(values).every(([key, value]) => !Number.isNaN(value) || !key.includes("pressure"));
}

function byName(entries: Iterable<BlockDefinition>): [BlockDefinition, ...BlockDefinition[]][] {
  const groups = new Map<string, [BlockDefinition, ...BlockDefinition[]]>();
  for (const entry of entries) {
    const group = groups.get(entry.name);
    if (group === undefined) groups.set(entry.name, [entry]);
    else group.push(entry);
  }
  return [...groups.values()];
}
