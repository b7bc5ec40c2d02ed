import { saturationTemperature, type SaturationCurve } from "./frost-curve.js";

/** Triple point of water, K and Pa (IAPWS R14-08). */
export const WATER_TRIPLE_TEMPERATURE = 273.16;
const TRIPLE_PRESSURE = 611.657;
const CRITICAL_TEMPERATURE = 647.096;
const CRITICAL_PRESSURE = 22.064e6;

/** kg/mol (IAPWS-95) */
export const WATER_MOLAR_MASS = 0.018015268;

/** Over liquid water, from the triple point to the critical point: W. Wagner and A. Pruss, J. Phys. Chem. Ref. Data 22 (1993) 783, eq. 1. */
const OVER_LIQUID: readonly (readonly [coefficient: number, exponent: number])[] = [
  [-7.85951783, 1],
  [1.84408259, 1.5],
  [-11.7866497, 3],
  [22.6807411, 3.5],
  [-15.9618719, 4],
  [1.80122502, 7.5],
];

/** Over ice Ih, 50 K to the triple point: IAPWS R14-08(2011), eq. 6. */
const OVER_ICE: readonly (readonly [coefficient: number, exponent: number])[] = [
  [-21.2144006, 0.00333333333],
  [27.3203819, 1.20666667],
  [-6.1059813, 1.70333333],
];

function sum(terms: typeof OVER_ICE, argument: number): number {
  return terms.reduce((total, [coefficient, exponent]) => total + coefficient * argument ** exponent, 0);
}

const liquid: SaturationCurve = {
  lowest: WATER_TRIPLE_TEMPERATURE,
  highest: CRITICAL_TEMPERATURE,
  lnPressure: (temperature) =>
    Math.log(CRITICAL_PRESSURE) + (CRITICAL_TEMPERATURE / temperature) * sum(OVER_LIQUID, Math.max(0, 1 - temperature / CRITICAL_TEMPERATURE)),
};

const ice: SaturationCurve = {
  lowest: 50,
  highest: WATER_TRIPLE_TEMPERATURE,
  lnPressure(temperature) {
    const reduced = temperature / WATER_TRIPLE_TEMPERATURE;
    return Math.log(TRIPLE_PRESSURE) + sum(OVER_ICE, reduced) / reduced;
  },
};

/**
 * Vapour pressure (Pa) of water at a temperature (K): over ice below the triple point, over liquid above it. Beyond the
 * curves' ends (50 K, the critical temperature) that of the end.
 */
export function waterVapourPressure(temperature: number): number {
  const curve = temperature < WATER_TRIPLE_TEMPERATURE ? ice : liquid;
  return Math.exp(curve.lnPressure(Math.min(curve.highest, Math.max(curve.lowest, temperature))));
}

/** Vapour pressure (Pa) over liquid water: relative humidity is stated over the liquid, supercooled or not. */
export function liquidWaterVapourPressure(temperature: number): number {
  return Math.exp(liquid.lnPressure(Math.min(temperature, CRITICAL_TEMPERATURE)));
}

/** Temperature (K) at which water vapour of a partial pressure (Pa) begins to leave the gas: as ice below the triple point, else as dew. */
export function waterDewPoint(partialPressure: number): number {
  return saturationTemperature(partialPressure < TRIPLE_PRESSURE ? ice : liquid, partialPressure);
}
