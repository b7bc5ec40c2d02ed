import type { ResidualTerms } from "./fluid-data.js";

/** One factor of density that a term can carry: delta^d exp(-delta^l), or delta^d exp(-eta (delta - epsilon)^2). */
interface DensityFactor {
  readonly d: number;
  readonly l: number;
  readonly eta: number;
  readonly epsilon: number;
}

/**
 * The residual Helmholtz energy alphar(tau, delta) and its derivatives to second order, from the terms of any fluid.
 *
 * Every term is a function of tau times a function of delta. At a fixed temperature all terms with the same delta
 * function collapse to one coefficient, so a search for density touches few numbers and no exponent of tau.
 * Results are left in the fields; nothing is allocated after construction.
 */
export class ResidualHelmholtz {
  /** alphar */
  value = 0;
  /** delta * d alphar / d delta */
  delta1 = 0;
  /** delta^2 * d2 alphar / d delta^2 */
  delta2 = 0;
  /** tau * d alphar / d tau */
  tau1 = 0;
  /** tau^2 * d2 alphar / d tau^2 */
  tau2 = 0;
  /** tau * delta * d2 alphar / d tau d delta */
  tau1delta1 = 0;

  // Power terms, ordered by the density factor they share.
  private readonly exponents: Float64Array;
  private readonly tauPowers: Float64Array;
  private readonly termExponent: Int32Array;
  private readonly n0: Float64Array;
  private readonly n1: Float64Array;
  private readonly n2: Float64Array;
  private readonly firstTerm: Int32Array;
  // Gaussian terms.
  private readonly gaussians: readonly { n: number; t: number; beta: number; gamma: number; factor: number }[];
  // Density factors, ordered by the exponential they share, and those exponentials ("groups").
  private readonly d1: Float64Array;
  private readonly d2: Float64Array;
  private readonly power: Int32Array;
  private readonly firstFactor: Int32Array;
  private readonly groupL: Float64Array;
  private readonly groupEta: Float64Array;
  private readonly groupEpsilon: Float64Array;
  private readonly deltaPowers: Float64Array;
  // Coefficients of the density factors at the current temperature: sum of n f(tau), n tau f', n tau^2 f''.
  private readonly c0: Float64Array;
  private readonly c1: Float64Array;
  private readonly c2: Float64Array;
  // Expansion of the density factors at delta = 0, for the virial coefficients.
  private readonly order1: Float64Array;
  private readonly order2: Float64Array;

  constructor(terms: ResidualTerms) {
    const factors: DensityFactor[] = [];
    const factorOf = (wanted: DensityFactor): number => {
      const found = factors.findIndex((factor) => same(factor, wanted));
      return found >= 0 ? found : factors.push(wanted) - 1;
    };
    for (const [, , d, l] of terms.powers) factorOf({ d, l, eta: 0, epsilon: 0 });
    for (const [, , d, eta, , , epsilon] of terms.gaussians) factorOf({ d, l: 0, eta, epsilon });
    factors.sort((a, b) => a.eta - b.eta || a.epsilon - b.epsilon || a.l - b.l || a.d - b.d);

    const exponents = [...new Set(terms.powers.map(([, t]) => t))].toSorted((a, b) => a - b);
    this.exponents = Float64Array.from(exponents);
    this.tauPowers = new Float64Array(exponents.length);
    const sorted = terms.powers
      .map(([n, t, d, l]) => ({ n, t, factor: factorOf({ d, l, eta: 0, epsilon: 0 }) }))
      .toSorted((a, b) => a.factor - b.factor || a.t - b.t);
    this.termExponent = Int32Array.from(sorted, ({ t }) => exponents.indexOf(t));
    this.n0 = Float64Array.from(sorted, ({ n }) => n);
    this.n1 = Float64Array.from(sorted, ({ n, t }) => n * t);
    this.n2 = Float64Array.from(sorted, ({ n, t }) => n * t * (t - 1));
    this.firstTerm = starts(factors.length, sorted.map(({ factor }) => factor));
    this.gaussians = terms.gaussians.map(([n, t, d, eta, beta, gamma, epsilon]) => ({
      n,
      t,
      beta,
      gamma,
      factor: factorOf({ d, l: 0, eta, epsilon }),
    }));

    const groups: DensityFactor[] = [];
    const groupOf = factors.map((factor) => {
      const found = groups.findIndex((group) => same({ ...group, d: 0 }, { ...factor, d: 0 }));
      return found >= 0 ? found : groups.push(factor) - 1;
    });
    this.firstFactor = starts(groups.length, groupOf);
    this.groupL = Float64Array.from(groups, ({ l }) => l);
    this.groupEta = Float64Array.from(groups, ({ eta }) => eta);
    this.groupEpsilon = Float64Array.from(groups, ({ epsilon }) => epsilon);
    this.power = Int32Array.from(factors, ({ d }) => d);
    this.d1 = Float64Array.from(factors, ({ d }) => d);
    this.d2 = Float64Array.from(factors, ({ d }) => d * d);
    this.deltaPowers = new Float64Array(Math.max(...factors.map(({ d, l }) => Math.max(d, l))) + 1);
    this.c0 = new Float64Array(factors.length);
    this.c1 = new Float64Array(factors.length);
    this.c2 = new Float64Array(factors.length);
    const atZero = ({ eta, epsilon }: DensityFactor): number => Math.exp(-eta * epsilon * epsilon);
    this.order1 = Float64Array.from(factors, (factor) => (factor.d === 1 ? atZero(factor) : 0));
    this.order2 = Float64Array.from(factors, (factor) => {
      if (factor.d === 2) return atZero(factor);
      if (factor.d !== 1) return 0;
      return atZero(factor) * (2 * factor.eta * factor.epsilon - (factor.l === 1 ? 1 : 0));
    });
  }

  /** Sets the temperature of the evaluations that follow. */
  setTau(tau: number): void {
    const { exponents, tauPowers, termExponent, firstTerm, n0, n1, n2, c0, c1, c2 } = this;
    const logTau = Math.log(tau);
    for (let i = 0; i < exponents.length; i++) tauPowers[i] = Math.exp(exponents[i] * logTau);
    let term = 0;
    for (let factor = 0; factor < c0.length; factor++) {
      const end = firstTerm[factor + 1];
      let sum0 = 0;
      let sum1 = 0;
      let sum2 = 0;
      for (; term < end; term++) {
        const x = tauPowers[termExponent[term]];
        sum0 += n0[term] * x;
        sum1 += n1[term] * x;
        sum2 += n2[term] * x;
      }
      c0[factor] = sum0;
      c1[factor] = sum1;
      c2[factor] = sum2;
    }
    for (let i = 0; i < this.gaussians.length; i++) {
      const { n, t, beta, gamma, factor } = this.gaussians[i];
      const offset = tau - gamma;
      const x = n * Math.exp(t * logTau - beta * offset * offset);
      const slope = t - 2 * beta * tau * offset;
      c0[factor] += x;
      c1[factor] += x * slope;
      c2[factor] += x * (slope * slope - t - 2 * beta * tau * tau);
    }
  }

  /** Leaves `delta1` and `delta2` at a density, at the current temperature: enough for pressure and its slope. */
  setDelta(delta: number): void {
    const { deltaPowers, firstFactor, power, d1, d2, c0, groupEta } = this;
    powersOf(delta, deltaPowers);
    let first = 0;
    let second = 0;
    let factor = 0;
    for (let group = 0; group < groupEta.length; group++) {
      const end = firstFactor[group + 1];
      let sum0 = 0;
      let sum1 = 0;
      let sum2 = 0;
      for (; factor < end; factor++) {
        const x = c0[factor] * deltaPowers[power[factor]];
        sum0 += x;
        sum1 += x * d1[factor];
        sum2 += x * d2[factor];
      }
      const l = this.groupL[group];
      const eta = groupEta[group];
      if (l > 0) {
        const exponent = deltaPowers[l];
        const e = Math.exp(-exponent);
        const slope = l * exponent;
        first += e * (sum1 - slope * sum0);
        second += e * (sum2 - (1 + 2 * slope) * sum1 + slope * (slope + 1 - l) * sum0);
      } else if (eta > 0) {
        const offset = delta - this.groupEpsilon[group];
        const e = Math.exp(-eta * offset * offset);
        const slope = 2 * eta * delta * offset;
        first += e * (sum1 - slope * sum0);
        second += e * (sum2 - (1 + 2 * slope) * sum1 + (slope * slope - 2 * eta * delta * delta) * sum0);
      } else {
        first += sum1;
        second += sum2 - sum1;
      }
    }
    this.delta1 = first;
    this.delta2 = second;
  }

  /** Leaves the value and all derivatives at a density, at the current temperature. */
  setDeltaFully(delta: number): void {
    const { deltaPowers, firstFactor, power, d1, d2, c0, c1, c2, groupEta } = this;
    powersOf(delta, deltaPowers);
    let value = 0;
    let first = 0;
    let second = 0;
    let tau1 = 0;
    let tau2 = 0;
    let mixed = 0;
    let factor = 0;
    for (let group = 0; group < groupEta.length; group++) {
      const end = firstFactor[group + 1];
      let sum0 = 0;
      let sum1 = 0;
      let sum2 = 0;
      let tau1sum0 = 0;
      let tau1sum1 = 0;
      let tau2sum0 = 0;
      for (; factor < end; factor++) {
        const deltaPower = deltaPowers[power[factor]];
        const x = c0[factor] * deltaPower;
        sum0 += x;
        sum1 += x * d1[factor];
        sum2 += x * d2[factor];
        const y = c1[factor] * deltaPower;
        tau1sum0 += y;
        tau1sum1 += y * d1[factor];
        tau2sum0 += c2[factor] * deltaPower;
      }
      const l = this.groupL[group];
      const eta = groupEta[group];
      let e = 1;
      let slope = 0;
      let curve = 0;
      if (l > 0) {
        const exponent = deltaPowers[l];
        e = Math.exp(-exponent);
        slope = l * exponent;
        curve = slope * (slope + 1 - l);
      } else if (eta > 0) {
        const offset = delta - this.groupEpsilon[group];
        e = Math.exp(-eta * offset * offset);
        slope = 2 * eta * delta * offset;
        curve = slope * slope - 2 * eta * delta * delta;
      }
      value += e * sum0;
      first += e * (sum1 - slope * sum0);
      second += e * (sum2 - (1 + 2 * slope) * sum1 + curve * sum0);
      tau1 += e * tau1sum0;
      tau2 += e * tau2sum0;
      mixed += e * (tau1sum1 - slope * tau1sum0);
    }
    this.value = value;
    this.delta1 = first;
    this.delta2 = second;
    this.tau1 = tau1;
    this.tau2 = tau2;
    this.tau1delta1 = mixed;
  }

  /** Second virial coefficient at the current temperature, over the reducing volume. */
  secondVirial(): number {
    let sum = 0;
    for (let i = 0; i < this.c0.length; i++) sum += this.c0[i] * this.order1[i];
    return sum;
  }

  /** Third virial coefficient at the current temperature, over the reducing volume squared. */
  thirdVirial(): number {
    let sum = 0;
    for (let i = 0; i < this.c0.length; i++) sum += this.c0[i] * this.order2[i];
    return 2 * sum;
  }
}

function powersOf(delta: number, into: Float64Array): void {
  let x = 1;
  for (let i = 0; i < into.length; i++) {
    into[i] = x;
    x *= delta;
  }
}

function same(a: DensityFactor, b: DensityFactor): boolean {
  return a.d === b.d && a.l === b.l && a.eta === b.eta && a.epsilon === b.epsilon;
}

/** Where each of `count` owners starts in a list sorted by owner, and the end of the list. */
function starts(count: number, owners: readonly number[]): Int32Array {
  return Int32Array.from({ length: count + 1 }, (_, owner) => owners.filter((other) => other < owner).length);
}
