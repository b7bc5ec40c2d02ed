/** Powers of tau worth having for products, each the square of the one before, and roots, each the root of the one before. */
const SQUARES = [2, 4, 8, 16];
const ROOTS = [0.5, 0.25, 0.125];
/** Exponents are published with few decimals; a sum of two differs from a third by round-off only below this. */
const SAME = 1e-12;

/**
 * The powers of tau that the terms of an equation need, most of them as a product of two others instead of by an
 * exponential, which costs several times more.
 */
export class TauPowers {
  /** tau^t of the exponents asked for, in their order, after the last `set`; powers in between follow. */
  readonly values: Float64Array;

  private readonly tau: number;
  /** Place of 1/tau; beyond the last where none is needed. */
  private readonly inverse: number;
  /** Places of the exponentials, and their exponents. */
  private readonly exponential: Int32Array;
  private readonly exponents: Float64Array;
  /** Places of the roots, each of the one before, the first of tau. */
  private readonly roots: Int32Array;
  /** Three places a product: where it goes and what it is of. */
  private readonly products: Int32Array;

  constructor(wanted: readonly number[]) {
    const exponents = [...wanted];
    const place = (t: number): number => {
      const found = exponents.findIndex((other) => Math.abs(other - t) < SAME);
      return found >= 0 ? found : exponents.push(t) - 1;
    };
    const exponential: number[] = [];
    const products: number[] = [];
    const known = new Set([place(0), place(1)]);
    if (wanted.some((t) => t < 0 && t % 1 === 0)) known.add(place(-1));
    const finest = ROOTS.findLast((root) => wanted.some((t) => t % root === 0 && t % (2 * root) !== 0)) ?? 1;
    const roots = ROOTS.filter((root) => root >= finest).map(place);
    for (const root of roots) known.add(root);
    for (const square of SQUARES) {
      if (square >= Math.max(...wanted)) break;
      products.push(place(square), place(square / 2), place(square / 2));
      known.add(place(square));
    }
    const pair = (sum: number): readonly [number, number] | undefined => {
      for (const a of known) for (const b of known) if (Math.abs(exponents[a] + exponents[b] - sum) < SAME) return [a, b];
      return undefined;
    };
    for (const t of wanted.toSorted((a, b) => Math.abs(a) - Math.abs(b))) {
      const target = place(t);
      if (known.has(target)) continue;
      const two = pair(t);
      if (two === undefined) exponential.push(target);
      else products.push(target, ...two);
      known.add(target);
    }
    this.values = new Float64Array(exponents.length).fill(1);
    this.tau = place(1);
    this.inverse = place(-1);
    this.exponential = Int32Array.from(exponential);
    this.exponents = Float64Array.from(exponential, (target) => exponents[target]);
    this.roots = Int32Array.from(roots);
    this.products = Int32Array.from(products);
  }

  set(tau: number, logTau: number): void {
    const { values, exponential, exponents, roots, products, inverse } = this;
    values[this.tau] = tau;
    if (inverse < values.length) values[inverse] = 1 / tau;
    for (let i = 0; i < exponential.length; i++) values[exponential[i]] = Math.exp(exponents[i] * logTau);
    let root = tau;
    for (let i = 0; i < roots.length; i++) values[roots[i]] = root = Math.sqrt(root);
    for (let i = 0; i < products.length; i += 3) values[products[i]] = values[products[i + 1]] * values[products[i + 2]];
  }
}
