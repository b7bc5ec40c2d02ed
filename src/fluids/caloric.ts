import type { DensitySearch } from "./density.js";
import { NoConvergenceError } from "./errors.js";
import type { HelmholtzEquation } from "./helmholtz.js";
import { LIQUID_SIDE, type PhaseBoundary, type Side } from "./saturation.js";
import { ENTHALPY, type Caloric } from "./starting-points.js";
import type { State } from "./state.js";

/** Relative step of temperature and density below which a first-order correction is exact to round-off. */
const LAST_STEP = 1e-10;
/** Steps that a Newton search may take from a good start; it takes 2 to 6. */
const FAST_STEPS = 14;
/** Largest relative change of temperature or density in one fast step. */
const LONGEST_STEP = 0.4;
/** Density over the critical one below which pressure is taken in logarithms, in which a gas is nearly linear. */
const GAS_LIKE = 0.6;
/** Relative change of pressure, temperature or density up to which an old state starts a search better than a guess. */
const NEAR = 0.1;
/** Steps of the bracketed search: 60 bisections exhaust double precision, the rest is margin. */
const SAFE_STEPS = 200;

/**
 * Temperature and density from pressure and either enthalpy or entropy, in one phase. The result is left in the fields,
 * and the equation's last state is within `LAST_STEP` of it.
 */
export class CaloricSearch {
  /** K */
  temperature = NaN;
  /** kg/m3 */
  density = NaN;
  /** J/kg */
  enthalpy = NaN;
  /** J/(kg K) */
  entropy = NaN;

  constructor(
    private readonly name: string,
    private readonly equation: HelmholtzEquation,
    private readonly boundary: PhaseBoundary,
    private readonly search: DensitySearch,
  ) {}

  /**
   * Newton's method in temperature and density at once, from a good guess; a step costs one evaluation. Unlike steps of
   * one variable at a time, the linear system stays well-conditioned at the critical point.
   *
   * @returns false where it does not settle
   */
  refine(kind: Caloric, pressure: number, value: number, firstTemperature: number, firstDensity: number): boolean {
    const { equation } = this;
    const gasLike = GAS_LIKE * this.boundary.criticalDensity;
    let temperature = firstTemperature;
    let density = firstDensity;
    for (let i = 0; i < FAST_STEPS; i++) {
      equation.setTemperature(temperature);
      equation.setState(density);
      const byDensity = equation.pressureByDensity;
      const slope = equation.pressureByTemperature / density;
      const heatCapacity = equation.isochoricHeatCapacity;
      // dp = rho slope dT + byDensity drho and T ds = heatCapacity dT - (T slope / rho) drho, with dh = T ds + dp / rho
      const determinant = byDensity * heatCapacity + temperature * slope * slope;
      if (!(determinant > 0) || !(byDensity > 0)) return false;
      const found = equation.pressure;
      const miss = pressure - found;
      // The logarithm of pressure, nearly linear in a gas, as 2 (p - q) / (p + q)
      const isGas = density < gasLike;
      const push = isGas ? (2 * found * miss) / (pressure + found) : miss;
      const heat = kind === ENTHALPY ? value - equation.enthalpy - push / density : temperature * (value - equation.entropy);
      let t = (byDensity * heat + (temperature * slope * push) / density) / (determinant * temperature);
      let r = (heatCapacity * push - density * slope * heat) / (determinant * density);
      if (Math.abs(t) <= LAST_STEP && Math.abs(r) <= LAST_STEP) {
        this.settle(kind, value, miss, temperature * (1 + t), density * (1 + r));
        return true;
      }
      t = Math.max(-LONGEST_STEP, Math.min(LONGEST_STEP, t));
      if (!isGas) {
        r = Math.max(-LONGEST_STEP, Math.min(LONGEST_STEP, r));
        temperature *= 1 + t;
        density *= 1 + r;
        continue;
      }
      // In a gas enthalpy is linear in temperature, entropy in its logarithm, density's logarithm in temperature's.
      if (kind === ENTHALPY) {
        temperature *= 1 + t;
        r += (t * t) / (2 + t);
      } else {
        temperature *= (2 + t) / (2 - t);
      }
      r = Math.max(-LONGEST_STEP, Math.min(LONGEST_STEP, r));
      density *= (2 + r) / (2 - r);
    }
    return false;
  }

  /**
   * Where a state would move by first order for the values given: a start for `refine`, left in `temperature` and `density`.
   *
   * @returns false where the state is too far away, or no state of one phase
   */
  predict(kind: Caloric, pressure: number, value: number, state: State): boolean {
    const { temperature, density, isobaricHeatCapacity, isochoricHeatCapacity, speedOfSound } = state;
    const push = pressure - state.pressure;
    if (!(Math.abs(push) < NEAR * pressure)) return false;
    // (dp/drho)_T = w^2 cv / cp, and (dp/dT)_rho / rho from cp - cv = T (dp/dT)^2 / (rho^2 (dp/drho)_T)
    const byDensity = (speedOfSound * speedOfSound * isochoricHeatCapacity) / isobaricHeatCapacity;
    const slope = Math.sqrt(((isobaricHeatCapacity - isochoricHeatCapacity) * byDensity) / temperature);
    const heat = kind === ENTHALPY ? value - state.enthalpy - push / density : temperature * (value - state.entropy);
    const warmer = (heat + (temperature * slope * push) / (density * byDensity)) / isobaricHeatCapacity;
    const denser = (push - density * slope * warmer) / byDensity;
    this.temperature = temperature + warmer;
    this.density = density + denser;
    return Math.abs(warmer) < NEAR * temperature && Math.abs(denser) < NEAR * density;
  }

  /**
   * The same as `refine`, with temperature kept inside a bracket and density solved afresh at each: slow, and does not fail.
   * Enthalpy and entropy rise with temperature at constant pressure.
   *
   * @param side which phase it is, below the critical temperature
   * @returns 0, or -1 or 1 where the value lies below that at `low` (K) or above that at `high` (K)
   * @throws NoConvergenceError where it fails nonetheless
   */
  bracketed(kind: Caloric, pressure: number, value: number, side: Side, low: number, high: number): -1 | 0 | 1 {
    if (this.step(kind, pressure, value, side, low) < -LAST_STEP * low) return -1;
    if (this.step(kind, pressure, value, side, high) > LAST_STEP * high) return 1;
    let bottom = low;
    let top = high;
    let temperature = 0.5 * (low + high);
    let moved = high - low;
    for (let i = 0; i < SAFE_STEPS; i++) {
      const step = this.step(kind, pressure, value, side, temperature);
      if (Math.abs(step) <= LAST_STEP * temperature || top - bottom <= 4e-16 * top) {
        const { equation } = this;
        const miss = pressure - equation.pressure;
        const change = (miss - equation.pressureByTemperature * step) / equation.pressureByDensity;
        this.settle(kind, value, miss, temperature + step, equation.density + change);
        return 0;
      }
      if (step > 0) bottom = temperature;
      else top = temperature;
      // Halves the bracket where Newton's steps leave it or do not shrink, as on either side of a steep rise.
      const next = temperature + step;
      const bold = next > bottom && next < top && 2 * Math.abs(step) < moved;
      const before = temperature;
      temperature = bold ? next : 0.5 * (bottom + top);
      moved = Math.abs(temperature - before);
    }
    throw new NoConvergenceError(
      this.name,
      `temperature at ${pressure} Pa and ${kind === ENTHALPY ? `enthalpy ${value} J/kg` : `entropy ${value} J/(kg K)`}`,
    );
  }

  /** The density (kg/m3) of the stable phase, which below the critical temperature is the one on `side`. */
  densityAt(temperature: number, pressure: number, side: Side): number {
    if (temperature >= this.boundary.criticalTemperature) return this.search.above(temperature, pressure);
    return side === LIQUID_SIDE
      ? this.search.liquid(temperature, pressure, this.boundary.liquidDensityGuess(temperature))
      : this.search.gas(temperature, pressure, this.boundary);
  }

  /** K by which temperature has to change at constant pressure, by first order. Sets the equation's state. */
  private step(kind: Caloric, pressure: number, value: number, side: Side, temperature: number): number {
    const { equation } = this;
    const density = this.densityAt(temperature, pressure, side);
    equation.setTemperature(temperature);
    equation.setState(density);
    const miss = pressure - equation.pressure;
    const slope = equation.pressureByTemperature / density;
    const heat = kind === ENTHALPY ? value - equation.enthalpy - miss / density : temperature * (value - equation.entropy);
    return (
      (equation.pressureByDensity * heat + (temperature * slope * miss) / density) /
      (equation.pressureByDensity * equation.isochoricHeatCapacity + temperature * slope * slope)
    );
  }

  /** Moves the equation's state by first order, dh = T ds + dp / rho, to the values given. */
  private settle(kind: Caloric, value: number, pressureMiss: number, temperature: number, density: number): void {
    const { equation } = this;
    this.temperature = temperature;
    this.density = density;
    if (kind === ENTHALPY) {
      this.enthalpy = value;
      this.entropy = equation.entropy + (value - equation.enthalpy - pressureMiss / density) / temperature;
    } else {
      this.entropy = value;
      this.enthalpy = equation.enthalpy + temperature * (value - equation.entropy) + pressureMiss / density;
    }
  }
}
