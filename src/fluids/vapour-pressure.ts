import { Coexistence } from "./coexistence.js";
import { PressureCurve } from "./curve.js";
import { SATURATION_MARGIN } from "./density.js";
import { NoConvergenceError } from "./errors.js";
import type { FluidData, VapourPressureCurve } from "./fluid-data.js";
import type { HelmholtzEquation } from "./helmholtz.js";
import { polynomial } from "./polynomial.js";
import { GAS_SIDE, LIQUID_SIDE, type PhaseBoundary, type Saturation, type Side } from "./saturation.js";

/** Share of the critical pressure from which temperature is approached step by step. */
const NEARLY_CRITICAL = 0.97;
/** Relative step of temperature there after which the next one is below round-off. */
const LAST_APPROACH = 1e-8;
/** Steps of that approach; it takes 2 to 4. */
const MOST_STEPS = 50;
/**
 * Share of the critical temperature below it within which the two densities are too near for round-off, which then moves
 * them by more than 1e-9: there they follow from the equation's expansion about its critical point,
 * (rho_l - rho_v) / 2 = x (b + c x^2) and (rho_l + rho_v) / 2 = rho_c + d x^2 with x^2 = 1 - T / T_c,
 * whose coefficients come from this distance and `FURTHER` times it, and whose next terms are below 1e-7 of density.
 */
const NEAR_CRITICAL = 1e-7;
const FURTHER = 4;

/** The expansion of both densities about the critical point. */
interface Expansion {
  /** kg/m3 */
  readonly b: number;
  readonly c: number;
  readonly d: number;
  /** Pa, pressure at the distance `NEAR_CRITICAL` */
  readonly pressure: number;
}

/** The vapour-pressure curve of a pure fluid: where liquid and vapour have equal pressure and equal chemical potential. */
export class VapourPressureBoundary implements PhaseBoundary {
  readonly criticalTemperature: number;
  readonly criticalPressure: number;
  readonly criticalDensity: number;
  readonly lowestPressure: number;

  private readonly name: string;
  private readonly lowest: number;
  private readonly curve: PressureCurve;
  private expansion: Expansion | undefined;

  /** The coexisting phases at `temperature`. */
  private readonly phases: Coexistence;
  private temperature = NaN;

  constructor(
    data: FluidData,
    private readonly guesses: VapourPressureCurve,
    private readonly equation: HelmholtzEquation,
  ) {
    this.name = data.name;
    this.criticalTemperature = guesses.criticalTemperature;
    this.criticalPressure = guesses.criticalPressure;
    this.criticalDensity = guesses.criticalDensity * data.molarMass;
    this.lowest = data.range.minimumTemperature;
    this.curve = new PressureCurve(guesses.pressureGuess, this.criticalTemperature, this.criticalPressure, this.lowest, this.criticalTemperature);
    this.phases = new Coexistence(data.name, equation, this.criticalDensity);
    this.lowestPressure = this.bubblePressure(this.lowest);
  }

  bubblePressure(temperature: number): number {
    if (temperature > this.criticalTemperature) return NaN;
    this.coexist(temperature);
    return this.phases.pressure;
  }

  dewPressure(temperature: number): number {
    return this.bubblePressure(temperature);
  }

  side(temperature: number, pressure: number): Side {
    if (pressure >= this.criticalPressure) return LIQUID_SIDE;
    const ratio = pressure / this.curve.pressure(temperature);
    const { guessTolerance } = this.guesses;
    if (ratio > 1 + guessTolerance) return LIQUID_SIDE;
    if (ratio < 1 - guessTolerance) return GAS_SIDE;
    this.coexist(temperature);
    return pressure >= this.phases.pressure ? LIQUID_SIDE : GAS_SIDE;
  }

  lowestGasTemperature(): number {
    return this.lowest;
  }

  pressureInside(temperature: number, density: number): number {
    if (density > (1 + SATURATION_MARGIN) * this.liquidDensityGuess(temperature)) return NaN;
    if (density < (1 - SATURATION_MARGIN) * this.vapourDensityGuess(temperature)) return NaN;
    this.coexist(temperature);
    const { liquidDensity, vapourDensity, pressure } = this.phases;
    return density > vapourDensity && density < liquidDensity ? pressure : NaN;
  }

  solve(pressure: number): Saturation {
    const { equation } = this;
    const temperature = this.boil(pressure);
    const { liquidDensity, vapourDensity } = this.phases;
    equation.setTemperature(temperature);
    equation.setState(liquidDensity);
    const liquidEnthalpy = equation.enthalpy;
    const liquidEntropy = equation.entropy;
    const liquidHeatCapacity = equation.isobaricHeatCapacity();
    equation.setState(vapourDensity);
    return {
      pressure,
      bubbleTemperature: temperature,
      dewTemperature: temperature,
      liquidDensity,
      vapourDensity,
      liquidEnthalpy,
      vapourEnthalpy: equation.enthalpy,
      liquidEntropy,
      vapourEntropy: equation.entropy,
      liquidHeatCapacity,
      vapourHeatCapacity: equation.isobaricHeatCapacity(),
    };
  }

  liquidDensityGuess(temperature: number): number {
    return this.criticalDensity * polynomial(this.guesses.guess.liquidDensity, this.distance(temperature));
  }

  vapourDensityGuess(temperature: number): number {
    const compressibility = polynomial(this.guesses.guess.vapourCompressibility, this.distance(temperature));
    return this.curve.pressure(temperature) / (compressibility * this.equation.specificGasConstant * temperature);
  }

  private distance(temperature: number): number {
    return Math.cbrt(Math.max(0, 1 - temperature / this.criticalTemperature));
  }

  /** Leaves the coexisting phases at a temperature (K) up to the critical one. */
  private coexist(temperature: number): void {
    if (temperature === this.temperature) return;
    const theta = 1 - temperature / this.criticalTemperature;
    if (theta < NEAR_CRITICAL) this.expand(theta);
    else this.settle(temperature, NaN);
    this.temperature = temperature;
  }

  /** Boiling temperature (K) at a pressure (Pa) below the critical one; leaves the coexisting phases. */
  private boil(pressure: number): number {
    const { criticalPressure, criticalTemperature } = this;
    const near = this.nearCritical();
    // Over so short a distance the pressure falls in proportion to it.
    const theta = (NEAR_CRITICAL * (criticalPressure - pressure)) / (criticalPressure - near.pressure);
    let temperature: number;
    if (theta < NEAR_CRITICAL) {
      temperature = criticalTemperature * (1 - theta);
      this.expand(theta);
    } else {
      temperature =
        pressure < NEARLY_CRITICAL * criticalPressure
          ? this.settle(this.curve.roughTemperature(pressure), pressure)
          : this.approach(pressure);
    }
    this.temperature = temperature;
    return temperature;
  }

  /** The same near the critical point, where steps in temperature could leave the region: densities are solved at each. */
  private approach(pressure: number): number {
    const highest = this.criticalTemperature * (1 - NEAR_CRITICAL);
    let temperature = Math.min(highest, this.curve.temperature(pressure));
    for (let i = 0; i < MOST_STEPS; i++) {
      this.settle(temperature, NaN);
      const step = (pressure - this.phases.pressure) / this.phases.pressureByTemperature;
      temperature = Math.min(highest, temperature + step);
      if (Math.abs(step) > LAST_APPROACH * temperature) continue;
      this.settle(temperature, NaN);
      return temperature;
    }
    throw new NoConvergenceError(this.name, `saturation at ${pressure} Pa`);
  }

  /** Solves the phases at a temperature (K), or at a pressure (Pa) from that temperature. */
  private settle(temperature: number, pressure: number): number {
    // While it is solved, and if that fails, no temperature is known.
    this.temperature = NaN;
    return this.phases.solve(temperature, pressure, this.liquidDensityGuess(temperature), this.vapourDensityGuess(temperature));
  }

  private expand(theta: number): void {
    const { phases, criticalPressure } = this;
    const { b, c, d, pressure } = this.nearCritical();
    const x = Math.sqrt(Math.max(0, theta));
    const half = x * (b + c * theta);
    const middle = this.criticalDensity + d * theta;
    phases.liquidDensity = middle + half;
    phases.vapourDensity = middle - half;
    phases.pressure = criticalPressure - ((criticalPressure - pressure) * theta) / NEAR_CRITICAL;
  }

  private nearCritical(): Expansion {
    if (this.expansion !== undefined) return this.expansion;
    const { criticalTemperature, criticalDensity, phases } = this;
    const at = (theta: number): { half: number; middle: number } => {
      this.settle(criticalTemperature * (1 - theta), NaN);
      return {
        half: (phases.liquidDensity - phases.vapourDensity) / (2 * Math.sqrt(theta)),
        middle: (phases.liquidDensity + phases.vapourDensity) / 2,
      };
    };
    const further = at(FURTHER * NEAR_CRITICAL);
    const near = at(NEAR_CRITICAL);
    const c = (further.half - near.half) / ((FURTHER - 1) * NEAR_CRITICAL);
    this.expansion = {
      b: near.half - c * NEAR_CRITICAL,
      c,
      d: (near.middle - criticalDensity) / NEAR_CRITICAL,
      pressure: phases.pressure,
    };
    return this.expansion;
  }
}
