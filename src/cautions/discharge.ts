import type { BlockResult } from "../cycle/result.js";
import type { CautionRecord } from "./caution.js";

/** K; above it oil in the discharge of a lubricated air compressor cokes and can take fire (common practice, no source). */
const OIL_COKES = 433.15;
/** K; a surface that burns at a touch (common practice, no source). */
const BURNS = 333.15;

/** Where gas leaves a compressor hot. */
interface Hot {
  /** "C1", and the stage where there are several */
  readonly where: string;
  /** K */
  readonly temperature: number;
}

/** What the compressors' discharges reach. */
export const discharge: CautionRecord = {
  code: "compressor-discharge",
  title: "Compressor discharge temperature",
  trigger: "a compressor's discharge is hotter than 60 degC; from 160 degC oil cokes",
  assess({ blocks, fluid }) {
    const hot = blocks.flatMap(hottestOf).filter(({ temperature }) => temperature > BURNS);
    if (hot.length === 0) return null;
    const coking = hot.filter(({ temperature }) => temperature > OIL_COKES);
    const limit = (OIL_COKES - 273.15).toFixed(0);
    const fire = fluid === "air" || fluid === "oxygen" ? ", and in air the coke can take fire" : "";
    return {
      text:
        `${hot.map(({ where, temperature }) => `${where} at ${(temperature - 273.15).toFixed(0)} degC`).join(", ")}. ` +
        (coking.length > 0
          ? `Above about ${limit} degC oil cokes in the discharge line${fire} (common practice, no source): more stages with cooling between them, or a compressor made for it, and a trip on the discharge temperature. Guard the hot surfaces.`
          : "Guard the hot surfaces, and set the trip of the compressor's maker."),
      figures: { dischargeTemperature: Math.max(...hot.map(({ temperature }) => temperature)), oilCokes: OIL_COKES },
    };
  },
};

/** A block's hottest discharge, if it is one that reports any. */
function hottestOf({ name, dischargeTemperature, stageDischargeTemperatures: stages }: BlockResult): Hot[] {
  if (typeof dischargeTemperature !== "number") return [];
  const several = Array.isArray(stages) && stages.length > 1;
  return [{ where: several ? `${name} stage ${stages.indexOf(dischargeTemperature) + 1}` : name, temperature: dischargeTemperature }];
}
