import { saturationTemperature, type SaturationCurve } from "./frost-curve.js";

/** Triple point of carbon dioxide, K and Pa (Span and Wagner 1996). */
const TRIPLE_TEMPERATURE = 216.592;
const TRIPLE_PRESSURE = 517950;

/** kg/mol (Span and Wagner 1996) */
export const CARBON_DIOXIDE_MOLAR_MASS = 0.0440098;

/**
 * Sublimation pressure: R. Span and W. Wagner, J. Phys. Chem. Ref. Data 25 (1996) 1509, eq. 3.12. Its data end at 154 K; below, it
 * is an extrapolation, at 120 K some 10 % under the fit of Fray and Schmitt (2009), which moves a frost point by 0.6 K.
 */
const solid: SaturationCurve = {
  lowest: 50,
  highest: TRIPLE_TEMPERATURE,
  lnPressure(temperature) {
    const below = Math.max(0, 1 - temperature / TRIPLE_TEMPERATURE);
    const series = -14.740846 * below + 2.4327015 * below ** 1.9 - 5.3061778 * below ** 2.9;
    return Math.log(TRIPLE_PRESSURE) + (TRIPLE_TEMPERATURE / temperature) * series;
  },
};

/** Vapour pressure (Pa) over solid carbon dioxide at a temperature (K); above the triple point the triple point's. */
export function carbonDioxideSublimationPressure(temperature: number): number {
  return Math.exp(solid.lnPressure(Math.min(solid.highest, Math.max(solid.lowest, temperature))));
}

/** Temperature (K) at which carbon dioxide of a partial pressure (Pa, below the triple point's) begins to freeze out of the gas. */
export function carbonDioxideFrostPoint(partialPressure: number): number {
  return saturationTemperature(solid, partialPressure);
}
