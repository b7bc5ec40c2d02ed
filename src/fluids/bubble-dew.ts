import { PressureCurve } from "./curve.js";
import { OutOfRangeError } from "./errors.js";
import type { DensitySearch } from "./density.js";
import type { BubbleAndDewCurves, FluidData } from "./fluid-data.js";
import type { HelmholtzEquation } from "./helmholtz.js";
import { polynomial } from "./polynomial.js";
import { bracketedRoot } from "./root.js";
import { GAS_SIDE, LIQUID_SIDE, TWO_PHASE_SIDE, type PhaseBoundary, type Saturation, type Side } from "./saturation.js";

/** Share of the end's pressure by which the highest pressure with two phases lies below it. */
const BELOW_END = 1e-12;
/** Bubble over dew pressure at one temperature is at most this; 2.15 where air freezes. */
const WIDEST = 2.3;
/** Relative distances from a curve's end between which it is searched for a first passage of the end's pressure. */
const FAR_BEFORE_END = 0.02;
const NEAR_END = 1e-6;
/** Halvings that exhaust double precision from there. */
const HALVINGS = 50;
/** Share of density within which a state counts as lying on the boundary. */
const ROUND_OFF = 1e-9;

/**
 * The two-phase region of a mixture treated as one fluid: its bubble and dew temperatures follow from two published
 * pressure curves, the saturated densities from the equation of state on those curves.
 */
export class BubbleDewBoundary implements PhaseBoundary {
  readonly criticalTemperature: number;
  readonly criticalPressure: number;
  readonly criticalDensity: number;
  readonly lowestPressure: number;

  private readonly name: string;
  private readonly lowest: number;
  private readonly bubble: PressureCurve;
  private readonly dew: PressureCurve;

  constructor(
    data: FluidData,
    private readonly curves: BubbleAndDewCurves,
    private readonly equation: HelmholtzEquation,
    private readonly search: DensitySearch,
  ) {
    const { endTemperature, endPressure, endDensity, bubblePressure, dewPressure } = curves;
    this.criticalTemperature = endTemperature;
    this.criticalPressure = endPressure;
    this.criticalDensity = endDensity * data.molarMass;
    const lowest = data.range.minimumTemperature;
    this.name = data.name;
    this.lowest = lowest;
    const whole = new PressureCurve(bubblePressure, endTemperature, endPressure, lowest, endTemperature);
    this.bubble = new PressureCurve(bubblePressure, endTemperature, endPressure, lowest, firstPassing(whole, endPressure, endTemperature));
    this.dew = new PressureCurve(dewPressure, endTemperature, endPressure, lowest, endTemperature);
    this.lowestPressure = this.bubble.pressure(lowest);
  }

  bubblePressure(temperature: number): number {
    return temperature > this.criticalTemperature ? NaN : this.bubble.pressure(temperature);
  }

  dewPressure(temperature: number): number {
    return temperature > this.criticalTemperature ? NaN : this.dew.pressure(temperature);
  }

  side(temperature: number, pressure: number): Side {
    if (pressure >= this.criticalPressure) return LIQUID_SIDE;
    const dewPressure = this.dew.pressure(temperature);
    if (pressure <= dewPressure) return GAS_SIDE;
    if (pressure > WIDEST * dewPressure) return LIQUID_SIDE;
    return pressure >= this.bubble.pressure(temperature) ? LIQUID_SIDE : TWO_PHASE_SIDE;
  }

  solve(pressure: number): Saturation {
    const { equation, search } = this;
    const bubbleTemperature = this.bubble.temperature(pressure);
    const liquidDensity = search.liquid(bubbleTemperature, pressure, this.liquidDensityGuess(bubbleTemperature));
    equation.setState(liquidDensity);
    const liquidEnthalpy = equation.enthalpy;
    const liquidEntropy = equation.entropy;
    const liquidHeatCapacity = equation.isobaricHeatCapacity();
    const dewTemperature = this.dew.temperature(pressure);
    const vapourDensity = search.gas(dewTemperature, pressure, this);
    equation.setState(vapourDensity);
    return {
      pressure,
      bubbleTemperature,
      dewTemperature,
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

  lowestGasTemperature(pressure: number): number {
    const { lowest } = this;
    return pressure <= this.dew.pressure(lowest) ? lowest : this.dew.temperature(pressure);
  }

  /** The pressure at which volume, in proportion to quality as temperature is, comes to the density given. */
  pressureInside(temperature: number, density: number): number {
    const { equation, search, criticalPressure, lowestPressure } = this;
    const dewPressure = this.dew.pressure(temperature);
    if (density <= search.gas(temperature, dewPressure, this)) return NaN;
    let bubblePressure = this.bubble.pressure(temperature);
    if (temperature <= this.bubble.highest) {
      if (density >= search.liquid(temperature, bubblePressure, this.liquidDensityGuess(temperature))) return NaN;
    } else {
      // Here the bubble curve runs above the end of the region.
      equation.setTemperature(temperature);
      equation.setDensity(density);
      if (equation.pressure >= criticalPressure) return NaN;
      bubblePressure = criticalPressure * (1 - BELOW_END);
    }
    const lighter = (pressure: number): number => {
      const { bubbleTemperature, dewTemperature, liquidDensity, vapourDensity } = this.solve(pressure);
      const quality = (temperature - bubbleTemperature) / (dewTemperature - bubbleTemperature);
      return density * ((1 - quality) / liquidDensity + quality / vapourDensity) - 1;
    };
    const least = Math.max(dewPressure, lowestPressure);
    const atLeast = lighter(least);
    const atMost = lighter(bubblePressure);
    if (!(atLeast >= -ROUND_OFF) || !(atMost <= ROUND_OFF)) {
      throw new OutOfRangeError(this.name, {
        quantity: `density at ${temperature} K`,
        value: density,
        minimum: density / (1 + atLeast),
        maximum: density / (1 + atMost),
        unit: "kg/m3",
        reason: atLeast < 0 ? "where its liquid freezes" : "where the model's two-phase region ends short of the fluid beyond it",
        subject: "two-phase states are",
      });
    }
    if (atLeast <= 0) return least;
    if (atMost >= 0) return bubblePressure;
    return bracketedRoot(lighter, least, bubblePressure, {}, atLeast, atMost);
  }

  liquidDensityGuess(temperature: number): number {
    return this.criticalDensity * polynomial(this.curves.guess.liquidDensity, this.distance(temperature));
  }

  vapourDensityGuess(temperature: number): number {
    const compressibility = polynomial(this.curves.guess.vapourCompressibility, this.distance(temperature));
    return this.dew.pressure(temperature) / (compressibility * this.equation.specificGasConstant * temperature);
  }

  private distance(temperature: number): number {
    return Math.cbrt(Math.max(0, 1 - temperature / this.criticalTemperature));
  }
}

/**
 * K, the lowest temperature at which a curve reaches the pressure of its end: air's bubble-point curve rises a little
 * above its end before it comes down to it, and that last stretch lies above the end of the two-phase region.
 */
function firstPassing(curve: PressureCurve, pressure: number, end: number): number {
  let distance = FAR_BEFORE_END;
  while (curve.pressure(end * (1 - distance)) < pressure && distance > NEAR_END) distance *= 0.8;
  let low = end * (1 - distance / 0.8);
  let high = end * (1 - distance);
  for (let i = 0; i < HALVINGS; i++) {
    const middle = 0.5 * (low + high);
    if (curve.pressure(middle) < pressure) low = middle;
    else high = middle;
  }
  return low;
}
