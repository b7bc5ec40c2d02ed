import { fluid } from "../fluids/registry.js";
import type { CautionRecord } from "./caution.js";

/**
 * Oxygen in the first liquid that condenses from air at 1 atm, mol/mol: computed with a mixture equation of nitrogen, argon and
 * oxygen; safety literature says about half.
 */
const FIRST_LIQUID_OXYGEN = 0.513;

/** Air that condenses, in the loop or on its outside, is rich in oxygen. */
export const enrichedCondensate: CautionRecord = {
  code: "oxygen-enriched-condensate",
  title: "Oxygen-enriched condensate",
  trigger: "air condenses in the loop, or a stream is colder than the dew point of the surrounding air",
  assess({ fluid: working, stations, surroundings }) {
    const air = fluid("air");
    const ambient = Math.max(air.lowestSaturationPressure, Math.min(surroundings.pressure, 0.9 * air.criticalPressure));
    const dewPoint = air.saturation(ambient).dewTemperature;
    const coldest = stations.reduce((cold, station) => (station.temperature < cold.temperature ? station : cold));
    const wet = working === "air" ? stations.filter(({ phase }) => phase === "two-phase" || phase === "liquid") : [];
    const richest = Math.max(0, ...wet.map(({ liquidOxygen }) => liquidOxygen ?? 0));
    const outside = stations.filter(({ temperature }) => temperature < dewPoint);
    if (wet.length === 0 && outside.length === 0) return null;
    const where: string[] = [];
    if (wet.length > 0) {
      const [first] = wet;
      where.push(`air condenses inside, behind ${wet.map(({ after }) => after).join(", ")} (${first.temperature.toFixed(1)} K at ${(first.pressure / 1e5).toFixed(2)} bar)${richest > 0 ? `, to a liquid with up to ${Math.round(richest * 100)} % oxygen` : ""}`);
    }
    if (outside.length > 0) {
      where.push(
        `the surrounding air condenses from ${dewPoint.toFixed(1)} K down on any surface it reaches, where neither vacuum nor a purge keeps it off: behind ${outside.map(({ after }) => after).join(", ")} (down to ${coldest.temperature.toFixed(1)} K)`,
      );
    }
    return {
      text:
        `${capital(where.join("; "))}. The first drops out of air at 1 atm hold about ${Math.round(FIRST_LIQUID_OXYGEN * 100)} % oxygen, and more as they evaporate: oil, grease, foam, wood, tar and clothing burn ` +
        "violently in it. No oil in the gas or in the expander's bearings there, no combustible insulation, parts clean as for oxygen service, insulation tight, purged or evacuated, and drips caught where nothing burns.",
      figures: { coldestTemperature: coldest.temperature, airDewPoint: dewPoint, firstLiquidOxygen: FIRST_LIQUID_OXYGEN, ...(richest > 0 ? { richestLiquidOxygen: richest } : {}) },
    };
  },
};

function capital(text: string): string {
  return text.charAt(0).toUpperCase() + text.slice(1);
}
