/** Values of a polynomial, lowest power first, by Horner's scheme. */
export function polynomial(coefficients: ArrayLike<number>, x: number): number {
  let value = 0;
  for (let i = coefficients.length - 1; i >= 0; i--) value = value * x + coefficients[i];
  return value;
}

/** A polynomial through points of a smooth function, as a starting value for its inverse or for the function itself. */
export class Interpolant {
  private readonly factors: Float64Array;
  private readonly nodes: Float64Array;

  /** Through (x, y) pairs with distinct x, in Newton's form. */
  constructor(x: readonly number[], y: readonly number[]) {
    this.nodes = Float64Array.from(x);
    const differences = Float64Array.from(y);
    for (let order = 1; order < x.length; order++) {
      for (let i = x.length - 1; i >= order; i--) {
        differences[i] = (differences[i] - differences[i - 1]) / (x[i] - x[i - order]);
      }
    }
    this.factors = differences;
  }

  at(x: number): number {
    const { nodes, factors } = this;
    let value = factors[factors.length - 1];
    for (let i = factors.length - 2; i >= 0; i--) value = value * (x - nodes[i]) + factors[i];
    return value;
  }
}

/** Points between two ends at which an interpolating polynomial errs about equally everywhere (Chebyshev's). */
export function chebyshevNodes(low: number, high: number, count: number): number[] {
  return Array.from(
    { length: count },
    (_, i) => 0.5 * (low + high) - 0.5 * (high - low) * Math.cos((Math.PI * (i + 0.5)) / count),
  );
}
