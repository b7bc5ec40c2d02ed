import type { CycleDefinition } from "../cycle/definition.js";
import { moisture } from "../cycle/moisture.js";
import type { Caution, CycleResult, SteadyState } from "../cycle/result.js";
import { asphyxiation } from "./asphyxiation.js";
import type { Assessable, CautionRecord } from "./caution.js";
import { cold } from "./cold.js";
import { discharge } from "./discharge.js";
import { enrichedCondensate } from "./enriched-condensate.js";
import { frost } from "./frost.js";
import { licensedPractice } from "./licensed-practice.js";
import { oxygenService } from "./oxygen-service.js";
import { storedPressure } from "./stored-pressure.js";
import { trappedFluid } from "./trapped-fluid.js";

/** Every hazard, the gravest first, as they are printed; what always holds comes last. */
export const cautionRecords: readonly CautionRecord[] = [
  oxygenService,
  enrichedCondensate,
  trappedFluid,
  storedPressure,
  discharge,
  asphyxiation,
  cold,
  frost,
  licensedPractice,
];

/** A solved machine with all that every output shows of it. */
export function assessed(definition: CycleDefinition, state: SteadyState): CycleResult {
  const withMoisture = { ...state, moisture: moisture(definition, state) };
  return { ...withMoisture, cautions: cautions(withMoisture) };
}

/** The hazards of a solved machine, with the figures that trigger them. */
export function cautions(result: Assessable): readonly Caution[] {
  return cautionRecords.flatMap((record) => {
    const found = record.assess(result);
    return found === null ? [] : [{ code: record.code, title: record.title, ...found }];
  });
}
