import type { HelmholtzEquation } from "./helmholtz.js";
import type { Saturation } from "./saturation.js";
import type { Phase, State } from "./state.js";

/**
 * Fills a state from the equation's last `setState`, moved by first order to exactly the pressure and entropy given
 * beside it; the moves are below 1e-10 of the state.
 */
export function writeSinglePhase(
  equation: HelmholtzEquation,
  temperature: number,
  density: number,
  pressure: number,
  enthalpy: number,
  entropy: number,
  phase: Phase,
  criticalPressure: number,
  state: State,
): State {
  state.temperature = temperature;
  state.pressure = pressure;
  state.density = density;
  state.enthalpy = enthalpy;
  state.entropy = entropy;
  state.internalEnergy = enthalpy - pressure / density;
  state.isobaricHeatCapacity = equation.isobaricHeatCapacity();
  state.isochoricHeatCapacity = equation.isochoricHeatCapacity;
  state.speedOfSound = equation.speedOfSound();
  state.vapourFraction = pressure > criticalPressure ? NaN : phase === "liquid" ? 0 : 1;
  state.phase = phase;
  return state;
}

/**
 * Fills a state between bubble and dew: enthalpy, entropy, volume and temperature run in proportion to the mass of vapour.
 * Heat capacities and the speed of sound have no meaning there.
 */
export function writeTwoPhase(saturation: Saturation, quality: number, state: State): State {
  const { bubbleTemperature, dewTemperature, liquidEnthalpy, liquidEntropy, pressure } = saturation;
  const volume = (1 - quality) / saturation.liquidDensity + quality / saturation.vapourDensity;
  const enthalpy = liquidEnthalpy + quality * (saturation.vapourEnthalpy - liquidEnthalpy);
  state.temperature = bubbleTemperature + quality * (dewTemperature - bubbleTemperature);
  state.pressure = pressure;
  state.density = 1 / volume;
  state.enthalpy = enthalpy;
  state.entropy = liquidEntropy + quality * (saturation.vapourEntropy - liquidEntropy);
  state.internalEnergy = enthalpy - pressure * volume;
  state.isobaricHeatCapacity = NaN;
  state.isochoricHeatCapacity = NaN;
  state.speedOfSound = NaN;
  state.vapourFraction = quality;
  state.phase = "two-phase";
  return state;
}
