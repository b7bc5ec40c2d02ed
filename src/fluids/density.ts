import { CubicGuess } from "./cubic-guess.js";
import { NoConvergenceError } from "./errors.js";
import { criticalPoint, type FluidData } from "./fluid-data.js";
import type { HelmholtzEquation } from "./helmholtz.js";
import type { PhaseBoundary } from "./saturation.js";

/** Relative step of density after which the next one is below round-off, Newton's steps squaring themselves. */
const LAST_STEP = 1e-8;
/** Pressures are sums that cancel: this share of density R T is their round-off. */
const PRESSURE_ROUND_OFF = 4e-16;
/** Steps that a Newton search may take from a good start; it takes 2 to 6. */
const FAST_STEPS = 12;
/** Steps of the bracketed search: 60 bisections exhaust double precision, the rest is margin. */
const SAFE_STEPS = 200;
/** The densest state looked at, over the critical density: denser than any fluid in range at 100 MPa. */
const DENSEST = 4.55;
/** Largest relative change of density in one fast step. */
const LONGEST_STEP = 0.3;
/**
 * Share by which a guessed saturated density may err. A density farther beyond it than that is a root inside the two-phase
 * region, where equations of state have loops of their own.
 */
export const SATURATION_MARGIN = 0.05;
/**
 * Densities over the critical one below and above which a state with rising pressure is gas or liquid for sure: the
 * equations' loops inside the two-phase region lie between.
 */
export const SURELY_GAS = 0.2;
export const SURELY_LIQUID = 2;
/** Ideal-gas density over the critical one below which two virial coefficients give a better start than a cubic equation. */
const THIN = 0.25;
/** Pressure derivative of the bulk modulus of simple liquids: makes the first step in a liquid nearly exact. */
const STIFFENING = 8;

/** Finds the density (kg/m3) at a temperature and pressure, on the side asked for. */
export class DensitySearch {
  readonly cubic: CubicGuess;

  private readonly name: string;
  private readonly criticalDensity: number;
  private readonly densest: number;

  constructor(
    data: FluidData,
    private readonly equation: HelmholtzEquation,
  ) {
    const { temperature, pressure, density } = criticalPoint(data);
    this.name = data.name;
    this.criticalDensity = density;
    this.densest = DENSEST * density;
    this.cubic = new CubicGuess(temperature, pressure, equation.specificGasConstant, data.phases.guess.acentricFactor);
  }

  /** The least dense root: gas, no denser than roughly the saturated vapour of the boundary. */
  gas(temperature: number, pressure: number, boundary: Pick<PhaseBoundary, "vapourDensityGuess">): number {
    const { equation } = this;
    equation.setTemperature(temperature);
    const density = this.refine(pressure, this.virialGuess(temperature, pressure));
    if (density <= SURELY_GAS * this.criticalDensity) return density;
    if (density <= (1 + SATURATION_MARGIN) * boundary.vapourDensityGuess(temperature)) return density;
    return this.outermost(temperature, pressure, -1);
  }

  /** The densest root: liquid, no thinner than roughly the saturated liquid (kg/m3) at that temperature. */
  liquid(temperature: number, pressure: number, saturated: number): number {
    const { equation } = this;
    equation.setTemperature(temperature);
    const density = this.refine(pressure, this.compressed(pressure, saturated));
    if (density >= (1 - SATURATION_MARGIN) * saturated) return density;
    return this.outermost(temperature, pressure, 1);
  }

  /** The only root, above the critical temperature. */
  above(temperature: number, pressure: number): number {
    this.equation.setTemperature(temperature);
    const density = this.refine(pressure, this.aboveGuess(temperature, pressure));
    return density > 0 ? density : this.outermost(temperature, pressure, 1);
  }

  /** Rough density above the critical temperature, which must be the equation's current one. */
  aboveGuess(temperature: number, pressure: number): number {
    const ideal = pressure / (this.equation.specificGasConstant * temperature);
    return ideal < THIN * this.criticalDensity ? this.virialGuess(temperature, pressure) : this.cubic.density(temperature, pressure);
  }

  /** Density of gas at a temperature, which must be the equation's current one, from two virial coefficients. */
  virialGuess(temperature: number, pressure: number): number {
    const { residual, reducingDensity, specificGasConstant } = this.equation;
    const b = residual.secondVirial();
    const c = residual.thirdVirial();
    const ideal = pressure / (specificGasConstant * temperature * reducingDensity);
    const root = 1 + 4 * b * ideal;
    let delta = root > 0 ? (2 * ideal) / (1 + Math.sqrt(root)) : 2 * ideal;
    for (let i = 0; i < 2; i++) {
      const slope = 1 + delta * (2 * b + 3 * c * delta);
      if (slope < 0.05) break;
      delta -= (delta * (1 + delta * (b + c * delta)) - ideal) / slope;
    }
    return Math.max(delta, 0.1 * ideal) * reducingDensity;
  }

  /** Liquid at the equation's current temperature compressed from `density` (kg/m3) to `pressure` (Pa) by Murnaghan's equation. */
  compressed(pressure: number, density: number): number {
    const { equation } = this;
    equation.setDensity(density);
    const modulus = density * equation.pressureByDensity;
    const base = 1 + (STIFFENING * (pressure - equation.pressure)) / modulus;
    if (!(modulus > 0) || !(base > 0)) return density;
    return density * Math.exp(Math.log(base) / STIFFENING);
  }

  /** Newton's method from a good guess; NaN where it does not settle. */
  private refine(pressure: number, guess: number): number {
    const { equation } = this;
    const roundOff = PRESSURE_ROUND_OFF * equation.specificGasConstant * equation.temperature;
    let density = guess;
    for (let i = 0; i < FAST_STEPS; i++) {
      equation.setDensity(density);
      const slope = equation.pressureByDensity;
      if (!(slope > 0)) return NaN;
      const miss = pressure - equation.pressure;
      const step = miss / slope;
      if (Math.abs(step) <= LAST_STEP * density || Math.abs(miss) <= roundOff * density) return density + step;
      const limit = LONGEST_STEP * density;
      density += Math.max(-limit, Math.min(limit, step));
    }
    return NaN;
  }

  /**
   * The root met first when coming from the dense end (`from` = 1) or from zero density (-1): Newton's steps until one
   * passes the root, then a bracketed search. On its outer branch pressure curves away from the side started from, so
   * that no step passes over a whole loop.
   */
  private outermost(temperature: number, pressure: number, from: 1 | -1): number {
    const { equation } = this;
    let low = 0;
    let high = this.densest;
    let density = from > 0 ? high : Math.min(high, (0.5 * pressure) / (equation.specificGasConstant * temperature));
    const roundOff = PRESSURE_ROUND_OFF * equation.specificGasConstant * temperature;
    let moved = Infinity;
    let passed = false;
    for (let i = 0; i < SAFE_STEPS; i++) {
      equation.setDensity(density);
      const miss = pressure - equation.pressure;
      if (miss > 0) low = density;
      else high = density;
      passed ||= miss > 0 === from > 0;
      const slope = equation.pressureByDensity;
      const step = slope > 0 ? miss / slope : NaN;
      if (Math.abs(step) <= LAST_STEP * density || (slope > 0 && Math.abs(miss) <= roundOff * density)) return density + step;
      // Halves the bracket where Newton's steps leave it or, once past the root, do not shrink.
      const next = density + step;
      const bold = next > low && next < high && (!passed || 2 * Math.abs(step) < moved);
      const before = density;
      density = bold ? next : 0.5 * (low + high);
      moved = Math.abs(density - before);
      if (high - low <= 2e-16 * high) return density;
    }
    throw new NoConvergenceError(this.name, `density at ${temperature} K and ${pressure} Pa`);
  }
}
