import type { State } from "./state.js";

/** Viscosity and thermal conductivity of one fluid in one phase. */
export interface TransportModel {
  /** Pa s */
  viscosity(state: State): number;
  /** W/(m K) */
  thermalConductivity(state: State): number;
  /** Why there is no thermal conductivity in a state, as a clause; null where there is. */
  conductivityReason(state: State): string | null;
}
