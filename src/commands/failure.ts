import { NO_STEADY_STATE, WRONG_INPUT, type Terminal } from "./command.js";

/** Says what went wrong in words for the user, and returns the exit status; null for what is nobody's fault but the program's. */
export function explain(error: unknown, terminal: Terminal): number | null {
  if (!(error instanceof Error)) return null;
  switch (error.name) {
    case "InputError":
      terminal.tell(error.message);
      return WRONG_INPUT;
    case "NoSteadyState":
      terminal.tell(`No steady state. ${error.message}`);
      return NO_STEADY_STATE;
    case "OutOfRangeError":
    case "NotFiniteError":
    case "UnknownFluidError":
    case "NoCorrelationError":
      terminal.tell(error.message);
      return WRONG_INPUT;
    case "NoConvergenceError":
      terminal.tell(error.message);
      return NO_STEADY_STATE;
    default:
      return null;
  }
}
