import { given, required } from "./definition.js";
import type { BlockKind, Port, Setting } from "./kind.js";
import { flash, surely } from "./ports.js";
import { purityClassDewPoint } from "../fluids/air-purity.js";
import { cooledPassage } from "./passage.js";
import { outletTemperature, pressureAfterDrop, pressureDrop } from "./shared-keys.js";
import { State } from "../fluids/state.js";
import type { Unit } from "./unit.js";

/** K by which a cooler with nothing to do may warm the gas: the cold of its own pressure drop. */
const IDLE = 1;

/** Cools the compressed gas against the surroundings. */
export const aftercooler: BlockKind = {
  kind: "aftercooler",
  summary: "Rejects the heat of compression to the surroundings.",
  keys: [
    outletTemperature("temperature at which the gas leaves", { alternative: "outlet" }),
    {
      type: "number",
      name: "approach",
      dimension: "temperature difference",
      range: { lowest: 0 },
      help: "how far above the surroundings' temperature the gas leaves",
      alternative: "outlet",
    },
    pressureDrop,
    { type: "flag", name: "trap", help: "whether a trap at its outlet takes out the water that condenses from air", default: true },
    {
      type: "number",
      name: "dryer",
      dimension: "temperature",
      range: { lowest: 150, highest: 373.15 },
      help: "pressure dew point to which a dryer behind it dries air; left out with dryer-class, there is none",
      alternative: "dryer",
    },
    {
      type: "number",
      name: "dryer-class",
      dimension: "count",
      range: { lowest: 1, highest: 6 },
      help: "the same as a water class of ISO 8573-1: 1 is -70 degC, 2 -40, 3 -20, 4 +3, 5 +7, 6 +10",
      alternative: "dryer",
    },
  ],
  alternatives: [{ name: "outlet" }, { name: "dryer", optional: true }],
  figures: [
    { name: "heatRejected", label: "heat rejected", dimension: "power" },
    { name: "outletTemperature", label: "gas leaves at", dimension: "temperature" },
    { name: "pressureDrop", label: "pressure drop", dimension: "pressure difference" },
  ],
  fixesOutlet: () => true,
  check([entry], { surroundings }) {
    const waterClass = given(surely(entry), "dryer-class");
    if (waterClass !== undefined && purityClassDewPoint(waterClass) === undefined) {
      return [{ code: "not-whole", entry: surely(entry), key: "dryer-class", found: `${waterClass}`, expected: "a whole number" }];
    }
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
  passage(solved) {
    const waterClass = given(solved.entry, "dryer-class");
    return cooledPassage(solved, given(solved.entry, "dryer") ?? (waterClass === undefined ? undefined : purityClassDewPoint(waterClass)));
  },
  place: ([port], setting) => placeAftercooler(surely(port), setting),
};

function placeAftercooler({ entry, inlet, outlet }: Port, { fluid, surroundings }: Setting): Unit {
  const scratch = new State();
  const leavesAt =
    given(entry, "outlet-temperature") ?? surroundings.temperature + required(entry, "approach");
  const rejected = (): number => inlet.massFlow * (inlet.enthalpy - outlet.enthalpy);
  return {
    name: entry.name,
    kind: entry.kind,
    evaluate() {
      outlet.enthalpy = fluid.temperaturePressure(leavesAt, outlet.pressure, scratch).enthalpy;
    },
    energyFlows: () => ({
      work: 0,
      drive: 0,
      heat: [{ heat: -rejected(), temperature: surroundings.temperature }],
    }),
    figures: () => ({ heatRejected: rejected(), outletTemperature: leavesAt, pressureDrop: inlet.pressure - outlet.pressure }),
    impossible() {
      const arrives = flash(fluid, inlet).temperature;
      if (arrives > leavesAt - IDLE) return null;
      return {
        quantity: "outlet-temperature",
        reason: `the gas arrives at ${arrives.toFixed(2)} K, colder than the ${leavesAt.toFixed(2)} K at which it is to leave: the cooler would have to heat it.`,
        advice: "Lower the outlet temperature or the approach, or leave the cooler out.",
      };
    },
  };
}
