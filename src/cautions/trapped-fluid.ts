import type { Station } from "../cycle/result.js";
import { FluidError } from "../fluids/errors.js";
import { fluid as fluidNamed } from "../fluids/registry.js";
import type { CautionRecord } from "./caution.js";

/** K below the surroundings from which a section counts as cold. */
const COLD_BY = 20;

/** A cold section that is closed off and warms up. */
export const trappedFluid: CautionRecord = {
  code: "trapped-fluid",
  title: "Pressure of a closed-off section that warms up",
  trigger: "a station is 20 K or more colder than the surroundings; the figure is the pressure of the densest one's contents once warm",
  assess({ fluid, stations, surroundings }) {
    const gas = fluidNamed(fluid);
    const cold = stations.filter(({ temperature }) => temperature <= surroundings.temperature - COLD_BY);
    if (cold.length === 0) return null;
    const densest = cold.reduce((dense, station) => (station.density > dense.density ? station : dense));
    const highest = Math.max(...stations.map(({ pressure }) => pressure));
    const free = gas.at({ temperature: surroundings.temperature, pressure: surroundings.pressure }).density;
    const contents = warmed(densest.density);
    const collected = liquidDensity(cold);
    // A station's mean is not what stands in a sump or a sagging line behind it.
    const liquid = collected === null || collected <= densest.density ? null : { density: collected, ...warmed(collected) };
    const warmth = `${(surroundings.temperature - 273.15).toFixed(0)} degC`;
    return {
      text:
        `The contents behind ${densest.after} (${densest.density.toFixed(1)} kg/m3), shut in between two valves, reach ${contents.words} on warming to ${warmth}, against ` +
        `${(highest / 1e5).toFixed(1)} bar in operation; let out, each litre of them makes ${(densest.density / free).toFixed(0)} L of gas. ` +
        (liquid === null ? "" : `The liquid that forms here, where it collects, reaches ${liquid.words} and makes ${(liquid.density / free).toFixed(0)} L of gas a litre. `) +
        `${cold.some(({ phase }) => phase === "two-phase" || phase === "liquid") ? "Liquid that fills a section bursts any pipe. " : ""}Every section that can be closed off needs its own relief device, rated and discharged safely.`,
      figures: {
        density: densest.density,
        warmedPressure: contents.pressure,
        highestPressure: highest,
        expansionRatio: densest.density / free,
        ...(liquid === null ? {} : { liquidWarmedPressure: liquid.pressure, liquidExpansionRatio: liquid.density / free }),
      },
    };

    /** Pa that a density reaches at the surroundings' temperature, or where the equation ends below that. */
    function warmed(density: number): { pressure: number; words: string } {
      const inBar = (pressure: number): string => `${(pressure / 1e5).toFixed(0)} bar`;
      try {
        const { pressure } = gas.at({ temperature: surroundings.temperature, density });
        return { pressure, words: inBar(pressure) };
      } catch (error) {
        if (!(error instanceof FluidError)) throw error;
        return { pressure: gas.maximumPressure, words: `more than ${inBar(gas.maximumPressure)} (where the equation ends)` };
      }
    }

    /** kg/m3 of the densest liquid that stands in equilibrium with its vapour at one of the stations; null where all are dry. */
    function liquidDensity(all: readonly Station[]): number | null {
      const wet = all.filter(({ phase, pressure }) => phase === "two-phase" && pressure >= gas.lowestSaturationPressure && pressure < gas.criticalPressure);
      return wet.length === 0 ? null : Math.max(...wet.map(({ pressure }) => gas.saturation(pressure).liquidDensity));
    }
  },
};
