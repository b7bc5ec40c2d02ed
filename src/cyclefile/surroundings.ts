import type { NumberKey } from "../blocks/keys.js";
import type { Surroundings } from "../cycle/definition.js";
import { ATMOSPHERIC_CARBON_DIOXIDE } from "../fluids/moist-air.js";

/** A number of the surroundings. */
export interface SurroundingsKey extends Pick<NumberKey, "name" | "dimension" | "range" | "help"> {
  readonly field: keyof Surroundings;
  /** Where the file leaves it out, SI. */
  readonly default: number;
}

/** The keys under surroundings. */
export const surroundingsKeys: readonly SurroundingsKey[] = [
  { name: "temperature", field: "temperature", dimension: "temperature", range: { lowest: 0, open: "lowest" }, help: "temperature of the air around the machine", default: 293.15 },
  { name: "pressure", field: "pressure", dimension: "pressure", range: { lowest: 0, open: "lowest" }, help: "its pressure, from which gauge pressures count", default: 101325 },
  { name: "relative-humidity", field: "relativeHumidity", dimension: "fraction", range: { lowest: 0, highest: 1 }, help: "its relative humidity", default: 0.5 },
  { name: "carbon-dioxide", field: "carbonDioxide", dimension: "fraction", range: { lowest: 0, highest: 0.1 }, help: "its carbon dioxide, mol/mol of dry air", default: ATMOSPHERIC_CARBON_DIOXIDE },
];
