import { PressureCurve } from "./curve.js";
import { NoConvergenceError } from "./errors.js";
import type { FluidData, VapourPressureCurve } from "./fluid-data.js";
import type { HelmholtzEquation } from "./helmholtz.js";
import { polynomial } from "./polynomial.js";
import { GAS_SIDE, LIQUID_SIDE, type PhaseBoundary, type Saturation, type Side } from "./saturation.js";

/** Relative step of densities and temperature after which the next one is below round-off, Newton's steps squaring themselves. */
const LAST_STEP = 1e-9;
/** Round-off of a difference of Helmholtz energies, over R T. */
const ROUND_OFF = 1e-15;
/** Steps of a search; it takes 3 to 6, near the critical point some tens until round-off lets it settle. */
const MOST_STEPS = 200;
/** Share by which a guessed density that lies inside the unstable region is moved out of it at a time. */
const OUTWARD = 0.02;
/** Share of the critical pressure from which temperature is approached step by step. */
const NEARLY_CRITICAL = 0.97;
/** Relative step of temperature there after which the next one is below round-off. */
const LAST_APPROACH = 1e-8;
/** Largest relative change of temperature in one step. */
const LONGEST_STEP = 0.05;
/** Share by which the guessed saturated densities may err. */
const DENSITY_MARGIN = 0.05;
/**
 * Share of the critical temperature below it within which the two densities are too near for round-off, which then moves
 * them by more than 1e-9: there they follow from the equation's expansion about its critical point,
 * (rho_l - rho_v) / 2 = x (b + c x^2) and (rho_l + rho_v) / 2 = rho_c + d x^2 with x^2 = 1 - T / T_c,
 * whose coefficients come from this distance and `FURTHER` times it, and whose next terms are below 1e-7 of density.
 */
const NEAR_CRITICAL = 1e-6;
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

  // The coexisting phases at `temperature`, after `coexist`.
  private temperature = NaN;
  private pressure = NaN;
  private pressureByTemperature = NaN;
  private liquidDensity = NaN;
  private vapourDensity = NaN;

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
    this.coexist(this.lowest);
    this.lowestPressure = this.pressure;
  }

  bubblePressure(temperature: number): number {
    if (temperature > this.criticalTemperature) return NaN;
    this.coexist(temperature);
    return this.pressure;
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
    return pressure >= this.pressure ? LIQUID_SIDE : GAS_SIDE;
  }

  lowestGasTemperature(): number {
    return this.lowest;
  }

  pressureInside(temperature: number, density: number): number {
    if (density > (1 + DENSITY_MARGIN) * this.liquidDensityGuess(temperature)) return NaN;
    if (density < (1 - DENSITY_MARGIN) * this.vapourDensityGuess(temperature)) return NaN;
    this.coexist(temperature);
    return density > this.vapourDensity && density < this.liquidDensity ? this.pressure : NaN;
  }

  solve(pressure: number): Saturation {
    const { equation } = this;
    const temperature = this.boil(pressure);
    const { liquidDensity, vapourDensity } = this;
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
      const step = (pressure - this.pressure) / this.pressureByTemperature;
      temperature = Math.min(highest, temperature + step);
      if (Math.abs(step) > LAST_APPROACH * temperature) continue;
      this.settle(temperature, NaN);
      return temperature;
    }
    throw new NoConvergenceError(this.name, `saturation at ${pressure} Pa`);
  }

  /**
   * Newton's method in both densities and, where a pressure (Pa) is given, in temperature as well. Equal chemical
   * potential at pressure p means equal areas: a_l - a_v = p (1 / rho_v - 1 / rho_l), a the Helmholtz energy.
   */
  private settle(firstTemperature: number, pressure: number): number {
    const { equation, criticalDensity } = this;
    const { residual, specificGasConstant, reducingDensity } = equation;
    let temperature = firstTemperature;
    let liquid = this.liquidDensityGuess(temperature);
    // Near the critical point the two lie evenly about its density, and a guess farther out than that is still safe.
    let vapour = Math.min(this.vapourDensityGuess(temperature), Math.max(2 * criticalDensity - liquid, 0.5 * criticalDensity));
    equation.setTemperature(temperature);
    liquid = this.outside(liquid, OUTWARD);
    vapour = this.outside(vapour, -OUTWARD);
    for (let i = 0; i < MOST_STEPS; i++) {
      equation.setTemperature(temperature);
      const scale = specificGasConstant * temperature;
      residual.setDeltaFully(liquid / reducingDensity);
      const liquidEnergy = Math.log(liquid / criticalDensity) + residual.value;
      const liquidEntropy = residual.tau1 - liquidEnergy;
      const liquidPressure = liquid * scale * (1 + residual.delta1);
      const liquidSlope = scale * (1 + 2 * residual.delta1 + residual.delta2);
      const liquidWarming = liquid * specificGasConstant * (1 + residual.delta1 - residual.tau1delta1);
      residual.setDeltaFully(vapour / reducingDensity);
      const vapourEnergy = Math.log(vapour / criticalDensity) + residual.value;
      const vapourEntropy = residual.tau1 - vapourEnergy;
      const vapourPressure = vapour * scale * (1 + residual.delta1);
      const vapourSlope = scale * (1 + 2 * residual.delta1 + residual.delta2);
      const vapourWarming = vapour * specificGasConstant * (1 + residual.delta1 - residual.tau1delta1);
      if (!(liquidSlope > 0 && vapourSlope > 0)) break;
      const volume = 1 / vapour - 1 / liquid;
      const equalArea = (scale * (liquidEnergy - vapourEnergy)) / volume;
      const target = Number.isNaN(pressure) ? equalArea : pressure;
      let warmer = ((target - equalArea) * volume) / (specificGasConstant * (vapourEntropy - liquidEntropy));
      warmer = Math.max(-LONGEST_STEP * temperature, Math.min(LONGEST_STEP * temperature, warmer));
      const denser = (target - liquidPressure - liquidWarming * warmer) / liquidSlope;
      const thinner = (target - vapourPressure - vapourWarming * warmer) / vapourSlope;
      temperature += warmer;
      liquid += Math.max(-0.5 * liquid, Math.min(liquid, denser));
      vapour += Math.max(-0.5 * vapour, Math.min(vapour, thinner));
      const roundOff = (ROUND_OFF * scale) / volume;
      const last =
        Math.abs(denser) <= LAST_STEP * liquid + roundOff / liquidSlope &&
        Math.abs(thinner) <= LAST_STEP * vapour + roundOff / vapourSlope;
      if (last && Math.abs(warmer) <= LAST_STEP * temperature && liquid > vapour) {
        this.pressure = target;
        this.pressureByTemperature = (specificGasConstant * (vapourEntropy - liquidEntropy)) / volume;
        this.liquidDensity = liquid;
        this.vapourDensity = vapour;
        return temperature;
      }
    }
    this.temperature = NaN;
    throw new NoConvergenceError(
      this.name,
      Number.isNaN(pressure) ? `saturation at ${firstTemperature} K` : `saturation at ${pressure} Pa`,
    );
  }

  /** A density (kg/m3) moved in one direction until it is mechanically stable at the equation's temperature. */
  private outside(density: number, change: number): number {
    const { equation } = this;
    let moved = density;
    for (let i = 0; i < MOST_STEPS; i++) {
      equation.setDensity(moved);
      if (equation.pressureByDensity > 0) break;
      moved *= 1 + change;
    }
    return moved;
  }

  private expand(theta: number): void {
    const { b, c, d, pressure } = this.nearCritical();
    const x = Math.sqrt(Math.max(0, theta));
    const half = x * (b + c * theta);
    const middle = this.criticalDensity + d * theta;
    this.liquidDensity = middle + half;
    this.vapourDensity = middle - half;
    this.pressure = this.criticalPressure - ((this.criticalPressure - pressure) * theta) / NEAR_CRITICAL;
  }

  private nearCritical(): Expansion {
    if (this.expansion !== undefined) return this.expansion;
    const { criticalTemperature, criticalDensity } = this;
    const at = (theta: number): { half: number; middle: number } => {
      this.settle(criticalTemperature * (1 - theta), NaN);
      return {
        half: (this.liquidDensity - this.vapourDensity) / (2 * Math.sqrt(theta)),
        middle: (this.liquidDensity + this.vapourDensity) / 2,
      };
    };
    const further = at(FURTHER * NEAR_CRITICAL);
    const near = at(NEAR_CRITICAL);
    const c = (further.half - near.half) / ((FURTHER - 1) * NEAR_CRITICAL);
    this.temperature = NaN;
    this.expansion = {
      b: near.half - c * NEAR_CRITICAL,
      c,
      d: (near.middle - criticalDensity) / NEAR_CRITICAL,
      pressure: this.pressure,
    };
    return this.expansion;
  }
}
