import { State } from "../fluids/state.js";

/** The gas between two blocks. The solver moves the enthalpy; pressure and mass flow are planned before. */
export class Stream {
  /** Pa */
  pressure = NaN;
  /** J/kg */
  enthalpy = NaN;
  /** kg/s */
  massFlow = NaN;
  /** Scratch for flashes at this place: the last state here starts the next flash. */
  readonly state = new State();
}
