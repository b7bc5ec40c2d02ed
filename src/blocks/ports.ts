import type { Fluid } from "../fluids/fluid.js";
import type { State } from "../fluids/state.js";
import type { Stream } from "./stream.js";

/** The state of a stream, flashed from its pressure and enthalpy and kept on the stream to start the next flash. */
export function flash(fluid: Fluid, stream: Stream): State {
  return fluid.pressureEnthalpy(stream.pressure, stream.enthalpy, stream.state);
}

/**
 * A port that the network is bound to have connected.
 * @throws Error when it is missing, which is a fault of the program.
 */
export function surely<T>(port: T | undefined): T {
  if (port === undefined) throw new Error("a block was placed without all of its ports");
  return port;
}
