/** Where and when a bracketed search stops. */
export interface RootOptions {
  /** Width of the bracket at which the root is known, in the argument's unit. */
  readonly tolerance?: number;
  readonly mostIterations?: number;
  /** Whether a value and the width of its bracket will do: a jump through zero has no root to be closed in on. */
  readonly enough?: (value: number, width: number) => boolean;
}

/**
 * A root of f between two arguments at which its signs differ, by Brent's method (R. P. Brent, Algorithms for
 * Minimization without Derivatives, 1973, chapter 4): interpolation where it helps, bisection where it does not, so that
 * the bracket always closes, on a jump through zero as well as on a root.
 *
 * @param fa f(a), where the caller has it already
 * @param fb f(b), likewise
 * @throws RangeError when f has the same sign at both ends
 */
export function bracketedRoot(
  f: (x: number) => number,
  a: number,
  b: number,
  { tolerance = 0, mostIterations = 200, enough }: RootOptions = {},
  fa = f(a),
  fb = f(b),
): number {
  if (fa === 0) return a;
  if (fb === 0) return b;
  if (fa > 0 === fb > 0) throw new RangeError(`no change of sign between ${a} and ${b}`);
  let c = a;
  let fc = fa;
  let step = b - a;
  let stepBefore = step;
  for (let iteration = 0; iteration < mostIterations; iteration++) {
    if (fb > 0 === fc > 0) {
      c = a;
      fc = fa;
      step = b - a;
      stepBefore = step;
    }
    if (Math.abs(fc) < Math.abs(fb)) {
      a = b;
      b = c;
      c = a;
      fa = fb;
      fb = fc;
      fc = fa;
    }
    const nearest = 2 * Number.EPSILON * Math.abs(b) + tolerance / 2;
    const half = (c - b) / 2;
    if (Math.abs(half) <= nearest || fb === 0 || enough?.(fb, Math.abs(c - b)) === true) return b;
    const trial = interpolation(a, b, c, fa, fb, fc);
    if (
      Math.abs(stepBefore) >= nearest &&
      Math.abs(fa) > Math.abs(fb) &&
      trial / half > 0 &&
      Math.abs(trial) < Math.min(1.5 * Math.abs(half) - nearest / 2, Math.abs(stepBefore / 2))
    ) {
      stepBefore = step;
      step = trial;
    } else {
      step = half;
      stepBefore = half;
    }
    a = b;
    fa = fb;
    b += Math.abs(step) > nearest ? step : Math.sign(half) * nearest;
    fb = f(b);
  }
  return b;
}

/** Step from b by the secant through a and b, or by the inverse parabola where a third point is at hand. */
function interpolation(a: number, b: number, c: number, fa: number, fb: number, fc: number): number {
  const s = fb / fa;
  if (a === c) return ((c - b) * s) / (1 - s);
  const q = fa / fc;
  const r = fb / fc;
  return (-s * ((c - b) * q * (q - r) - (b - a) * (r - 1))) / ((q - 1) * (r - 1) * (s - 1));
}
