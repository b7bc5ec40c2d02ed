import type { BlockDefinition, Value } from "../../src/blocks/definition.js";
import { blockKind } from "../../src/blocks/registry.js";
import type { CycleDefinition } from "../../src/cycle/definition.js";

/** One entry with the defaults of its kind filled in, as the reader would hand it over. */
export function entry(kind: string, name: string, values: Record<string, Value>, side?: string): BlockDefinition {
  const defaults: Record<string, Value> = {};
  for (const key of blockKind(kind)?.keys ?? []) {
    if (key.type !== "number" || key.default === undefined) continue;
    if (key.side === undefined || key.side === side) defaults[key.name] = key.default;
  }
  return { kind, name, ...(side === undefined ? {} : { side }), values: { ...defaults, ...values } };
}

/** A single-expander loop: what a test leaves out is an ideal machine without losses. */
export interface SingleExpander {
  fluid?: string;
  flow?: number;
  surroundings?: number;
  highPressure: number;
  lowPressure: number;
  compressorEfficiency?: number;
  aftercooled: number;
  recuperator: Record<string, Value>;
  expander: Record<string, Value>;
  load?: Record<string, Value>;
  drops?: { aftercooler?: number; warm?: number; cold?: number };
}

/** Compressor, aftercooler, recuperator, expander, load: SI values. */
export function singleExpander(machine: SingleExpander): CycleDefinition {
  const { drops = {} } = machine;
  return {
    title: "test machine",
    fluid: machine.fluid ?? "air",
    surroundings: { temperature: machine.surroundings ?? 293.15, pressure: 101325, relativeHumidity: 0.5 },
    circuit: "closed",
    flow: { kind: "mass", value: machine.flow ?? 0.01 },
    loop: [
      entry("compressor", "C1", { "outlet-pressure": machine.highPressure, efficiency: machine.compressorEfficiency ?? 1 }),
      entry("aftercooler", "A1", { "outlet-temperature": machine.aftercooled, "pressure-drop": drops.aftercooler ?? 0 }),
      entry("recuperator", "HX1", { ...machine.recuperator, "pressure-drop": drops.warm ?? 0 }, "warm"),
      entry("expander", "T1", { "outlet-pressure": machine.lowPressure, ...machine.expander }),
      entry("load", "L1", machine.load ?? { heat: 0 }),
      entry("recuperator", "HX1", { "pressure-drop": drops.cold ?? 0 }, "cold"),
    ],
    branches: {},
  };
}

/** The bench cooler of the examples, in SI, with what a test changes. */
export function benchCooler(efficiency: number, effectiveness: number, heat: number): CycleDefinition {
  return singleExpander({
    flow: 0.006,
    surroundings: 295.15,
    highPressure: 8e5,
    lowPressure: 1.2e5,
    compressorEfficiency: 0.62,
    aftercooled: 303.15,
    recuperator: { effectiveness },
    expander: { efficiency },
    load: { heat },
    drops: { aftercooler: 0.1e5, warm: 0.15e5, cold: 0.05e5 },
  });
}
