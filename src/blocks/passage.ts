import { given, type BlockDefinition } from "./definition.js";

/** A state that the gas passes inside a block, for whatever may condense or freeze out of it there. */
export interface PassagePoint {
  /** Share of the duty passed, for an exchanger; else 0 at the inlet to 1 at the outlet. */
  readonly place: number;
  /** K */
  readonly temperature: number;
  /** Pa */
  readonly pressure: number;
  /** A trap stands here, and takes out what has condensed: the name under which it is reported. */
  readonly trap?: string;
  /** A dryer stands here, behind the trap: its block and the pressure dew point (K) to which it dries. */
  readonly dryer?: { readonly at: string; readonly dewPoint: number };
}

/** The way of the gas through an entry of the loop. */
export interface Passage {
  readonly points: readonly PassagePoint[];
  /** True where the points' places are shares of the duty: an exchanger's side with its profile. */
  readonly alongDuty?: true;
  /** m3 of the gas's own passage, where the file gives it. */
  readonly volume?: number;
  /** The share of that volume whose filling is asked for. */
  readonly filled?: number;
}

/** What a kind may know of a solved block to describe its passage. */
export interface Solved {
  readonly entry: BlockDefinition;
  readonly inlet: { /** K */ readonly temperature: number; /** Pa */ readonly pressure: number };
  readonly outlet: { readonly temperature: number; readonly pressure: number };
  /** The block's own figures. */
  readonly figures: Readonly<Record<string, unknown>>;
}

/** From inlet to outlet with nothing between: what a kind without a `passage` of its own has. */
export function plainPassage({ inlet, outlet }: Solved): Passage {
  return { points: [{ place: 0, ...stateOf(inlet) }, { place: 1, ...stateOf(outlet) }] };
}

/** The cooler's trap and dryer stand at its outlet. */
export function cooledPassage({ entry, inlet, outlet }: Solved, dewPoint: number | undefined): Passage {
  const behind = {
    ...(entry.values.trap === false ? {} : { trap: entry.name }),
    ...(dewPoint === undefined ? {} : { dryer: { at: entry.name, dewPoint } }),
  };
  return { points: [{ place: 0, ...stateOf(inlet) }, { place: 1, ...stateOf(outlet), ...behind }] };
}

/** A compressor's intercoolers with their traps, at equal pressure ratios of its stages. */
export function intercooledPassage(solved: Solved): Passage {
  const { entry, inlet, figures } = solved;
  const plain = plainPassage(solved).points;
  const discharges = figures.stageDischargeTemperatures;
  const ratio = figures.stagePressureRatio;
  const intercoolTo = given(entry, "intercool-to");
  if (intercoolTo === undefined || !Array.isArray(discharges) || typeof ratio !== "number") return { points: plain };
  let pressure = inlet.pressure;
  const coolers = (discharges as readonly number[]).slice(0, -1).map((discharge, index): PassagePoint => {
    pressure = pressure * ratio - (given(entry, "intercooler-pressure-drop") ?? 0);
    const trap = entry.values["intercooler-traps"] === false ? {} : { trap: `${entry.name} intercooler ${index + 1}` };
    // An intercooler cannot warm gas that leaves the stage colder than it.
    return { place: (index + 1) / discharges.length, temperature: Math.min(discharge, intercoolTo), pressure, ...trap };
  });
  return { points: [plain[0], ...coolers, plain[1]] };
}

/** The warm side of an exchanger, along its temperature profile; pressures fall in proportion to the duty. */
export function profiledPassage(solved: Solved): Passage {
  const { entry, inlet, outlet, figures } = solved;
  const { profile } = figures;
  if (entry.side !== "warm" || !Array.isArray(profile)) return plainPassage(solved);
  const volume = given(entry, "passage-volume");
  const points = (profile as readonly { dutyFraction: number; warmTemperature: number }[]).map(({ dutyFraction, warmTemperature }) => ({
    place: dutyFraction,
    temperature: warmTemperature,
    pressure: inlet.pressure + dutyFraction * (outlet.pressure - inlet.pressure),
  }));
  return volume === undefined ? { points, alongDuty: true } : { points, alongDuty: true, volume, filled: given(entry, "passage-filled") ?? FILLED };
}

/** The share of an exchanger's passage whose filling is asked for, unless the file gives one. */
export const FILLED = 0.1;

function stateOf({ temperature, pressure }: Solved["inlet"]): Pick<PassagePoint, "temperature" | "pressure"> {
  return { temperature, pressure };
}
