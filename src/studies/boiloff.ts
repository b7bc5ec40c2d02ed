import { equilibrium, mixture, type Composition, type Flash } from "../fluids/mixture.js";
import { bracketedRoot } from "../fluids/root.js";

/** Oxygen fractions whose passing is reported: enriched (29 CFR 1910.146(b)), half, nearly pure. */
export const OXYGEN_MARKS: readonly number[] = [0.235, 0.5, 0.9];
/** Steps of the integration from the whole liquid to the last of it; twice as many change no figure by 1e-6. */
const STEPS = 120;
/** Share of the liquid at which the integration ends. */
const LAST_SHARE = 1e-3;

/** What is left of the liquid when a fraction of it has evaporated. */
export interface Remainder {
  /** mol of vapour gone per mol of liquid at the start */
  readonly evaporated: number;
  /** K */
  readonly temperature: number;
  readonly liquid: Composition;
}

/** How a liquid's composition changes as it evaporates. */
export interface Boiloff {
  /** Pa */
  readonly pressure: number;
  readonly start: Composition;
  /** Vapour that leaves at once (Rayleigh), as from an open vessel. */
  readonly open: readonly Remainder[];
  /** Vapour that stays in equilibrium with all of the liquid, as in a closed one. */
  readonly closed: readonly Remainder[];
  readonly marks: readonly OxygenMark[];
}

/** Fraction evaporated at which the liquid passes an oxygen mole fraction; null where it never does. */
export interface OxygenMark {
  readonly oxygen: number;
  readonly open: number | null;
  readonly closed: number | null;
}

/**
 * The composition of the liquid that remains, against the fraction evaporated, at constant pressure.
 *
 * Open: d(L x) = y dL, so dx / d ln L = y - x with y in equilibrium with x (Lord Rayleigh, Phil. Mag. 4 (1902) 521), integrated over ln L
 * by the classical Runge-Kutta method. Closed: the equilibrium of the whole at each vapour fraction.
 *
 * @param pressure Pa
 * @param points rows of each table
 * @throws OutOfRangeError, NoConvergenceError where the liquid has no equilibrium at that pressure
 */
export function boiloff(start: Composition, pressure: number, points = 20): Boiloff {
  const whole = mixture(start);
  const closedAt = (evaporated: number): Remainder => remainder(evaporated, whole.flash({ pressure, vapourFraction: evaporated }));
  const fractions = Array.from({ length: points + 1 }, (_, i) => i / points);
  // First, for it checks the range.
  const closed = fractions.map(closedAt);
  const track = rayleigh(start, pressure);
  const openAt = (evaporated: number): Remainder => track.at(evaporated);
  const open = fractions.map((evaporated) => openAt(Math.min(evaporated, 1 - LAST_SHARE)));
  const marks = OXYGEN_MARKS.map((oxygen) => ({
    oxygen,
    open: crossing((evaporated) => openAt(evaporated).liquid.oxygen - oxygen, 1 - LAST_SHARE),
    closed: crossing((evaporated) => closedAt(evaporated).liquid.oxygen - oxygen, 1),
  }));
  return { pressure, start, open, closed, marks };
}

/** Fraction evaporated at which a rising excess passes zero; 0 where it starts above, null where it ends below. */
function crossing(excess: (evaporated: number) => number, last: number): number | null {
  if (excess(0) >= 0) return 0;
  if (excess(last) < 0) return null;
  return bracketedRoot(excess, 0, last, { tolerance: 1e-9 });
}

function remainder(evaporated: number, { temperature, liquid }: Flash): Remainder {
  return { evaporated, temperature, liquid: liquid as Composition };
}

/** The open evaporation, followed once and then read off by cubic pieces between its steps. */
function rayleigh(start: Composition, pressure: number): { at(evaporated: number): Remainder } {
  const z = new Float64Array(3);
  const boiling = equilibrium(z);
  const boil = ({ oxygen, argon }: Pair): void => {
    const liquid = composition(oxygen, argon);
    z.set([liquid.nitrogen, liquid.argon, liquid.oxygen]);
    boiling.solve(pressure, 0);
  };
  /** dx / d ln L = y - x */
  const enrichment = (x: Pair): Pair => {
    boil(x);
    return { oxygen: boiling.vapour.x[2] - x.oxygen, argon: boiling.vapour.x[1] - x.argon };
  };
  const width = Math.log(LAST_SHARE) / STEPS;
  const nodes: { x: Pair; slope: Pair }[] = [];
  let x: Pair = start;
  for (let step = 0; step <= STEPS; step++) {
    const slope = enrichment(x);
    nodes.push({ x, slope });
    const second = enrichment(moved(x, slope, width / 2));
    const third = enrichment(moved(x, second, width / 2));
    const fourth = enrichment(moved(x, third, width));
    const mean = (name: keyof Pair): number => (slope[name] + 2 * second[name] + 2 * third[name] + fourth[name]) / 6;
    x = moved(x, { oxygen: mean("oxygen"), argon: mean("argon") }, width);
  }
  return {
    at(evaporated) {
      const place = Math.min(Math.log(1 - evaporated) / width, STEPS);
      const index = Math.min(Math.floor(place), STEPS - 1);
      const [left, right] = [nodes[index], nodes[index + 1]];
      const read = (name: keyof Pair): number =>
        hermite(place - index, left.x[name], right.x[name], left.slope[name] * width, right.slope[name] * width);
      const between = { oxygen: read("oxygen"), argon: read("argon") };
      boil(between);
      return { evaporated, temperature: boiling.temperature, liquid: composition(between.oxygen, between.argon) };
    },
  };
}

/** The two mole fractions that fix a composition. */
interface Pair {
  readonly oxygen: number;
  readonly argon: number;
}

function moved(x: Pair, slope: Pair, width: number): Pair {
  return { oxygen: x.oxygen + slope.oxygen * width, argon: x.argon + slope.argon * width };
}

/** Keeps round-off from making a fraction negative when one component is all but gone. */
function composition(oxygen: number, argon: number): Composition {
  const o = Math.min(1, Math.max(0, oxygen));
  const a = Math.min(1 - o, Math.max(0, argon));
  return { nitrogen: 1 - o - a, argon: a, oxygen: o };
}

/** Cubic between two values with given slopes, at a place from 0 to 1. */
function hermite(place: number, left: number, right: number, slopeLeft: number, slopeRight: number): number {
  const rest = 1 - place;
  return (
    left * (1 + 2 * place) * rest * rest +
    right * (3 - 2 * place) * place * place +
    slopeLeft * place * rest * rest -
    slopeRight * place * place * rest
  );
}
