import type { Passage, PassagePoint } from "../blocks/passage.js";
import { carbonDioxideAtSaturation, waterAtSaturation, type Contents } from "../fluids/moist-air.js";
import { WATER_TRIPLE_TEMPERATURE } from "../fluids/water.js";
import type { Place, Substance } from "./moisture-result.js";

/** Water taken out by a trap or dryer, mol per mol of dry air. */
export interface Taken {
  readonly at: string;
  readonly by: "trap" | "dryer";
  readonly amount: number;
  readonly temperature: number;
  readonly pressure: number;
}

/** What freezes out along a passage, mol per mol of dry air. */
export interface Settled {
  readonly substance: Substance;
  readonly amount: number;
  /** of it, what arrives as liquid water */
  readonly liquid: number;
  readonly begins: Place;
  readonly ends: Place;
}

/** What a passage does to the contents of the air that goes through it. */
export interface Collected {
  readonly contents: Contents;
  readonly taken: readonly Taken[];
  readonly settled: readonly Settled[];
}

/** Share of what settles in a block by whose place the stretch is said to end. */
const NEARLY_ALL = 0.99;

/**
 * Follows water and carbon dioxide (mol per mol of dry air) through a passage. Above the triple point condensed water
 * travels on with the gas until a trap takes it or it freezes; below it, and for carbon dioxide, whatever is more than the gas
 * can hold as vapour stays where it is.
 */
export function collect(passage: Passage, incoming: Contents): Collected {
  const { points } = passage;
  let { water } = incoming;
  const taken: Taken[] = [];
  let settling = 0;
  for (const { temperature, pressure, trap, dryer } of points) {
    const most = waterAtSaturation(temperature, pressure);
    if (water > most && temperature < WATER_TRIPLE_TEMPERATURE) {
      settling += water - most;
      water = most;
    } else if (water > most && trap !== undefined) {
      taken.push({ at: trap, by: "trap", amount: water - most, temperature, pressure });
      water = most;
    }
    if (dryer === undefined) continue;
    const dry = waterAtSaturation(dryer.dewPoint, pressure);
    if (water <= dry) continue;
    taken.push({ at: dryer.at, by: "dryer", amount: water - dry, temperature, pressure });
    water = dry;
  }
  const last = points.at(-1) as PassagePoint;
  const carbonDioxide = Math.min(incoming.carbonDioxide, carbonDioxideAtSaturation(last.temperature, last.pressure));
  const settled: Settled[] = [];
  if (settling > 0) settled.push(stretch(passage, "water", water + settling, settling));
  const frozen = incoming.carbonDioxide - carbonDioxide;
  if (frozen > 0) settled.push(stretch(passage, "carbonDioxide", incoming.carbonDioxide, frozen));
  return { contents: { water, carbonDioxide }, taken, settled };
}

type Saturation = (temperature: number, pressure: number) => number;

/** Above the triple point water does not settle. */
const iceSaturation: Saturation = (temperature, pressure) =>
  temperature < WATER_TRIPLE_TEMPERATURE ? waterAtSaturation(temperature, pressure) : Infinity;

/** Where along the points an amount settles out of what arrives. */
function stretch({ points, alongDuty }: Passage, substance: Substance, arriving: number, amount: number): Settled {
  const saturation = substance === "water" ? iceSaturation : carbonDioxideAtSaturation;
  const begins = fallsTo(points, arriving, saturation);
  // Only at the triple point is there water that has condensed before and not frozen yet.
  const wet = substance === "water" && begins.temperature > WATER_TRIPLE_TEMPERATURE - 1e-3;
  const vapour = wet ? Math.min(arriving, waterAtSaturation(begins.temperature, begins.pressure)) : arriving;
  return {
    substance,
    amount,
    liquid: arriving - vapour,
    begins: placeOf(begins, alongDuty),
    ends: placeOf(fallsTo(points, arriving - NEARLY_ALL * amount, saturation), alongDuty),
  };
}

/** The first state between the points at which the gas can hold no more than an amount. */
function fallsTo(points: readonly PassagePoint[], amount: number, saturation: Saturation): PassagePoint {
  const reached = ({ temperature, pressure }: PassagePoint): boolean => saturation(temperature, pressure) <= amount;
  const index = points.findIndex(reached);
  if (index === 0) return points[0];
  if (index < 0) return points.at(-1) as PassagePoint;
  let before = 0;
  let after = 1;
  const [from, to] = [points[index - 1], points[index]];
  for (let halving = 0; halving < HALVINGS; halving++) {
    const middle = (before + after) / 2;
    if (reached(between(from, to, middle))) after = middle;
    else before = middle;
  }
  return between(from, to, after);
}

/** Enough to place a state to a billionth of a segment. */
const HALVINGS = 30;

function between(from: PassagePoint, to: PassagePoint, share: number): PassagePoint {
  const mean = (a: number, b: number): number => a + share * (b - a);
  return {
    place: mean(from.place, to.place),
    temperature: mean(from.temperature, to.temperature),
    pressure: mean(from.pressure, to.pressure),
  };
}

function placeOf({ place, temperature }: PassagePoint, alongDuty = false): Place {
  return { dutyFraction: alongDuty ? place : null, temperature };
}
