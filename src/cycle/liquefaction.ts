import { given, type BlockDefinition } from "../blocks/definition.js";
import { blockKind } from "../blocks/registry.js";
import { bracketedRoot } from "../fluids/root.js";
import type { CycleDefinition } from "./definition.js";
import { linesOf } from "./lines.js";
import { NoSteadyState } from "./failure.js";
import type { Network } from "./network.js";
import type { Liquefaction } from "./result.js";

/** Efficiency to which the threshold is known. */
const TOLERANCE = 1e-7;
/** J/kg; a margin still as large as this in a bracket as narrow as that is a jump: the machine falls from one steady state to a colder one. */
const JUMP = 500;
const JUMP_WIDTH = 1e-4;
/** Lowest efficiency considered: a wheel that only brakes the gas. */
const LOWEST = 0.01;
/** Factor by which the efficiency is moved until the machine turns from dry to wet or back. */
const STRIDE = 1.6;
/** J/kg, a margin that stands for a machine that does not even cool to its surroundings' temperature. */
const FAR_FROM_LIQUID = 1e6;

/** Enthalpy over the dew point's (J/kg) where it is smallest, and the station; null where nothing can condense. */
export interface Margin {
  readonly margin: number;
  readonly where: string;
}

/** A changed machine's margin (J/kg), and the tears at which it settled. */
export interface Trial {
  readonly margin: number;
  readonly tears: Float64Array;
}

/** How far a settled machine's streams are from condensing. */
export function liquefactionMargin({ labelled, setting }: Network): Margin | null {
  const { fluid } = setting;
  let least: Margin | null = null;
  for (const { after, stream, aside } of labelled) {
    const { pressure, enthalpy, massFlow } = stream;
    if (aside === true || massFlow <= 0) continue;
    if (pressure >= fluid.criticalPressure || pressure < fluid.lowestSaturationPressure) continue;
    const margin = enthalpy - fluid.saturation(pressure).vapourEnthalpy;
    if (least === null || margin < least.margin) least = { margin, where: after };
  }
  return least;
}

/**
 * The smallest isentropic efficiency at which the machine begins to liquefy, put to every expander at once or to the one
 * named: the root of the margin, which is followed as a continuous quantity.
 *
 * @param margin what the machine shows as it is defined
 * @param tears where it settled
 * @param tryOut settles a changed definition, from the tears of a poorer expander's where given; throws NoSteadyState
 */
export function liquefactionThreshold(
  definition: CycleDefinition,
  margin: Margin | null,
  tears: Float64Array,
  tryOut: (changed: CycleDefinition, from: Float64Array | undefined) => Trial,
  expander?: string,
): Liquefaction {
  const values = efficiencies(definition, expander);
  const parameter = expander === undefined ? "every expander's efficiency" : `${expander}.efficiency`;
  const found = { reached: margin !== null && margin.margin < 0, margin: margin?.margin ?? null, where: margin?.where ?? null, parameter };
  const [first] = values;
  const same = first !== undefined && values.every((value) => value === first) ? first : null;
  const answer = (required: number | null, reason: string | null): Liquefaction => ({ ...found, required, reason, given: same });
  if (first === undefined) return answer(null, "the machine has no expander");
  if (margin === null) return answer(null, "no station lies below the critical pressure, where a gas can condense");

  // A better expander settles colder: of the efficiencies tried, the best that is poorer starts the next.
  const tried: { efficiency: number; tears: Float64Array }[] = same === null ? [] : [{ efficiency: same, tears }];
  const marginAt = (efficiency: number): number => {
    const poorer = tried.filter((each) => each.efficiency <= efficiency).reduce<(typeof tried)[number] | undefined>((best, each) => (best === undefined || each.efficiency > best.efficiency ? each : best), undefined);
    try {
      const trial = tryOut(withEfficiency(definition, efficiency, expander), poorer?.tears);
      tried.push({ efficiency, tears: trial.tears });
      return trial.margin;
    } catch (error) {
      if (!(error instanceof NoSteadyState)) throw error;
      return error.quantity === "temperature" ? -FAR_FROM_LIQUID : FAR_FROM_LIQUID;
    }
  };
  // Bracketed from what the file gives, in steps by a factor: near it the margins are of one size, and few trials are needed.
  let low = same !== null && margin.margin > 0 ? { efficiency: same, margin: margin.margin } : null;
  let high = same !== null && margin.margin <= 0 ? { efficiency: same, margin: margin.margin } : null;
  while (low === null) {
    const efficiency = Math.max(LOWEST, (high?.efficiency ?? 1) / STRIDE);
    const trial = { efficiency, margin: marginAt(efficiency) };
    if (trial.margin > 0) low = trial;
    else if (efficiency === LOWEST) return answer(null, `it liquefies at any efficiency, even at ${LOWEST * 100} %`);
    else high = trial;
  }
  while (high === null) {
    const efficiency = Math.min(1, low.efficiency * STRIDE);
    const trial = { efficiency, margin: marginAt(efficiency) };
    if (trial.margin <= 0) high = trial;
    else if (efficiency < 1) low = trial;
    else {
      return answer(
        null,
        trial.margin === FAR_FROM_LIQUID
          ? "even perfect expanders give no steady state below the surroundings' temperature"
          : `even at 100 % the gas stays ${(trial.margin / 1e3).toFixed(1)} kJ/kg above its dew point`,
      );
    }
  }
  return answer(bracketedRoot(marginAt, low.efficiency, high.efficiency, { tolerance: TOLERANCE, enough: (value, width) => width < JUMP_WIDTH && Math.abs(value) > JUMP }, low.margin, high.margin), null);
}

function efficiencies(definition: CycleDefinition, expander: string | undefined): number[] {
  return linesOf(definition).flatMap(({ entries }) =>
    entries.flatMap((entry) => {
      const key = liquefactionKey(entry, expander);
      return key === undefined ? [] : (given(entry, key) ?? []);
    }),
  );
}

function withEfficiency(definition: CycleDefinition, efficiency: number, expander: string | undefined): CycleDefinition {
  const changed = (entry: BlockDefinition): BlockDefinition => {
    const key = liquefactionKey(entry, expander);
    return key === undefined ? entry : { ...entry, values: { ...entry.values, [key]: efficiency } };
  };
  const branches = Object.entries(definition.branches).map(([name, entries]) => [name, entries.map(changed)] as const);
  return { ...definition, loop: definition.loop.map(changed), branches: Object.fromEntries(branches) };
}

function liquefactionKey({ kind, name }: BlockDefinition, expander: string | undefined): string | undefined {
  return expander === undefined || name === expander ? blockKind(kind)?.liquefactionKey : undefined;
}
