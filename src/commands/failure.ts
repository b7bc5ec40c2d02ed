import { FAULT, NO_STEADY_STATE, WRONG_INPUT, type Terminal } from "./command.js";

/** Errors by their name, so that saying why a file cannot be read loads no solver. */
const STATUS: Readonly<Record<string, number>> = {
  InputError: WRONG_INPUT,
  OutOfRangeError: WRONG_INPUT,
  NotFiniteError: WRONG_INPUT,
  UnknownFluidError: WRONG_INPUT,
  FluidError: WRONG_INPUT,
  NoCorrelationError: WRONG_INPUT,
  NoSteadyState: NO_STEADY_STATE,
  NoConvergenceError: NO_STEADY_STATE,
};

/**
 * Says what went wrong in words for the user and returns the exit status. With RIMELOOP_DEBUG=1 the stack follows.
 */
export async function explain(error: unknown, terminal: Terminal): Promise<number> {
  const status = (error instanceof Error ? STATUS[error.name] : undefined) ?? FAULT;
  terminal.tell(await text(error, status));
  if (process.env.RIMELOOP_DEBUG === "1" && error instanceof Error) terminal.tell(error.stack ?? "");
  return status;
}

async function text(error: unknown, status: number): Promise<string> {
  if (status === FAULT) return `rimeloop met a fault of its own: ${String(error).replaceAll(/\s+/g, " ")}. Please report it with the input; RIMELOOP_DEBUG=1 shows where.`;
  if ((error as Error).name !== "NoSteadyState") return (error as Error).message;
  const { noSteadyState } = await import("../present/no-steady-state.js");
  return noSteadyState(error as Parameters<typeof noSteadyState>[0]);
}
