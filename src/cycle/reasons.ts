import { OutOfRangeError } from "../fluids/errors.js";
import { NoSteadyState } from "./failure.js";
import type { Network } from "./network.js";
import type { Pass } from "./pass.js";

/** A state that the equation of the fluid does not cover. */
export function outOfRange(pass: Pass, error: OutOfRangeError): NoSteadyState {
  const { quantity, value, minimum } = error;
  if (quantity === "pressure") {
    return new NoSteadyState(pass.failedAt, "pressure", `the gas would leave the range of the equation: ${error.message}.`, "Change the pressures.");
  }
  const { name, minimumTemperature, maximumTemperature } = pass.fluid;
  if (value < minimum) {
    return new NoSteadyState(
      pass.failedAt,
      "temperature",
      `the gas, or what a loss-free expansion would make of it, gets colder than ${minimumTemperature} K, where ${name} freezes and its equation ends.`,
      "Give the machine more heat to lift, a smaller pressure ratio or a poorer recuperator.",
    );
  }
  return new NoSteadyState(
    pass.failedAt,
    "highest temperature",
    `the gas gets hotter than ${maximumTemperature} K, where the equation of ${name} ends.`,
    "Lower the pressure ratio of a stage, or compress in more stages with cooling between them.",
  );
}

/** No fixed point in as many passes as are tried. */
export function unsettled(pass: Pass, change: Float64Array): NoSteadyState {
  let worst = 0;
  for (let i = 1; i < change.length; i++) if (Math.abs(change[i]) > Math.abs(change[worst])) worst = i;
  return new NoSteadyState(
    pass.nameOf(worst),
    "balance",
    `no steady state was found in ${pass.count} passes; the stream behind it still drifted by ${Math.abs(change[worst]).toPrecision(2)} J/kg a pass.`,
    "Change a pressure or an efficiency a little and run again.",
  );
}

/** The loads, leaks and losses exceed what the machine lifts even with its cold end at the surroundings' temperature. */
export function tooWarm({ tears, blocks, setting }: Network, change: Float64Array): NoSteadyState {
  const { temperature } = setting.surroundings;
  let asked = 0;
  let largestLoad: string | null = null;
  let heaviest = 0;
  for (const { unit, ports } of blocks) {
    // From the enthalpies alone: so large a heat may lead to no state that there is.
    const heat = unit.refrigeration === undefined ? 0 : ports.reduce((sum, { inlet, outlet }) => sum + outlet.massFlow * (outlet.enthalpy - inlet.enthalpy), 0);
    asked += heat;
    if (heat > heaviest) [heaviest, largestLoad] = [heat, ports[0]?.entry.name ?? null];
  }
  const excess = Math.max(...change.map((value, i) => value * (tears[i]?.stream.massFlow ?? 0)));
  const lifts = Math.max(0, asked - excess);
  return new NoSteadyState(
    largestLoad,
    "heat",
    asked > 0
      ? `the loads ask for ${asked.toPrecision(4)} W, but even with its cold end as warm as the surroundings (${temperature.toFixed(2)} K) the machine lifts about ${lifts.toPrecision(3)} W.`
      : `heat comes in faster than the machine lifts it even with its cold end as warm as the surroundings (${temperature.toFixed(2)} K).`,
    "Lower the load or the leaks, or raise the flow, the pressure ratio or the expander's efficiency.",
  );
}

/** Runs a pass that has to succeed, turning a state outside the equation into the answer that there is no steady state. */
export function guarded(pass: Pass, run: () => void): void {
  try {
    run();
  } catch (error) {
    if (error instanceof OutOfRangeError) throw outOfRange(pass, error);
    throw error;
  }
}
