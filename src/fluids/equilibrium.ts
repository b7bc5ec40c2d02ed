import type { PairParameters } from "./data/air-mixture.js";
import type { FluidData } from "./fluid-data.js";
import { MixturePhase } from "./mixture-phase.js";
import { NoConvergenceError } from "./errors.js";

/** Change of ln K and ln T below which an equilibrium counts as found. */
const FOUND = 1e-11;
/** Iterations that a search may take; far from the critical region it takes 5 to 15. */
const MOST_ITERATIONS = 200;
/** Largest change of ln K and ln T in one iteration. */
const LONGEST_STEP = 0.5;
const LONGEST_TEMPERATURE_STEP = 0.05;
/** Slope of ln K against Tc/T in the corresponding-states rule ln(p_sat/p_c) = 5.373 (1 + omega) (1 - Tc/T), for the first guess. */
const VAPOUR_PRESSURE_SLOPE = 5.373;

/** A step so short that it teaches nothing about the slopes. */
const NOTHING = 1e-300;

/** What the first guess needs of a component. */
export interface GuessData {
  /** K */
  readonly criticalTemperature: number;
  /** Pa */
  readonly criticalPressure: number;
  /** Pitzer's acentric factor */
  readonly acentricFactor: number;
}

/**
 * Vapour and liquid of a mixture in equilibrium at a pressure and a vapour fraction: equal fugacities of every component.
 *
 * The unknowns are ln K of each component (K = vapour over liquid mole fraction) and ln T; the equations are
 * ln K = ln phi_liquid - ln phi_vapour and the material balance sum z (K - 1) / (1 + beta (K - 1)) = 0. They are solved by
 * Newton's method with the material balance exact, and Broyden's updates for the slopes of the fugacities.
 */
export class Equilibrium {
  /** K */
  temperature = NaN;
  readonly liquid: MixturePhase;
  readonly vapour: MixturePhase;
  readonly logK: Float64Array;

  private readonly size: number;
  private readonly residual: Float64Array;
  private readonly inverse: Float64Array;
  private readonly step: Float64Array;
  private readonly before: Float64Array;
  private readonly change: Float64Array;
  private readonly row: Float64Array;
  private pressure = NaN;

  constructor(
    components: readonly FluidData[],
    pairs: readonly PairParameters[],
    private readonly z: Float64Array,
    private readonly guesses: readonly GuessData[],
  ) {
    this.size = components.length;
    this.liquid = new MixturePhase(components, pairs);
    this.vapour = new MixturePhase(components, pairs);
    this.logK = new Float64Array(this.size);
    const unknowns = this.size + 1;
    this.residual = new Float64Array(unknowns);
    this.before = new Float64Array(unknowns);
    this.step = new Float64Array(unknowns);
    this.change = new Float64Array(unknowns);
    this.row = new Float64Array(unknowns);
    this.inverse = new Float64Array(unknowns * unknowns);
  }

  /**
   * Finds the equilibrium at a pressure (Pa) and a molar vapour fraction, starting from the last one found if it was near in
   * pressure.
   * @throws NoConvergenceError near the mixture's critical point and beyond
   */
  solve(pressure: number, vapourFraction: number): void {
    const near = Math.abs(Math.log(pressure / this.pressure)) < 0.1;
    if (near && this.converge(pressure, vapourFraction)) return;
    this.guess(pressure, vapourFraction);
    if (this.converge(pressure, vapourFraction)) return;
    this.pressure = NaN;
    throw new NoConvergenceError("mixture", `phase equilibrium at ${pressure} Pa and vapour fraction ${vapourFraction}`);
  }

  /** Makes the next solution start afresh, so that it is the same whatever was solved before. */
  forget(): void {
    this.pressure = NaN;
  }

  /** Corresponding-states K and the temperature at which they meet the material balance. */
  private guess(pressure: number, vapourFraction: number): void {
    const { guesses, z, logK, size } = this;
    let temperature = 0;
    for (let i = 0; i < size; i++) {
      const { criticalTemperature, criticalPressure, acentricFactor } = guesses[i];
      temperature += (z[i] * criticalTemperature) / (1 + Math.log(criticalPressure / pressure) / (VAPOUR_PRESSURE_SLOPE * (1 + acentricFactor)));
    }
    for (let iteration = 0; iteration < 50; iteration++) {
      let slope = 0;
      let balance = 0;
      for (let i = 0; i < size; i++) {
        const { criticalTemperature, criticalPressure, acentricFactor } = guesses[i];
        const steepness = VAPOUR_PRESSURE_SLOPE * (1 + acentricFactor);
        logK[i] = Math.log(criticalPressure / pressure) + steepness * (1 - criticalTemperature / temperature);
        const k = Math.exp(logK[i]);
        const below = 1 + vapourFraction * (k - 1);
        balance += (z[i] * (k - 1)) / below;
        slope += ((z[i] * k) / (below * below)) * steepness * (criticalTemperature / temperature);
      }
      const change = -balance / slope;
      temperature *= Math.exp(Math.max(-0.1, Math.min(0.1, change)));
      if (Math.abs(change) < 1e-6) break;
    }
    this.temperature = temperature;
    this.liquid.density = NaN;
    this.vapour.density = NaN;
  }

  private converge(pressure: number, vapourFraction: number): boolean {
    const { size, residual, inverse, step, before, logK } = this;
    const unknowns = size + 1;
    this.pressure = pressure;
    if (!this.evaluate(pressure, vapourFraction)) return false;
    this.startInverse(vapourFraction);
    for (let iteration = 0; iteration < MOST_ITERATIONS; iteration++) {
      let longest = 0;
      for (let i = 0; i < unknowns; i++) {
        let sum = 0;
        for (let j = 0; j < unknowns; j++) sum -= inverse[i * unknowns + j] * residual[j];
        step[i] = sum;
        longest = Math.max(longest, Math.abs(sum) / (i < size ? LONGEST_STEP : LONGEST_TEMPERATURE_STEP));
      }
      if (!Number.isFinite(longest)) return false;
      if (longest > 1) for (let i = 0; i < unknowns; i++) step[i] /= longest;
      before.set(residual);
      for (let i = 0; i < size; i++) logK[i] += step[i];
      this.temperature *= Math.exp(step[size]);
      if (!this.evaluate(pressure, vapourFraction)) return false;
      if (largest(step) < FOUND && largest(residual) < 10 * FOUND) return !this.trivial();
      this.updateInverse();
    }
    return false;
  }

  /** Broyden's first update of the inverse slopes, in the form of Sherman and Morrison. */
  private updateInverse(): void {
    const { inverse, step, before, residual, change, row } = this;
    const size = step.length;
    let denominator = 0;
    for (let i = 0; i < size; i++) {
      let sum = 0;
      for (let j = 0; j < size; j++) sum += inverse[i * size + j] * (residual[j] - before[j]);
      change[i] = sum;
      denominator += step[i] * sum;
    }
    if (Math.abs(denominator) < NOTHING) return;
    for (let j = 0; j < size; j++) {
      let sum = 0;
      for (let i = 0; i < size; i++) sum += step[i] * inverse[i * size + j];
      row[j] = sum;
    }
    for (let i = 0; i < size; i++) {
      const gain = (step[i] - change[i]) / denominator;
      for (let j = 0; j < size; j++) inverse[i * size + j] += gain * row[j];
    }
  }

  /** Liquid and vapour that have become the same phase solve the equations and mean nothing. */
  private trivial(): boolean {
    return Math.abs(this.liquid.density - this.vapour.density) < 1e-3 * this.liquid.density;
  }

  /** Leaves the residuals at the current K and temperature; false where a phase has no root. */
  private evaluate(pressure: number, vapourFraction: number): boolean {
    const { size, z, logK, liquid, vapour, residual, temperature } = this;
    let balance = 0;
    let sumX = 0;
    let sumY = 0;
    for (let i = 0; i < size; i++) {
      const k = Math.exp(logK[i]);
      const below = 1 + vapourFraction * (k - 1);
      balance += (z[i] * (k - 1)) / below;
      liquid.x[i] = z[i] / below;
      vapour.x[i] = (z[i] * k) / below;
      sumX += liquid.x[i];
      sumY += vapour.x[i];
    }
    for (let i = 0; i < size; i++) {
      liquid.x[i] /= sumX;
      vapour.x[i] /= sumY;
    }
    liquid.set(temperature);
    vapour.set(temperature);
    if (!liquid.findDensity(pressure, "liquid", liquid.density)) return false;
    if (!vapour.findDensity(pressure, "vapour", vapour.density)) return false;
    liquid.fugacities();
    vapour.fugacities();
    for (let i = 0; i < size; i++) residual[i] = logK[i] - liquid.logFugacity[i] + vapour.logFugacity[i];
    residual[size] = balance;
    return true;
  }

  /**
   * Inverse of the slopes at the start: fugacities taken as independent of composition, their temperature slope from
   * corresponding states. Broyden's updates learn the rest.
   */
  private startInverse(vapourFraction: number): void {
    const { size, z, logK, inverse, guesses, temperature } = this;
    const unknowns = size + 1;
    inverse.fill(0);
    // Rows: d lnK_i - a_i dlnT = -r_i; sum b_i d lnK_i = -r_last. Eliminate: (sum b_i a_i) dlnT = -r_last + sum b_i r_i.
    let total = 0;
    const a = (i: number): number =>
      (VAPOUR_PRESSURE_SLOPE * (1 + guesses[i].acentricFactor) * guesses[i].criticalTemperature) / temperature;
    const b = (i: number): number => {
      const k = Math.exp(logK[i]);
      const below = 1 + vapourFraction * (k - 1);
      return (z[i] * k) / (below * below);
    };
    for (let i = 0; i < size; i++) total += a(i) * b(i);
    for (let j = 0; j < size; j++) inverse[size * unknowns + j] = -b(j) / total;
    inverse[size * unknowns + size] = 1 / total;
    for (let i = 0; i < size; i++) {
      for (let j = 0; j < unknowns; j++) inverse[i * unknowns + j] = (i === j ? 1 : 0) + a(i) * inverse[size * unknowns + j];
    }
  }
}

function largest(values: Float64Array): number {
  let most = 0;
  for (const value of values) most = Math.max(most, Math.abs(value));
  return most;
}
