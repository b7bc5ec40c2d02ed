/** What kind of mistake a fluid error names; stable, for programs to test. */
export type FluidErrorCode = "out-of-range" | "not-finite" | "unknown-fluid" | "no-convergence" | "no-correlation" | "unknown-input";

/** Any error that the property engine throws. */
export class FluidError extends Error {
  constructor(
    readonly code: FluidErrorCode,
    /** The fluid's name, as asked for. */
    readonly fluid: string,
    message: string,
  ) {
    super(`${fluid}: ${message}`);
    this.name = new.target.name;
  }
}

/** The limits that a value broke, in SI units. */
export interface Range {
  readonly quantity: string;
  readonly value: number;
  readonly minimum: number;
  readonly maximum: number;
  readonly unit: string;
  /** What happens beyond the limit that was broken, as a clause: "where it freezes". */
  readonly reason?: string;
  /** What holds the limit: "the equation holds". */
  readonly subject?: string;
}

/** A value outside the range in which the equations hold. No number is given for it. */
export class OutOfRangeError extends FluidError {
  readonly quantity: string;
  readonly value: number;
  readonly minimum: number;
  readonly maximum: number;
  readonly unit: string;

  constructor(fluid: string, range: Range) {
    const { quantity, value, minimum, maximum, unit } = range;
    const limit = value > maximum ? `above ${show(maximum)}` : `${value < minimum ? "below" : "not above"} ${show(minimum)}`;
    const reason = range.reason === undefined ? "" : `, ${range.reason}`;
    const subject = range.subject ?? "the equation holds";
    super(
      "out-of-range",
      fluid,
      `${quantity} ${show(value)} ${unit} is ${limit} ${unit}${reason}; ${subject} from ${show(minimum)} to ${show(maximum)} ${unit}`,
    );
    this.quantity = quantity;
    this.value = value;
    this.minimum = minimum;
    this.maximum = maximum;
    this.unit = unit;
  }
}

/** A value that is not a number, or infinite. */
export class NotFiniteError extends FluidError {
  constructor(
    fluid: string,
    readonly quantity: string,
    readonly value: number,
  ) {
    super("not-finite", fluid, `${quantity} must be a finite number, not ${value}`);
  }
}

/** A fluid that no equation is known for. */
export class UnknownFluidError extends FluidError {
  constructor(
    fluid: string,
    readonly known: readonly string[],
  ) {
    super("unknown-fluid", fluid, `no such fluid; known are ${known.join(", ")}`);
  }
}

/** An iteration that did not reach its tolerance. No number is given for it. */
export class NoConvergenceError extends FluidError {
  constructor(
    fluid: string,
    /** What was sought, with the inputs: "density at 120 K and 300000 Pa". */
    readonly sought: string,
  ) {
    super("no-convergence", fluid, `found no ${sought}`);
  }
}

/** A property for which no published correlation is at hand, there or at all. */
export class NoCorrelationError extends FluidError {
  constructor(
    fluid: string,
    readonly quantity: string,
    reason: string,
  ) {
    super("no-correlation", fluid, `no ${quantity}: ${reason}`);
  }
}

/** Enough digits to see on which side of a limit a value lies. */
function show(value: number): string {
  return String(Number(value.toPrecision(10)));
}
