import type { Phase } from "./state.js";

/** The two properties that fix a state. */
export type StateInput =
  | { /** K */ readonly temperature: number; /** Pa */ readonly pressure: number }
  | { /** Pa */ readonly pressure: number; /** J/kg */ readonly enthalpy: number }
  | { /** Pa */ readonly pressure: number; /** J/(kg K) */ readonly entropy: number }
  | { /** Pa */ readonly pressure: number; /** mass of vapour over mass of fluid */ readonly quality: number }
  | { /** K */ readonly temperature: number; /** kg/m3 */ readonly density: number };

/** A state in plain numbers, SI units, mass-based; null where a property has no meaning. */
export interface FluidState {
  /** K */
  readonly temperature: number;
  /** Pa */
  readonly pressure: number;
  /** kg/m3 */
  readonly density: number;
  /** J/kg */
  readonly enthalpy: number;
  /** J/(kg K) */
  readonly entropy: number;
  /** J/kg */
  readonly internalEnergy: number;
  /** J/(kg K) */
  readonly isobaricHeatCapacity: number | null;
  /** J/(kg K) */
  readonly isochoricHeatCapacity: number | null;
  /** m/s */
  readonly speedOfSound: number | null;
  /** Mass of vapour over mass of fluid: 0 in the liquid, 1 in the gas, null above the critical pressure. */
  readonly vapourFraction: number | null;
  readonly phase: Phase;
  /** Pa s; null between bubble and dew or where no correlation is at hand: `Fluid.viscosity` says which. */
  readonly viscosity: number | null;
  /** W/(m K); null likewise: `Fluid.thermalConductivity` says why. */
  readonly thermalConductivity: number | null;
}
