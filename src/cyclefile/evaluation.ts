import type { NumberKey } from "../blocks/keys.js";
import type { Surroundings } from "../cycle/definition.js";
import type { Complaint, Document } from "./document.js";
import type { LocatedProblem } from "./errors.js";
import { located, written, type Given, type Overrides } from "./override.js";
import type { Measure, Quantity } from "./quantity.js";
import type { RawFile } from "./raw.js";
import { surroundingsKeys } from "./surroundings.js";
import { units } from "./units.js";
import { isQuantity, keyComplaint, quantityOf, rangeComplaint, type Evaluate, type Scope } from "./values.js";

/** What a number is asked for. */
export interface Asked {
  /** What messages call it: "expander T1 efficiency". */
  readonly label: string;
  readonly measure: Measure;
  readonly range: NumberKey["range"];
}

/** The names and surroundings of a file with overrides in place, each evaluated when it is first asked for. */
export class Evaluation implements Scope {
  /** What is wrong with the names and the surroundings. */
  readonly problems: LocatedProblem[] = [];
  /** NaN where a value is at fault */
  readonly surroundings: Surroundings;
  private readonly named = new Map<string, Quantity | null>();
  private readonly underway = new Set<string>();
  private pressure: number | undefined;

  constructor(
    private readonly document: Document,
    private readonly raw: RawFile,
    private readonly overrides: Overrides,
    private readonly evaluate: Evaluate | undefined,
  ) {
    for (const name of raw.let.keys()) this.get(name);
    const [temperature, pressure, relativeHumidity, carbonDioxide] = surroundingsKeys.map(({ name }) =>
      name === "pressure" ? this.surroundingsPressure() : this.surrounding(name),
    );
    this.surroundings = { temperature, pressure, relativeHumidity, carbonDioxide };
  }

  get(name: string): Quantity | null | undefined {
    const known = this.named.get(name);
    if (known !== undefined) return known;
    const inFile = this.raw.let.get(name);
    if (inFile === undefined) return undefined;
    const given = this.overrides.let.get(name) ?? inFile;
    const quantity = this.once(`let ${name}`, given, "a value that can be worked out from the others", () => this.namedQuantity(name, given)) ?? null;
    this.named.set(name, quantity);
    return quantity;
  }

  names(): Iterable<string> {
    return this.raw.let.keys();
  }

  surroundingsPressure(): number {
    const given = this.surroundingGiven("pressure");
    return (this.pressure ??= this.once("surroundings pressure", given, "an absolute unit: gauge units count from this pressure", () => this.surrounding("pressure")) ?? NaN);
  }

  /** The quantity that a value means; null where it is at fault, which goes to `problems`. */
  quantity(given: Given, label: string, problems: LocatedProblem[]): Quantity | null {
    const result = quantityOf(String(written(given)), this, this.evaluate);
    if (isQuantity(result)) return result;
    if (result !== null) problems.push(this.complaint(given, label, result));
    return null;
  }

  /** The number (SI) that a value means; undefined where it is at fault, which goes to `problems`. */
  number(given: Given, { label, measure, range }: Asked, problems: LocatedProblem[]): number | undefined {
    const value = written(given);
    const quantity = typeof value === "number" ? { value } : this.quantity(given, label, problems);
    if (quantity === null) return undefined;
    // A range is told in the unit as written.
    const gauge = "unit" in quantity && quantity.unit !== undefined && units[quantity.unit].gauge === true;
    const zero = gauge ? this.surroundingsPressure() : 0;
    const complaint = "kind" in quantity ? keyComplaint(quantity, String(value), measure, range, zero) : rangeComplaint(quantity, String(value), measure, range, zero);
    if (complaint === null) return quantity.value;
    problems.push(this.complaint(given, label, complaint));
    return undefined;
  }

  private complaint(given: Given, label: string, complaint: Complaint): LocatedProblem {
    return located(this.document, given, { ...complaint, found: `${label}: ${complaint.found}` });
  }

  private surroundingGiven(name: string): Given | undefined {
    return this.overrides.surroundings.get(name) ?? this.raw.surroundings.get(name);
  }

  private surrounding(name: string): number {
    const key = surroundingsKeys.find((each) => each.name === name) as (typeof surroundingsKeys)[number];
    const given = this.surroundingGiven(name);
    if (given === undefined) return key.default;
    return this.number(given, { label: `surroundings ${name}`, measure: key.dimension, range: key.range }, this.problems) ?? NaN;
  }

  private namedQuantity(name: string, given: Given): Quantity | null {
    const value = written(given);
    if (typeof value !== "number") return this.quantity(given, `let ${name}`, this.problems);
    // A number in SI units measures what the value in the file measures.
    const inFile = this.quantity(this.raw.let.get(name) as Given, `let ${name}`, this.problems);
    return inFile === null ? null : { value, kind: inFile.kind, ...(inFile.scale === undefined ? {} : { scale: inFile.scale }) };
  }

  /** Evaluates something, and complains where that takes its own value. */
  private once<T>(label: string, given: Given | undefined, expected: string, evaluate: () => T): T | undefined {
    if (this.underway.has(label)) {
      if (given !== undefined) this.problems.push(this.complaint(given, label, { code: "circle", found: "a value that depends on itself", expected }));
      return undefined;
    }
    this.underway.add(label);
    try {
      return evaluate();
    } finally {
      this.underway.delete(label);
    }
  }
}
