import { given } from "./definition.js";
import type { BlockKind, Port, Setting } from "./kind.js";
import { flash, surely } from "./ports.js";
import { outletTemperature } from "./shared-keys.js";
import { State } from "../fluids/state.js";
import type { Unit } from "./unit.js";

/** Where the refrigeration is taken up. */
export const load: BlockKind = {
  kind: "load",
  summary: "Takes up the refrigeration: a stated heat, or whatever brings the gas to a stated temperature.",
  keys: [
    {
      type: "number",
      name: "heat",
      dimension: "power",
      range: { lowest: 0 },
      help: "heat given to the gas",
      alternative: "duty",
    },
    outletTemperature("temperature at which the gas leaves the load; the heat follows", { alternative: "duty" }),
  ],
  alternatives: [{ name: "duty" }],
  figures: [
    { name: "heat", label: "heat lifted", dimension: "power" },
    { name: "inletTemperature", label: "gas arrives at", dimension: "temperature" },
    { name: "outletTemperature", label: "gas leaves at", dimension: "temperature" },
  ],
  fixesOutlet: (entry) => given(entry, "outlet-temperature") !== undefined,
  pressureChange: "falls or stays",
  outletPressure: (_entry, inletPressure) => inletPressure,
  place: ([port], setting) => placeLoad(surely(port), setting),
};

function placeLoad({ entry, inlet, outlet }: Port, { fluid }: Setting): Unit {
  const stated = given(entry, "heat");
  const leavesAt = given(entry, "outlet-temperature");
  const scratch = new State();
  const heat = (): number => stated ?? inlet.massFlow * (outlet.enthalpy - inlet.enthalpy);
  const refrigeration = () => ({
    heat: heat(),
    inletTemperature: flash(fluid, inlet).temperature,
    outletTemperature: flash(fluid, outlet).temperature,
  });
  return {
    name: entry.name,
    kind: entry.kind,
    evaluate() {
      outlet.enthalpy =
        leavesAt === undefined
          ? inlet.massFlow > 0 ? inlet.enthalpy + heat() / inlet.massFlow : inlet.enthalpy
          : fluid.temperaturePressure(leavesAt, outlet.pressure, scratch).enthalpy;
    },
    energyFlows() {
      const before = flash(fluid, inlet);
      const after = flash(fluid, outlet);
      // Over a pipe without friction this mean, heat over entropy taken up, is the one at which nothing is destroyed.
      const entropyRise = inlet.massFlow * (after.entropy - before.entropy);
      const temperature = entropyRise > 0 && heat() > 0 ? heat() / entropyRise : before.temperature;
      return { work: 0, drive: 0, heat: [{ heat: heat(), temperature }] };
    },
    figures: () => ({ ...refrigeration() }),
    refrigeration,
    impossible() {
      if (!(inlet.massFlow > 0) && heat() > 0) {
        return {
          quantity: "heat",
          reason: `no gas comes to it, so that nothing takes up its ${heat().toPrecision(4)} W.`,
          advice: "Make the machine colder, so that liquid reaches it, or move the load.",
        };
      }
      if (heat() >= 0) return null;
      const arrives = flash(fluid, inlet).temperature;
      return {
        quantity: "outlet-temperature",
        reason: `the gas arrives at ${arrives.toFixed(2)} K and would have to be cooled, not warmed, to leave at ${leavesAt?.toFixed(2)} K.`,
        advice: `Ask for an outlet temperature above ${arrives.toFixed(2)} K, or make the machine colder.`,
      };
    },
  };
}
