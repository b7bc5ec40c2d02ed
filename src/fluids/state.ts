/** Which side of the phase boundaries a state lies on. */
export type Phase = "liquid" | "two-phase" | "gas" | "supercritical";

/**
 * One thermodynamic state, SI units, written in place by the flashes of a fluid so that a solver can reuse it.
 * Mass-based. Enthalpy and entropy are zero in the saturated liquid at 101.325 kPa (air: at its bubble point).
 *
 * A property that has no meaning where the state lies holds NaN: heat capacities and the speed of sound between
 * bubble and dew, the vapour fraction above the critical pressure. `Fluid.at` turns those into null.
 */
export class State {
  /** K */
  temperature = NaN;
  /** Pa */
  pressure = NaN;
  /** kg/m3 */
  density = NaN;
  /** J/kg */
  enthalpy = NaN;
  /** J/(kg K) */
  entropy = NaN;
  /** J/kg */
  internalEnergy = NaN;
  /** J/(kg K) */
  isobaricHeatCapacity = NaN;
  /** J/(kg K) */
  isochoricHeatCapacity = NaN;
  /** m/s */
  speedOfSound = NaN;
  /** Mass of vapour over mass of fluid: 0 in the liquid, 1 in the gas, NaN above the critical pressure. */
  vapourFraction = NaN;
  phase: Phase = "gas";
}
