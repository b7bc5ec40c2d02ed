import { bracketedRoot } from "./root.js";

/** The pressure of a vapour in equilibrium with its ice or its liquid, over a span of temperatures. */
export interface SaturationCurve {
  /** K */
  readonly lowest: number;
  /** K */
  readonly highest: number;
  /** ln of the pressure in Pa, at a temperature (K) within the span. */
  lnPressure(temperature: number): number;
}

/**
 * Temperature (K) at which a vapour of a partial pressure (Pa) is saturated, the curve's ends where it would lie beyond them;
 * known to 1e-9 K.
 */
export function saturationTemperature({ lowest, highest, lnPressure }: SaturationCurve, partialPressure: number): number {
  const wanted = Math.log(partialPressure);
  if (!(wanted > lnPressure(lowest))) return lowest;
  if (!(wanted < lnPressure(highest))) return highest;
  // In 1/T the curve is almost a straight line.
  const inverse = bracketedRoot((reciprocal) => lnPressure(1 / reciprocal) - wanted, 1 / highest, 1 / lowest, { tolerance: 1e-15 });
  return 1 / inverse;
}
