import { air } from "./data/air.js";
import { argon } from "./data/argon.js";
import { helium } from "./data/helium.js";
import { neon } from "./data/neon.js";
import { nitrogen } from "./data/nitrogen.js";
import { oxygen } from "./data/oxygen.js";
import { UnknownFluidError } from "./errors.js";
import { Fluid } from "./fluid.js";
import type { FluidData } from "./fluid-data.js";

/** Every fluid there is: its data file and a line here. */
export const fluidData: readonly FluidData[] = [air, nitrogen, argon, oxygen, neon, helium];

const made = new Map<string, Fluid>();

/** The names that `fluid` knows. */
export const fluidNames: readonly string[] = fluidData.map(({ name }) => name);

/**
 * A fluid by its name; the same object each time.
 *
 * @throws UnknownFluidError with the names there are
 *
 * @example
 * fluid("air").at({ pressure: 101325, quality: 0 }).temperature; // 78.90 K, the bubble point
 */
export function fluid(name: string): Fluid {
  let found = made.get(name);
  if (found === undefined) {
    const own = fluidData.find((candidate) => candidate.name === name);
    if (own === undefined) throw new UnknownFluidError(name, fluidNames);
    found = new Fluid(own);
    made.set(name, found);
  }
  return found;
}
