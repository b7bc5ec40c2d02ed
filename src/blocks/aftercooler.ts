import { given, required } from "./definition.js";
import type { BlockKind, Port, Setting } from "./kind.js";
import { flash, surely } from "./ports.js";
import { pressureAfterDrop, pressureDrop } from "./shared-keys.js";
import { State } from "../fluids/state.js";
import type { Unit } from "./unit.js";

/** K by which a cooler with nothing to do may warm the gas: the cold of its own pressure drop. */
const IDLE = 1;

/** Cools the compressed gas against the surroundings. */
export const aftercooler: BlockKind = {
  kind: "aftercooler",
  summary: "Rejects the heat of compression to the surroundings.",
  keys: [
    {
      type: "number",
      name: "outlet-temperature",
      dimension: "temperature",
      range: { lowest: 0, open: "lowest" },
      help: "temperature at which the gas leaves",
      alternative: "outlet",
    },
    {
      type: "number",
      name: "approach",
      dimension: "temperature difference",
      range: { lowest: 0 },
      help: "how far above the surroundings' temperature the gas leaves",
      alternative: "outlet",
    },
    pressureDrop,
  ],
  alternatives: [{ name: "outlet" }],
  figures: [
    { name: "heatRejected", label: "heat rejected", dimension: "power" },
    { name: "outletTemperature", label: "gas leaves at", dimension: "temperature" },
    { name: "pressureDrop", label: "pressure drop", dimension: "pressure difference" },
  ],
  fixesOutlet: () => true,
  check([entry], { surroundings }) {
    const outlet = given(surely(entry), "outlet-temperature");
    if (outlet === undefined || outlet >= surroundings.temperature) return [];
    return [
      {
        code: "aftercooler-below-surroundings",
        entry: surely(entry),
        key: "outlet-temperature",
        found: `${outlet.toFixed(2)} K, colder than the surroundings that it rejects heat to`,
        expected: `at least the surroundings' ${surroundings.temperature.toFixed(2)} K (cooling below that takes bought refrigeration)`,
      },
    ];
  },
  pressureChange: "falls or stays",
  outletPressure: pressureAfterDrop,
  place: ([port], setting) => placeAftercooler(surely(port), setting),
};

function placeAftercooler({ entry, inlet, outlet }: Port, { fluid, surroundings }: Setting): Unit {
  const scratch = new State();
  const outletTemperature =
    given(entry, "outlet-temperature") ?? surroundings.temperature + required(entry, "approach");
  const rejected = (): number => inlet.massFlow * (inlet.enthalpy - outlet.enthalpy);
  return {
    name: entry.name,
    kind: entry.kind,
    evaluate() {
      outlet.enthalpy = fluid.temperaturePressure(outletTemperature, outlet.pressure, scratch).enthalpy;
    },
    energyFlows: () => ({
      work: 0,
      drive: 0,
      heat: [{ heat: -rejected(), temperature: surroundings.temperature }],
    }),
    figures: () => ({ heatRejected: rejected(), outletTemperature, pressureDrop: inlet.pressure - outlet.pressure }),
    impossible() {
      const arrives = flash(fluid, inlet).temperature;
      if (arrives > outletTemperature - IDLE) return null;
      return {
        quantity: "outlet-temperature",
        reason: `the gas arrives at ${arrives.toFixed(2)} K, colder than the ${outletTemperature.toFixed(2)} K at which it is to leave: the cooler would have to heat it.`,
        advice: "Lower the outlet temperature or the approach, or leave the cooler out.",
      };
    },
  };
}
