import type { Caution, SteadyState } from "../cycle/result.js";
import { asphyxiation } from "./asphyxiation.js";
import type { CautionRecord } from "./caution.js";
import { cold } from "./cold.js";
import { discharge } from "./discharge.js";
import { enrichedCondensate } from "./enriched-condensate.js";
import { licensedPractice } from "./licensed-practice.js";
import { oxygenService } from "./oxygen-service.js";
import { trappedFluid } from "./trapped-fluid.js";

/** Every hazard, in the order in which they are printed. */
export const cautionRecords: readonly CautionRecord[] = [
  oxygenService,
  enrichedCondensate,
  trappedFluid,
  discharge,
  asphyxiation,
  cold,
  licensedPractice,
];

/** The hazards of a solved machine, with the figures that trigger them. */
export function cautions(result: SteadyState): readonly Caution[] {
  return cautionRecords.flatMap((record) => {
    const found = record.assess(result);
    return found === null ? [] : [{ code: record.code, title: record.title, ...found }];
  });
}
