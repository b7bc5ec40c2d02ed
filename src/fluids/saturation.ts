/** Both ends of the two-phase region at one pressure, SI units, mass-based. For a pure fluid both temperatures are one. */
export interface Saturation {
  /** Pa */
  readonly pressure: number;
  /** K, where the liquid begins to boil */
  readonly bubbleTemperature: number;
  /** K, where the gas begins to condense */
  readonly dewTemperature: number;
  /** kg/m3, at the bubble point */
  readonly liquidDensity: number;
  /** kg/m3, at the dew point */
  readonly vapourDensity: number;
  /** J/kg */
  readonly liquidEnthalpy: number;
  /** J/kg */
  readonly vapourEnthalpy: number;
  /** J/(kg K) */
  readonly liquidEntropy: number;
  /** J/(kg K) */
  readonly vapourEntropy: number;
  /** J/(kg K), at the dew point */
  readonly vapourHeatCapacity: number;
  /** J/(kg K), at the bubble point */
  readonly liquidHeatCapacity: number;
}

/** Which phase is stable at a temperature below the end of the two-phase region. */
export type Side = -1 | 0 | 1;
export const GAS_SIDE = -1;
export const TWO_PHASE_SIDE = 0;
export const LIQUID_SIDE = 1;

/** The two-phase region of a fluid, whichever way it is defined. */
export interface PhaseBoundary {
  /** K, where the two-phase region ends */
  readonly criticalTemperature: number;
  /** Pa */
  readonly criticalPressure: number;
  /** kg/m3 */
  readonly criticalDensity: number;
  /** Pa; saturated liquid at a lower pressure would freeze */
  readonly lowestPressure: number;

  /** Pressure (Pa) at which liquid of this temperature (K) begins to boil. NaN above the critical temperature. */
  bubblePressure(temperature: number): number;
  /** Pressure (Pa) at which gas of this temperature (K) begins to condense. NaN above the critical temperature. */
  dewPressure(temperature: number): number;
  /** Which phase is stable at a temperature (K) below the critical one and a pressure (Pa). */
  side(temperature: number, pressure: number): Side;
  /** Solves both ends of the two-phase region at a pressure (Pa) below the critical one. */
  solve(pressure: number): Saturation;
  /** K, of the coldest gas at a pressure (Pa) below `lowestPressure` */
  lowestGasTemperature(pressure: number): number;
  /**
   * Pressure (Pa) of the two-phase state with this temperature (K, below the critical one) and density (kg/m3); NaN where
   * the fluid is in one phase.
   *
   * @throws OutOfRangeError where its liquid would freeze, or where there is no such state
   */
  pressureInside(temperature: number, density: number): number;
  /** kg/m3, roughly, of saturated liquid at a temperature (K) below the critical one */
  liquidDensityGuess(temperature: number): number;
  /** kg/m3, roughly, of saturated vapour at a temperature (K) below the critical one */
  vapourDensityGuess(temperature: number): number;
}
