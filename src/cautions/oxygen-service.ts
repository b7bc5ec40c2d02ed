import type { CautionRecord } from "./caution.js";

/** Oxygen fraction from which air counts as enriched: 29 CFR 1910.146(b). */
const ENRICHED = 0.235;

/** Oxygen as the working gas. */
export const oxygenService: CautionRecord = {
  code: "oxygen-service",
  title: "Oxygen as the working gas",
  trigger: "the working fluid is oxygen",
  assess({ fluid, stations }) {
    if (fluid !== "oxygen") return null;
    const highest = Math.max(...stations.map(({ pressure }) => pressure));
    return {
      text:
        `Oxygen at up to ${(highest / 1e5).toFixed(1)} bar: metals burn in it once something ignites them, and a leak enriches the room; ` +
        `${ENRICHED * 100} % is the limit above which air counts as enriched (29 CFR 1910.146(b)). Materials, lubricants, valves and cleaning are those of oxygen service, and nothing else will do.`,
      figures: { highestPressure: highest, enrichedLimit: ENRICHED },
    };
  },
};
