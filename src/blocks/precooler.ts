import { required } from "./definition.js";
import type { BlockKind, Port, Setting } from "./kind.js";
import { flash, surely } from "./ports.js";
import { outletTemperature, pressureAfterDrop, pressureDrop } from "./shared-keys.js";
import { State } from "../fluids/state.js";
import type { Unit } from "./unit.js";

/** Cools the gas below the surroundings with refrigeration bought from outside. */
export const precooler: BlockKind = {
  kind: "precooler",
  summary: "Cools the gas below the surroundings with refrigeration bought from outside; its power counts as bought.",
  keys: [
    outletTemperature("temperature at which the gas leaves", { required: true }),
    {
      type: "number",
      name: "work-ratio",
      dimension: "fraction",
      range: { lowest: 0 },
      help: "power that the outside refrigerator spends for each watt that it takes up",
      required: true,
    },
    pressureDrop,
  ],
  alternatives: [],
  figures: [
    { name: "heatTaken", label: "heat taken", dimension: "power" },
    { name: "refrigeratorPower", label: "power of its refrigerator", dimension: "power" },
    { name: "outletTemperature", label: "gas leaves at", dimension: "temperature" },
    { name: "pressureDrop", label: "pressure drop", dimension: "pressure difference" },
  ],
  fixesOutlet: () => true,
  pressureChange: "falls or stays",
  outletPressure: pressureAfterDrop,
  place: ([port], setting) => placePrecooler(surely(port), setting),
};

function placePrecooler({ entry, inlet, outlet }: Port, { fluid, surroundings }: Setting): Unit {
  const scratch = new State();
  const leavesAt = required(entry, "outlet-temperature");
  const workRatio = required(entry, "work-ratio");
  const taken = (): number => inlet.massFlow * (inlet.enthalpy - outlet.enthalpy);
  return {
    name: entry.name,
    kind: entry.kind,
    evaluate() {
      outlet.enthalpy = fluid.temperaturePressure(leavesAt, outlet.pressure, scratch).enthalpy;
    },
    // The heat ends in the surroundings; that it gets there uphill is what the refrigerator's power pays for.
    energyFlows: () => ({
      work: 0,
      drive: taken() * workRatio,
      heat: [{ heat: -taken(), temperature: surroundings.temperature }],
    }),
    figures: () => ({
      heatTaken: taken(),
      refrigeratorPower: taken() * workRatio,
      outletTemperature: leavesAt,
      pressureDrop: inlet.pressure - outlet.pressure,
    }),
    impossible() {
      const arrives = flash(fluid, inlet).temperature;
      if (arrives >= leavesAt) return null;
      return {
        quantity: "outlet-temperature",
        reason: `the gas arrives at ${arrives.toFixed(2)} K, colder than the ${leavesAt.toFixed(2)} K at which it is to leave.`,
        advice: "Lower the outlet temperature, or leave the precooler out.",
      };
    },
  };
}
