import type { Stream } from "../blocks/stream.js";
import type { Warning } from "../blocks/unit.js";
import { dryAir } from "../fluids/data/air-mixture.js";
import { argon } from "../fluids/data/argon.js";
import { nitrogen } from "../fluids/data/nitrogen.js";
import { oxygen } from "../fluids/data/oxygen.js";
import type { Equilibrium } from "../fluids/equilibrium.js";
import { NoConvergenceError } from "../fluids/errors.js";
import { equilibrium, type Composition } from "../fluids/mixture.js";
import type { Network } from "./network.js";

/** What liquid and vapour of wet air are made of, mole fractions. */
export interface WetComposition {
  readonly liquid: Composition;
  readonly vapour: Composition;
}

/** kg/mol, in the order in which the mixture counts its components. */
const MOLAR_MASSES = [nitrogen.molarMass, argon.molarMass, oxygen.molarMass];
/** Error of the molar vapour fraction below which it counts as found. */
const FOUND = 1e-6;
const MOST_ROUNDS = 12;
/** Vapour fractions nearer to 0 or 1 than this are a saturated phase with the solver's round-off. */
const SATURATED = 1e-9;

const air = Float64Array.of(dryAir.nitrogen, dryAir.argon, dryAir.oxygen);
/** Made once, at the first wet station: it takes longer than to solve it. */
let made: Equilibrium | undefined;

/**
 * Liquid and vapour in equilibrium in air of which a fraction by mass is vapour; null for one phase alone, and near the critical
 * pressure, where the mixture's equations have no equilibrium.
 *
 * @param pressure Pa
 * @param vapourFraction kg/kg
 */
export function wetAir(pressure: number, vapourFraction: number): WetComposition | null {
  if (!(vapourFraction > SATURATED && vapourFraction < 1 - SATURATED)) return null;
  const phases = (made ??= equilibrium(air));
  phases.forget();
  try {
    solve(phases, pressure, vapourFraction);
  } catch (error) {
    if (error instanceof NoConvergenceError) return null;
    throw error;
  }
  return { liquid: named(phases.liquid.x), vapour: named(phases.vapour.x) };
}

/** Solves at a mass vapour fraction: the molar one by the secant method, from where the two are equal. */
function solve(phases: Equilibrium, pressure: number, vapourFraction: number): void {
  let molar = vapourFraction;
  let [before, excessBefore] = [NaN, NaN];
  for (let round = 0; round < MOST_ROUNDS; round++) {
    phases.solve(pressure, molar);
    const excess = (vapourFraction * massOf(air)) / massOf(phases.vapour.x) - molar;
    if (Math.abs(excess) < FOUND) return;
    const slope = round === 0 ? -1 : (excess - excessBefore) / (molar - before);
    [before, excessBefore] = [molar, excess];
    molar = Math.min(1, Math.max(0, molar - excess / slope));
  }
}

/** kg/mol */
function massOf(x: Float64Array): number {
  return x.reduce((sum, fraction, i) => sum + fraction * MOLAR_MASSES[i], 0);
}

function named(x: Float64Array): Composition {
  return { nitrogen: x[0], argon: x[1], oxygen: x[2] };
}

/** Streams of the liquid that was separated from its vapour, down to where they leave or are mixed in: they are not of air's composition. */
export function separatedLiquid({ blocks }: Network): ReadonlySet<Stream> {
  const found = new Set<Stream>();
  for (const { separated } of separations(blocks)) {
    for (let stream: Stream | undefined = separated; stream !== undefined && !found.has(stream); ) {
      found.add(stream);
      const reached: Stream = stream;
      stream = blocks.flatMap(({ ports }) => ports).find(({ inlet }) => inlet === reached)?.outlet;
    }
  }
  return found;
}

/**
 * Oxygen in what is drawn, mole fraction; null where it does not follow from one separation.
 *
 * In an open circuit it is the liquid that leaves the separation. In a closed one the draw carries away what the make-up brings
 * in, which is air: the gas that goes round has by then become so much poorer in oxygen.
 */
export function drawnOxygen({ definition, blocks }: Network): number | null {
  const [separation, another] = separations(blocks);
  if (separation === undefined || another !== undefined) return null;
  if (definition.circuit === "closed") return dryAir.oxygen;
  const { pressure, state } = separation.wet;
  return wetAir(pressure, state.vapourFraction)?.liquid.oxygen ?? null;
}

/** What the state points leave out where liquid is drawn from a closed circuit of air. */
export function drawnLiquidWarnings({ definition, blocks, products }: Network): Warning[] {
  const isDrawn = products.some(({ massFlow }) => massFlow > 0) && separations(blocks).length > 0;
  if (definition.fluid !== "air" || definition.circuit === "open" || !isDrawn) return [];
  return [
    {
      code: "composition-drifts",
      block: null,
      message:
        "the first liquid drawn is richer in oxygen than air, and the gas left in the loop grows poorer in it until the liquid holds no " +
        "more than the make-up brings in, 21 %. The state points are those of air throughout.",
    },
  ];
}

/** Where a branch takes the liquid of a wet stream: its share of the flow follows from the state of the gas. */
function separations(blocks: Network["blocks"]): { wet: Stream; separated: Stream }[] {
  return blocks.flatMap(({ kind: { joint }, ports }) => {
    if (joint?.direction !== "gives" || joint.share !== undefined) return [];
    return ports.flatMap(({ inlet, branch }) => (branch === undefined ? [] : [{ wet: inlet, separated: branch }]));
  });
}
