import { Counterflow, type Side } from "./counterflow.js";
import { given, type BlockDefinition } from "./definition.js";
import { leakWarnings } from "./leak.js";
import type { BlockKind, Port, Setting } from "./kind.js";
import { FILLED, profiledPassage } from "./passage.js";
import { flash, surely } from "./ports.js";
import { heatLeak, pressureAfterDrop, pressureDrop } from "./shared-keys.js";
import type { Unit } from "./unit.js";

/** Points of the reported profile when the file does not ask for a number. */
const SEGMENTS = 40;

/** Counterflow exchange between the gas on its way in and the gas on its way back. */
export const recuperator: BlockKind = {
  kind: "recuperator",
  summary: "Counterflow exchange between the gas on its way to the cold end and the gas on its way back.",
  sides: ["warm", "cold"],
  keys: [
    {
      type: "number",
      name: "effectiveness",
      dimension: "fraction",
      range: { lowest: 0, highest: 1, open: "lowest" },
      help: "duty over the largest duty that leaves no negative temperature difference inside",
      alternative: "size",
      side: "warm",
    },
    {
      type: "number",
      name: "conductance",
      dimension: "conductance",
      range: { lowest: 0, open: "lowest" },
      help: "UA, the integral of dQ/dT over the profile",
      alternative: "size",
      side: "warm",
    },
    {
      type: "number",
      name: "approach",
      dimension: "temperature difference",
      range: { lowest: 0 },
      help: "smallest temperature difference anywhere inside",
      alternative: "size",
      side: "warm",
    },
    {
      type: "number",
      name: "segments",
      dimension: "count",
      range: { lowest: 2, highest: 1000 },
      help: "segments of the reported temperature profile",
      default: SEGMENTS,
      side: "warm",
    },
    { ...heatLeak, help: "heat that comes into the cold stream through the insulation", side: "warm" },
    pressureDrop,
    {
      type: "number",
      name: "passage-volume",
      dimension: "volume",
      range: { lowest: 0, open: "lowest" },
      help: "volume of the warm gas's own passage, for the time in which frozen water and carbon dioxide fill it",
      side: "warm",
    },
    {
      type: "number",
      name: "passage-filled",
      dimension: "fraction",
      range: { lowest: 0, highest: 1, open: "lowest" },
      help: "the share of that volume whose filling is asked for",
      default: FILLED,
      side: "warm",
    },
  ],
  alternatives: [{ name: "size", side: "warm" }],
  figures: [
    { name: "duty", label: "duty", dimension: "power" },
    { name: "effectiveness", label: "effectiveness", dimension: "fraction" },
    { name: "conductance", label: "conductance UA", dimension: "conductance" },
    { name: "transferUnits", label: "transfer units NTU", dimension: "none" },
    { name: "smallestDifference", label: "smallest difference", dimension: "temperature difference" },
    { name: "smallestDifferenceAt", label: "place of it, from the warm end", dimension: "fraction" },
    { name: "warmEndDifference", label: "difference at the warm end", dimension: "temperature difference" },
    { name: "coldEndDifference", label: "difference at the cold end", dimension: "temperature difference" },
    { name: "heatLeak", label: "heat leak", dimension: "power" },
    { name: "profile", label: "temperature profile", dimension: "profile" },
  ],
  pressureChange: "falls or stays",
  outletPressure: pressureAfterDrop,
  passage: profiledPassage,
  place: ([warm, cold], setting) => placeRecuperator(surely(warm), surely(cold), setting),
};

function placeRecuperator(warm: Port, cold: Port, { fluid, surroundings }: Setting): Unit {
  const exchange = new Counterflow(fluid);
  exchange.heatLeak = given(warm.entry, "heat-leak") ?? 0;
  const transferred = dutyRule(warm.entry, exchange);
  const segments = Math.round(given(warm.entry, "segments") ?? SEGMENTS);
  let duty = 0;

  function connect(): void {
    connectSide(exchange.warm, warm);
    connectSide(exchange.cold, cold);
  }

  function figures(): Readonly<Record<string, unknown>> {
    connect();
    const warmEndDifference = exchange.difference(duty, 0);
    const coldEndDifference = exchange.difference(duty, 1);
    const smallest = exchange.smallestDifference(duty);
    const largestDuty = exchange.dutyAtApproach(0);
    const conductance = duty > 0 ? exchange.conductance(duty) : 0;
    const finite = Number.isFinite(conductance);
    const largestChange = Math.max(
      exchange.warmTemperature(duty, 0) - exchange.warmTemperature(duty, 1),
      exchange.coldTemperature(duty, 0) - exchange.coldTemperature(duty, 1),
    );
    return {
      duty,
      effectiveness: largestDuty > 0 ? duty / largestDuty : 0,
      // A vanishing difference takes an endless exchanger: there is no number to give.
      conductance: finite ? conductance : null,
      transferUnits: finite && duty > 0 ? (conductance * largestChange) / duty : null,
      smallestDifference: smallest.value,
      smallestDifferenceAt: smallest.place,
      warmEndDifference,
      coldEndDifference,
      heatLeak: exchange.heatLeak,
      profile: Array.from({ length: segments + 1 }, (_, point) => {
        const dutyFraction = point / segments;
        return {
          dutyFraction,
          warmTemperature: exchange.warmTemperature(duty, dutyFraction),
          coldTemperature: exchange.coldTemperature(duty, dutyFraction),
        };
      }),
    };
  }

  return {
    name: warm.entry.name,
    kind: warm.entry.kind,
    evaluate() {
      if (!(warm.inlet.massFlow > 0 && cold.inlet.massFlow > 0)) {
        // Nothing flows on one side: a branch that carries liquid, before there is any.
        duty = 0;
        warm.outlet.enthalpy = warm.inlet.enthalpy;
        cold.outlet.enthalpy = cold.inlet.enthalpy;
        return;
      }
      connect();
      duty = transferred();
      warm.outlet.enthalpy = warm.inlet.enthalpy - duty / warm.inlet.massFlow;
      cold.outlet.enthalpy = cold.inlet.enthalpy + (duty + exchange.heatLeak) / cold.inlet.massFlow;
    },
    energyFlows: () => ({
      work: 0,
      drive: 0,
      heat: [{ heat: exchange.heatLeak, temperature: surroundings.temperature }],
    }),
    figures,
    warnings: () =>
      leakWarnings(warm.entry.name, exchange.heatLeak, flash(fluid, cold.outlet).temperature, surroundings.temperature),
    impossible() {
      const warmInlet = flash(fluid, warm.inlet).temperature;
      const coldInlet = flash(fluid, cold.inlet).temperature;
      const coldOutlet = flash(fluid, cold.outlet).temperature;
      if (duty === 0 && coldInlet <= warmInlet && coldOutlet > warmInlet) {
        return {
          quantity: "heat-leak",
          reason: `its heat leak alone warms the cold stream to ${coldOutlet.toFixed(2)} K, above the ${warmInlet.toFixed(2)} K of the warm one: there is nothing left to exchange.`,
          advice: "Insulate it better, or leave it out.",
        };
      }
      if (coldInlet <= warmInlet) return null;
      return {
        quantity: "temperature",
        reason: `its cold side comes in at ${coldInlet.toFixed(2)} K, warmer than the ${warmInlet.toFixed(2)} K of its warm side: heat would flow backwards.`,
        advice: "Exchange its sides in the loop, or move it to where the returning gas is colder.",
      };
    },
  };
}

/** How much passes (W), by whichever of the three sizes the definition gives. */
function dutyRule(entry: BlockDefinition, exchange: Counterflow): () => number {
  const conductance = given(entry, "conductance");
  if (conductance !== undefined) return () => exchange.dutyAtConductance(conductance);
  const approach = given(entry, "approach");
  if (approach !== undefined) return () => exchange.dutyAtApproach(approach);
  const effectiveness = given(entry, "effectiveness") ?? 1;
  return () => effectiveness * exchange.dutyAtApproach(0);
}

function connectSide(side: Side, { inlet, outlet }: Port): void {
  side.massFlow = inlet.massFlow;
  side.enthalpy = inlet.enthalpy;
  side.pressure = inlet.pressure;
  side.outletPressure = outlet.pressure;
}
