import { carbonDioxideFrostPoint, carbonDioxideSublimationPressure } from "./carbon-dioxide.js";
import { liquidWaterVapourPressure, waterDewPoint, waterVapourPressure } from "./water.js";

/** What air carries besides its own three gases, mol per mol of dry air. */
export interface Contents {
  readonly water: number;
  readonly carbonDioxide: number;
}

/** mol/mol of dry air: the atmosphere's carbon dioxide, rounded. */
export const ATMOSPHERIC_CARBON_DIOXIDE = 420e-6;

/**
 * Water (mol per mol of dry air) at a temperature (K), pressure (Pa) and relative humidity (0 to 1, over liquid water as
 * hygrometers read it, below 0 degC too).
 */
export function humidityRatio(temperature: number, pressure: number, relativeHumidity: number): number {
  return ratio(relativeHumidity * liquidWaterVapourPressure(temperature), pressure);
}

/** The most water (mol per mol of dry air) that stays vapour at a temperature (K) and pressure (Pa), ideal mixing; infinite where water boils. */
export function waterAtSaturation(temperature: number, pressure: number): number {
  return ratio(waterVapourPressure(temperature), pressure);
}

/** The most carbon dioxide (mol per mol of dry air) that stays vapour over its frost at a temperature (K) and pressure (Pa), ideal mixing. */
export function carbonDioxideAtSaturation(temperature: number, pressure: number): number {
  return carbonDioxideSublimationPressure(temperature) / pressure;
}

/** Dew or frost point (K) of air's water (mol per mol of dry air) under a pressure (Pa); null where there is none. */
export function dewPoint(water: number, pressure: number): number | null {
  return water > 0 ? waterDewPoint((water / (1 + water)) * pressure) : null;
}

/** Frost point (K) of air's carbon dioxide (mol per mol of dry air) under a pressure (Pa); null where there is none. */
export function frostPoint(carbonDioxide: number, pressure: number): number | null {
  return carbonDioxide > 0 ? carbonDioxideFrostPoint(carbonDioxide * pressure) : null;
}

function ratio(partialPressure: number, pressure: number): number {
  return partialPressure < pressure ? partialPressure / (pressure - partialPressure) : Infinity;
}
