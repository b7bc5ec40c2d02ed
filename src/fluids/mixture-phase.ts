import type { PairParameters } from "./data/air-mixture.js";
import type { FluidData } from "./fluid-data.js";
import { IdealHelmholtz } from "./ideal.js";
import { ReducingFunctions } from "./reducing.js";
import { ResidualHelmholtz } from "./residual.js";

/** J/(mol K), CODATA 2018, exact */
export const GAS_CONSTANT = 8.31446261815324;
/** Steps that Newton's search for density may take; it takes 3 to 8. */
const MOST_STEPS = 60;
/** Relative step after which the next is below round-off. */
const LAST_STEP = 1e-9;
/** Liquid density over the reducing density where nothing better is known; denser than a liquid near its bubble point. */
const DENSE = 3.2;

/**
 * One phase of a mixture: the components' residual equations at the mixture's reduced temperature and density
 * (Kunz and Wagner 2012, with no departure function). Molar; results are left in the fields.
 */
export class MixturePhase {
  /** mole fractions */
  readonly x: Float64Array;
  /** ln of the fugacity coefficients, of the last `fugacities` */
  readonly logFugacity: Float64Array;
  /** mol/m3, of the last `density` search; NaN where this side has no root */
  density = NaN;
  private readonly residuals: readonly ResidualHelmholtz[];
  private readonly ideals: readonly IdealHelmholtz[];
  private readonly reducing: ReducingFunctions;
  private temperature = NaN;
  private pressure = NaN;
  private slope = NaN;

  constructor(
    private readonly components: readonly FluidData[],
    pairs: readonly PairParameters[],
  ) {
    this.x = new Float64Array(components.length);
    this.logFugacity = new Float64Array(components.length);
    this.residuals = components.map(({ residual }) => new ResidualHelmholtz(residual));
    this.ideals = components.map(({ ideal }) => new IdealHelmholtz(ideal));
    this.reducing = new ReducingFunctions(components, pairs);
  }

  /** Sets the temperature (K); the composition is read from `x`. */
  set(temperature: number): void {
    this.temperature = temperature;
    this.reducing.set(this.x);
    const tau = this.reducing.temperature / temperature;
    for (const residual of this.residuals) residual.setTau(tau);
  }

  /** Pressure and its slope at a density (mol/m3). */
  private evaluate(density: number): void {
    const { residuals, x } = this;
    const delta = density / this.reducing.density;
    let first = 0;
    let second = 0;
    for (let i = 0; i < x.length; i++) {
      residuals[i].setDelta(delta);
      first += x[i] * residuals[i].delta1;
      second += x[i] * residuals[i].delta2;
    }
    const scale = GAS_CONSTANT * this.temperature;
    this.pressure = density * scale * (1 + first);
    this.slope = scale * (1 + 2 * first + second);
  }

  /**
   * Finds the density at a pressure (Pa) on the liquid or the vapour side, from a guess or from none; false where that
   * side has no stable root.
   */
  findDensity(pressure: number, side: "liquid" | "vapour", guess = NaN): boolean {
    if (guess > 0 && this.newton(pressure, guess, side)) return true;
    const start = side === "liquid" ? DENSE * this.reducing.density : (0.9 * pressure) / (GAS_CONSTANT * this.temperature);
    return this.newton(pressure, start, side);
  }

  private newton(pressure: number, start: number, side: "liquid" | "vapour"): boolean {
    let density = start;
    this.density = NaN;
    for (let i = 0; i < MOST_STEPS; i++) {
      this.evaluate(density);
      if (!(this.slope > 0)) {
        // Inside the unstable region: back out towards the side asked for.
        density *= side === "liquid" ? 1.05 : 0.9;
        if (density > 4.5 * this.reducing.density) return false;
        continue;
      }
      const step = (pressure - this.pressure) / this.slope;
      const limit = 0.2 * density;
      density += Math.max(-limit, Math.min(limit, step));
      if (Math.abs(step) <= LAST_STEP * density) {
        const right = side === "liquid" ? density > 0.8 * this.reducing.density : density < 1.2 * this.reducing.density;
        if (!right) return false;
        this.density = density;
        return true;
      }
    }
    return false;
  }

  /** Leaves ln of the fugacity coefficients at the density found (Kunz and Wagner 2012, table B4). */
  fugacities(): void {
    const { residuals, x, reducing, logFugacity } = this;
    const delta = this.density / reducing.density;
    let first = 0;
    let tau1 = 0;
    for (let i = 0; i < x.length; i++) {
      residuals[i].setDeltaFully(delta);
      first += x[i] * residuals[i].delta1;
      tau1 += x[i] * residuals[i].tau1;
    }
    const logCompressibility = Math.log(1 + first);
    for (let i = 0; i < x.length; i++) {
      logFugacity[i] =
        residuals[i].value +
        first * (1 + reducing.volumeByMoles[i]) +
        tau1 * reducing.temperatureByMoles[i] -
        logCompressibility;
    }
  }

  /** J/mol, on the components' own zeros, at the density found. */
  enthalpy(): number {
    const { residuals, ideals, components, x, temperature } = this;
    const delta = this.density / this.reducing.density;
    let sum = 1;
    for (let i = 0; i < x.length; i++) {
      residuals[i].setDeltaFully(delta);
      ideals[i].setTau(components[i].reducingTemperature / temperature);
      sum += x[i] * (residuals[i].delta1 + residuals[i].tau1 + ideals[i].tau1);
    }
    return GAS_CONSTANT * temperature * sum;
  }
}
