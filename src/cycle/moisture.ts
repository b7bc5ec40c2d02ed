import { purityClass } from "../fluids/air-purity.js";
import { CARBON_DIOXIDE_MOLAR_MASS } from "../fluids/carbon-dioxide.js";
import { ATMOSPHERIC_CARBON_DIOXIDE, dewPoint, frostPoint, humidityRatio, type Contents } from "../fluids/moist-air.js";
import { fluid } from "../fluids/registry.js";
import { WATER_MOLAR_MASS } from "../fluids/water.js";
import type { CycleDefinition } from "./definition.js";
import { followContents, type Followed, type Visit } from "./moisture-walk.js";
import type { Amount, Deposit, Filling, Moisture, Removal, Substance } from "./moisture-result.js";
import type { Station, SteadyState } from "./result.js";

/** kg/mol */
const MOLAR_MASS: Readonly<Record<Substance, number>> = { water: WATER_MOLAR_MASS, carbonDioxide: CARBON_DIOXIDE_MOLAR_MASS };

/** kg/m3 of the solids without pores: ice Ih at 0 degC (IAPWS R10-06), carbon dioxide near its sublimation point at 1 atm (from memory). */
const SOLID_DENSITY: Readonly<Record<Substance, number>> = { water: 917, carbonDioxide: 1560 };

/** What settles in a block is not reported below this share of what the fresh air brings. */
const TRACE = 1e-6;

/**
 * Where the water and carbon dioxide of the surrounding air go in a solved machine; null for a fluid that is not taken from the
 * surroundings. What has settled is taken to stay: nothing is blown on, melted or taken up again by the returning gas.
 */
export function moisture(definition: CycleDefinition, state: SteadyState): Moisture | null {
  if (definition.fluid !== "air") return null;
  const { temperature, pressure, relativeHumidity, carbonDioxide = ATMOSPHERIC_CARBON_DIOXIDE } = definition.surroundings;
  const fresh: Contents = { water: humidityRatio(temperature, pressure, relativeHumidity), carbonDioxide };
  const madeUp = state.blocks.map(({ makeUpFlow }) => makeUpFlow).find((flow) => typeof flow === "number" && flow > 0) as number | undefined;
  const source = definition.circuit === "open" ? "intake" : madeUp === undefined ? "first fill" : "make-up";
  const freshAir = source === "make-up" ? (madeUp as number) : state.massFlow;
  const followed = followContents(definition, state, { source, fresh, share: freshAir / state.massFlow });

  const airMolarMass = fluid(definition.fluid).molarMass;
  const amount = (moles: number, massFlow: number, substance: Substance): Amount => {
    const rate = (moles * massFlow * MOLAR_MASS[substance]) / airMolarMass;
    return { rate: source === "first fill" ? null : rate, perFreshAir: rate / freshAir };
  };
  const removals = followed.visits.flatMap(({ collected, massFlow }): Removal[] =>
    collected.taken.map(({ amount: moles, ...where }) => ({ ...where, ...amount(moles, massFlow, "water") })),
  );
  const deposits = followed.visits.flatMap(({ entry, after, collected, massFlow }): Deposit[] =>
    collected.settled.flatMap(({ substance, amount: moles, liquid, begins, ends }) => {
      if (moles * massFlow < TRACE * fresh[substance] * freshAir) return [];
      const arrivesLiquid = amount(liquid, massFlow, substance).rate;
      return [{ after, block: entry.name, substance, begins, ends, arrivesLiquid, ...amount(moles, massFlow, substance) }];
    }),
  );
  return {
    source,
    fresh,
    freshAir: source === "first fill" ? null : freshAir,
    left: leftOver(followed.visits),
    removals,
    stations: stationContents(state.stations, followed),
    deposits,
    fillings: followed.visits.flatMap((visit) => filling(visit, deposits)),
  };
}

/** Behind the last trap or dryer that the gas meets. */
function leftOver(visits: readonly Visit[]): Moisture["left"] {
  const last = visits.findLast(({ passage }) => passage.points.some(({ trap, dryer }) => trap !== undefined || dryer !== undefined));
  const pressure = last?.passage.points.at(-1)?.pressure;
  if (last === undefined || pressure === undefined) return null;
  const { contents } = last.collected;
  const pressureDewPoint = dewPoint(contents.water, pressure);
  const waterClass = pressureDewPoint === null ? null : purityClass(pressureDewPoint);
  return { ...contents, after: last.after, pressureDewPoint, waterClass };
}

function stationContents(stations: readonly Station[], { at }: Followed): Moisture["stations"] {
  return stations.flatMap(({ station, after, pressure }) => {
    const contents = at.get(after);
    if (contents === undefined) return [];
    return [{ station, after, ...contents, dewPoint: dewPoint(contents.water, pressure), frostPoint: frostPoint(contents.carbonDioxide, pressure) }];
  });
}

/** The time that all that settles in a passage takes to fill the share asked for. */
function filling({ entry, after, passage: { volume, filled } }: Visit, deposits: readonly Deposit[]): Filling[] {
  if (volume === undefined || filled === undefined) return [];
  const growth = deposits.filter((deposit) => deposit.after === after).reduce((sum, { rate, substance }) => sum + (rate ?? 0) / SOLID_DENSITY[substance], 0);
  return growth > 0 ? [{ after, block: entry.name, passageVolume: volume, filled, time: (filled * volume) / growth }] : [];
}
