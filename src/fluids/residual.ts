import type { ResidualTerms } from "./fluid-data.js";
import { TauPowers } from "./tau-powers.js";

/** The exponential that terms share: exp(-delta^l), or exp(-eta (delta - epsilon)^2), or none. */
interface Group {
  readonly l: number;
  readonly eta: number;
  readonly epsilon: number;
  lowest: number;
  highest: number;
}

/** Entries a power term takes in `terms` and in `places`. */
const TERM = 4;
const PLACES = 2;
/** Entries a Gaussian term takes in `gaussians`. */
const GAUSSIAN = 5;

/**
 * The residual Helmholtz energy alphar(tau, delta) and its derivatives to second order, from the terms of any fluid.
 *
 * Every term is a function of tau times a function of delta. At a fixed temperature the terms that share an exponential
 * of delta collapse to one polynomial in delta, so that a search for density touches few numbers and no power of tau.
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

  private readonly tauPowers: TauPowers;
  /** Per power term: 1 if it adds to the same coefficient as the term before, else 0; then n, n t, n t (t - 1). */
  private readonly terms: Float64Array;
  /** Per power term: places of its tau power and of its coefficient. */
  private readonly places: Int32Array;
  /** Per Gaussian term: n, t, beta, gamma, place of its coefficient. */
  private readonly gaussians: Float64Array;

  // Groups: factor delta^lowest times the exponential, and a polynomial of `steps` coefficients from highest to lowest.
  private readonly groupLowest: Int32Array;
  private readonly groupSteps: Int32Array;
  private readonly groupL: Int32Array;
  private readonly groupEta: Float64Array;
  private readonly groupEpsilon: Float64Array;
  /** delta^0, delta^1... as far as groups need them */
  private readonly deltaPowers: Float64Array;
  // Coefficients of the polynomials at the current temperature: sums of n f(tau), n tau f', n tau^2 f''.
  private readonly c0: Float64Array;
  private readonly c1: Float64Array;
  private readonly c2: Float64Array;
  // Expansion in delta at zero density: places of the coefficients that count, and what each adds to delta and to delta^2.
  private readonly virialPlaces: Int32Array;
  private readonly virialFirst: Float64Array;
  private readonly virialSecond: Float64Array;

  constructor({ powers, gaussians }: ResidualTerms) {
    const groups: Group[] = [];
    const groupOf = (l: number, eta: number, epsilon: number, d: number): Group => {
      let group = groups.find((other) => other.l === l && other.eta === eta && other.epsilon === epsilon);
      if (group === undefined) groups.push((group = { l, eta, epsilon, lowest: d, highest: d }));
      group.lowest = Math.min(group.lowest, d);
      group.highest = Math.max(group.highest, d);
      return group;
    };
    const ofPowers = powers.map(([, , d, l]) => groupOf(l, 0, 0, d));
    const ofGaussians = gaussians.map(([, , d, eta, , , epsilon]) => groupOf(0, eta, epsilon, d));
    const steps = groups.map(({ lowest, highest }) => highest - lowest + 1);
    const coefficient = (group: Group, d: number): number => {
      const index = groups.indexOf(group);
      return steps.slice(0, index).reduce((sum, count) => sum + count, 0) + group.highest - d;
    };

    const exponents = [...new Set(powers.map(([, t]) => t))];
    this.tauPowers = new TauPowers(exponents);
    const sorted = powers
      .map(([n, t, d], i) => ({ n, t, place: coefficient(ofPowers[i], d) }))
      .toSorted((a, b) => a.place - b.place);
    this.terms = Float64Array.from(
      sorted.flatMap(({ n, t, place }, i) => [i > 0 && sorted[i - 1].place === place ? 1 : 0, n, n * t, n * t * (t - 1)]),
    );
    this.places = Int32Array.from(sorted.flatMap(({ t, place }) => [exponents.indexOf(t), place]));
    this.gaussians = Float64Array.from(
      gaussians.flatMap(([n, t, d, , beta, gamma], i) => [n, t, beta, gamma, coefficient(ofGaussians[i], d)]),
    );

    this.groupLowest = Int32Array.from(groups, ({ lowest }) => lowest);
    this.groupSteps = Int32Array.from(steps);
    this.groupL = Int32Array.from(groups, ({ l }) => l);
    this.groupEta = Float64Array.from(groups, ({ eta }) => eta);
    this.groupEpsilon = Float64Array.from(groups, ({ epsilon }) => epsilon);
    this.deltaPowers = new Float64Array(1 + Math.max(...groups.map(({ l, lowest }) => Math.max(l, lowest))));
    const count = steps.reduce((sum, size) => sum + size, 0);
    this.c0 = new Float64Array(count);
    this.c1 = new Float64Array(count);
    this.c2 = new Float64Array(count);
    const virials: { place: number; first: number; second: number }[] = [];
    for (const group of groups) {
      const atZero = Math.exp(-group.eta * group.epsilon * group.epsilon);
      const slope = 2 * group.eta * group.epsilon - (group.l === 1 ? 1 : 0);
      if (group.lowest === 1) virials.push({ place: coefficient(group, 1), first: atZero, second: atZero * slope });
      if (group.lowest <= 2 && group.highest >= 2) virials.push({ place: coefficient(group, 2), first: 0, second: atZero });
    }
    this.virialPlaces = Int32Array.from(virials, ({ place }) => place);
    this.virialFirst = Float64Array.from(virials, ({ first }) => first);
    this.virialSecond = Float64Array.from(virials, ({ second }) => second);
  }

  /** Sets the temperature of the evaluations that follow. */
  setTau(tau: number): void {
    const { tauPowers, terms, places, gaussians, c0, c1, c2 } = this;
    const logTau = Math.log(tau);
    tauPowers.set(tau, logTau);
    const powers = tauPowers.values;
    let sum0 = 0;
    let sum1 = 0;
    let sum2 = 0;
    for (let i = 0, j = 0; i < places.length; i += PLACES, j += TERM) {
      const x = powers[places[i]];
      const place = places[i + 1];
      const same = terms[j];
      c0[place] = sum0 = same * sum0 + terms[j + 1] * x;
      c1[place] = sum1 = same * sum1 + terms[j + 2] * x;
      c2[place] = sum2 = same * sum2 + terms[j + 3] * x;
    }
    if (gaussians.length > 0) this.addGaussians(tau, logTau);
  }

  private addGaussians(tau: number, logTau: number): void {
    const { gaussians, c0, c1, c2 } = this;
    for (let i = 0; i < gaussians.length; i += GAUSSIAN) c0[gaussians[i + 4]] = c1[gaussians[i + 4]] = c2[gaussians[i + 4]] = 0;
    for (let i = 0; i < gaussians.length; i += GAUSSIAN) {
      const t = gaussians[i + 1];
      const beta = gaussians[i + 2];
      const offset = tau - gaussians[i + 3];
      const place = gaussians[i + 4];
      const x = gaussians[i] * Math.exp(t * logTau - beta * offset * offset);
      const slope = t - 2 * beta * tau * offset;
      c0[place] += x;
      c1[place] += x * slope;
      c2[place] += x * (slope * slope - t - 2 * beta * tau * tau);
    }
  }

  /** Leaves `delta1` and `delta2` at a density, at the current temperature: enough for pressure and its slope. */
  setDelta(delta: number): void {
    const { groupSteps, groupLowest, groupL, groupEta, deltaPowers, c0 } = this;
    let power = 1;
    for (let i = 0; i < deltaPowers.length; i++) {
      deltaPowers[i] = power;
      power *= delta;
    }
    let first = 0;
    let second = 0;
    let place = 0;
    for (let group = 0; group < groupSteps.length; group++) {
      // Polynomial, its derivative and half its second derivative, by Horner's scheme.
      const end = place + groupSteps[group];
      let p0 = 0;
      let p1 = 0;
      let p2 = 0;
      for (; place < end; place++) {
        p2 = p2 * delta + p1;
        p1 = p1 * delta + p0;
        p0 = p0 * delta + c0[place];
      }
      p1 *= delta;
      p2 *= 2 * delta * delta;
      // The factor before it, its logarithmic derivative, and its second derivative over itself.
      const lowest = groupLowest[group];
      const l = groupL[group];
      let factor = deltaPowers[lowest];
      let slope = lowest;
      let bend = 0;
      if (l > 0) {
        const exponent = deltaPowers[l];
        factor *= Math.exp(-exponent);
        slope -= l * exponent;
        bend = l * l * exponent;
      } else if (groupEta[group] > 0) {
        const eta = groupEta[group];
        const offset = delta - this.groupEpsilon[group];
        factor *= Math.exp(-eta * offset * offset);
        slope -= 2 * eta * delta * offset;
        bend = 2 * eta * delta * (delta + offset);
      }
      first += factor * (slope * p0 + p1);
      second += factor * ((slope * (slope - 1) - bend) * p0 + 2 * slope * p1 + p2);
    }
    this.delta1 = first;
    this.delta2 = second;
  }

  /** Leaves the value and all derivatives at a density, at the current temperature. */
  setDeltaFully(delta: number): void {
    const { groupSteps, groupLowest, groupL, groupEta, deltaPowers, c0, c1, c2 } = this;
    let power = 1;
    for (let i = 0; i < deltaPowers.length; i++) {
      deltaPowers[i] = power;
      power *= delta;
    }
    let value = 0;
    let first = 0;
    let second = 0;
    let tau1 = 0;
    let tau2 = 0;
    let mixed = 0;
    let place = 0;
    for (let group = 0; group < groupSteps.length; group++) {
      const end = place + groupSteps[group];
      let p0 = 0;
      let p1 = 0;
      let p2 = 0;
      let q0 = 0;
      let q1 = 0;
      let r0 = 0;
      for (; place < end; place++) {
        p2 = p2 * delta + p1;
        p1 = p1 * delta + p0;
        p0 = p0 * delta + c0[place];
        q1 = q1 * delta + q0;
        q0 = q0 * delta + c1[place];
        r0 = r0 * delta + c2[place];
      }
      p1 *= delta;
      p2 *= 2 * delta * delta;
      const lowest = groupLowest[group];
      const l = groupL[group];
      let factor = deltaPowers[lowest];
      let slope = lowest;
      let bend = 0;
      if (l > 0) {
        const exponent = deltaPowers[l];
        factor *= Math.exp(-exponent);
        slope -= l * exponent;
        bend = l * l * exponent;
      } else if (groupEta[group] > 0) {
        const eta = groupEta[group];
        const offset = delta - this.groupEpsilon[group];
        factor *= Math.exp(-eta * offset * offset);
        slope -= 2 * eta * delta * offset;
        bend = 2 * eta * delta * (delta + offset);
      }
      value += factor * p0;
      first += factor * (slope * p0 + p1);
      second += factor * ((slope * (slope - 1) - bend) * p0 + 2 * slope * p1 + p2);
      tau1 += factor * q0;
      tau2 += factor * r0;
      mixed += factor * (slope * q0 + q1 * delta);
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
    return this.virial(this.virialFirst);
  }

  /** Third virial coefficient at the current temperature, over the reducing volume squared. */
  thirdVirial(): number {
    return 2 * this.virial(this.virialSecond);
  }

  private virial(shares: Float64Array): number {
    const { virialPlaces, c0 } = this;
    let sum = 0;
    for (let i = 0; i < virialPlaces.length; i++) sum += shares[i] * c0[virialPlaces[i]];
    return sum;
  }
}
