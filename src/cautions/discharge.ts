import type { CautionRecord } from "./caution.js";

/** K; above it oil in the discharge of a lubricated air compressor cokes and can take fire (common practice, no source). */
const OIL_COKES = 433.15;
/** K; a surface that burns at a touch (common practice, no source). */
const BURNS = 333.15;

/** What the compressor's discharge reaches. */
export const discharge: CautionRecord = {
  code: "compressor-discharge",
  title: "Compressor discharge temperature",
  trigger: "a compressor's discharge is hotter than 60 degC; from 160 degC oil cokes",
  assess({ blocks, fluid }) {
    const hottest = blocks.reduce<{ name: string; temperature: number } | null>((hot, { name, dischargeTemperature }) => {
      if (typeof dischargeTemperature !== "number" || dischargeTemperature <= (hot?.temperature ?? BURNS)) return hot;
      return { name, temperature: dischargeTemperature };
    }, null);
    if (hottest === null) return null;
    const celsius = (hottest.temperature - 273.15).toFixed(0);
    const oil = fluid === "air" || fluid === "oxygen";
    return {
      text:
        hottest.temperature > OIL_COKES
          ? `${hottest.name} discharges at ${celsius} degC. Above about ${(OIL_COKES - 273.15).toFixed(0)} degC oil cokes in the discharge line${oil ? ", and in air the coke can take fire" : ""} (common practice, no source): more stages with cooling between them, or a compressor made for it, and a trip on the discharge temperature. Guard the hot surfaces.`
          : `${hottest.name} discharges at ${celsius} degC: guard the hot surfaces, and set the trip of the compressor's maker.`,
      figures: { dischargeTemperature: hottest.temperature, oilCokes: OIL_COKES },
    };
  },
};
