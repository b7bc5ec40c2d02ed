import { FluidError } from "../fluids/errors.js";
import { fluid as fluidNamed } from "../fluids/registry.js";
import type { CautionRecord } from "./caution.js";

/** Pa over the surroundings from which a vessel counts as one under pressure: Directive 2014/68/EU, article 1 (from memory). */
const UNDER_PRESSURE = 0.5e5;

/** What the gas on the warm side holds ready. */
export const storedPressure: CautionRecord = {
  code: "stored-pressure",
  title: "Pressure stored on the warm side",
  trigger: "a station stands more than 0.5 bar over the surroundings",
  assess({ fluid, stations, surroundings }) {
    const highest = stations.reduce((high, station) => (station.pressure > high.pressure ? station : high));
    const over = highest.pressure - surroundings.pressure;
    if (over <= UNDER_PRESSURE) return null;
    const energy = storedEnergy(fluid, highest.pressure, surroundings);
    const stored = energy === null ? "" : `: every litre of it, at the surroundings' temperature, gives off up to ${(energy / 1e6).toPrecision(2)} kJ when it breaks loose`;
    return {
      text:
        `Up to ${(highest.pressure / 1e5).toFixed(1)} bar behind ${highest.after}, ${(over / 1e5).toFixed(1)} bar over the surroundings${stored}. Hoses whip and fittings fly. Rate every part for more than the ` +
        "compressor can reach against a closed valve, with a relief device that opens below the weakest; vent before opening.",
      figures: { highestPressure: highest.pressure, gaugePressure: over, ...(energy === null ? {} : { storedEnergyPerVolume: energy }) },
    };
  },
};

/** J/m3 that gas at the surroundings' temperature gives off on expanding to their pressure without loss; null beyond the equation. */
function storedEnergy(fluid: string, pressure: number, surroundings: { temperature: number; pressure: number }): number | null {
  const gas = fluidNamed(fluid);
  try {
    const held = gas.at({ temperature: surroundings.temperature, pressure });
    const expanded = gas.at({ pressure: surroundings.pressure, entropy: held.entropy });
    return held.density * (held.internalEnergy - expanded.internalEnergy);
  } catch (error) {
    if (error instanceof FluidError) return null;
    throw error;
  }
}
