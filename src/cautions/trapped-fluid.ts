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
    const ratio = densest.density / gas.at({ temperature: surroundings.temperature, pressure: surroundings.pressure }).density;
    const [pressure, beyond] = warmed();
    return {
      text:
        `The contents behind ${densest.after} (${densest.density.toFixed(1)} kg/m3), shut in between two valves, reach ${beyond ? "more than " : ""}${(pressure / 1e5).toFixed(0)} bar${beyond ? " (where the equation ends)" : ""} on warming to ` +
        `${(surroundings.temperature - 273.15).toFixed(0)} degC, against ${(highest / 1e5).toFixed(1)} bar in operation; let out, each litre of them makes ${ratio.toFixed(0)} L of gas. If liquid collects there the shut-in pressure is higher still, ` +
        "up to bursting any pipe. Every section that can be closed off needs its own relief device, rated and discharged safely.",
      figures: { density: densest.density, warmedPressure: pressure, highestPressure: highest, expansionRatio: ratio },
    };

    /** Pa at the surroundings' temperature, and whether the equation ends before that is reached. */
    function warmed(): [number, boolean] {
      try {
        return [gas.at({ temperature: surroundings.temperature, density: densest.density }).pressure, false];
      } catch (error) {
        if (!(error instanceof FluidError)) throw error;
        return [gas.maximumPressure, true];
      }
    }
  },
};
