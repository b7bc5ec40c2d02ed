import type { CautionRecord } from "./caution.js";

/** K; from here down bare metal freezes to skin, and carbon steel and many plastics begin to turn brittle (common practice, no source). */
const BRITTLE = 253.15;

/** What touches the cold parts. */
export const cold: CautionRecord = {
  code: "cold",
  title: "Cold burns and brittle materials",
  trigger: "a station is colder than -20 degC",
  assess({ stations }) {
    const freezing = stations.filter(({ temperature }) => temperature < BRITTLE);
    if (freezing.length === 0) return null;
    const coldest = Math.min(...freezing.map(({ temperature }) => temperature));
    return {
      text:
        `Down to ${coldest.toFixed(0)} K (${(coldest - 273.15).toFixed(0)} degC) behind ${freezing.map(({ after }) => after).join(", ")}. Skin freezes to bare metal at once and a jet of gas burns; ` +
        "carbon steel, rubber and many plastics turn brittle somewhere below -20 to -40 degC (common practice, no source). Austenitic stainless steel, copper, aluminium and materials proven at that temperature for whatever holds pressure; gloves and face shield for whoever opens it.",
      figures: { coldestTemperature: coldest, brittleBelow: BRITTLE },
    };
  },
};
