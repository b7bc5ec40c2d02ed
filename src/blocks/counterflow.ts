import type { Fluid } from "../fluids/fluid.js";
import { State } from "../fluids/state.js";
import { leastOf } from "./least.js";
import { bracketedRoot } from "../fluids/root.js";

/** One stream through an exchanger: what comes in, and the pressure at which it leaves. */
export interface Side {
  /** kg/s */
  massFlow: number;
  /** J/kg at the inlet */
  enthalpy: number;
  /** Pa at the inlet */
  pressure: number;
  /** Pa */
  outletPressure: number;
}

/**
 * Places inside at which the temperature difference is looked at first, as duty fractions from the warm end, besides those at which
 * a stream changes phase; between them it runs smoothly.
 */
const LOOKS = [0.05, 0.3, 0.65, 0.95];
/** A difference inside that is smaller than this share of the largest at an end, */
const SMALL = 0.02;
/** and than this share of a straight line between the ends, calls for a closer look. */
const SAGGING = 0.03;
/** K; a difference that misses its target by less is round-off of two flashes, not a crossing. */
const ROUND_OFF = 1e-8;
/** Pieces in which the conductance is first summed, closer towards the ends where the difference changes most, and the most. */
const FIRST_PIECES = 20;
const MOST_PIECES = 300;
/** Share of the largest duty to which the duty of a conductance is found. */
const DUTY_TOLERANCE = 1e-13;
/** Relative change of the conductance on halving its pieces at which it counts as known. */
const CONDUCTANCE_TOLERANCE = 1e-3;

/**
 * Two streams in counterflow, both followed along their real enthalpies. Places inside are duty fractions: 0 at the warm
 * end, 1 at the cold end; pressures fall, and a heat leak comes into the cold stream, in proportion to the duty.
 */
export class Counterflow {
  readonly warm: Side = { massFlow: NaN, enthalpy: NaN, pressure: NaN, outletPressure: NaN };
  readonly cold: Side = { massFlow: NaN, enthalpy: NaN, pressure: NaN, outletPressure: NaN };
  /** W into the cold stream from outside */
  heatLeak = 0;
  /** Places between which the conductance is summed; once made finer it stays so. */
  private grid: number[] = Array.from({ length: FIRST_PIECES + 1 }, (_, i) => (1 - Math.cos((Math.PI * i) / FIRST_PIECES)) / 2);
  /** Duty over the largest, of the last search for a conductance. */
  private share = 0.9;
  private readonly warmState = new State();
  private readonly coldState = new State();

  constructor(private readonly fluid: Fluid) {}

  /** K */
  warmTemperature(duty: number, place: number): number {
    const { massFlow, enthalpy, pressure, outletPressure } = this.warm;
    const here = pressure + place * (outletPressure - pressure);
    return this.fluid.pressureEnthalpy(here, enthalpy - (place * duty) / massFlow, this.warmState).temperature;
  }

  /** K */
  coldTemperature(duty: number, place: number): number {
    const { massFlow, enthalpy, pressure, outletPressure } = this.cold;
    const passed = 1 - place;
    const here = pressure + passed * (outletPressure - pressure);
    return this.fluid.pressureEnthalpy(here, enthalpy + (passed * (duty + this.heatLeak)) / massFlow, this.coldState)
      .temperature;
  }

  /** K, warm less cold */
  difference(duty: number, place: number): number {
    return this.warmTemperature(duty, place) - this.coldTemperature(duty, place);
  }

  /**
   * The largest duty (W) that leaves at least the given temperature difference (K) everywhere inside; 0 where the streams
   * come in closer than that.
   */
  dutyAtApproach(approach: number): number {
    const { warm, cold, fluid } = this;
    const warmInlet = this.warmTemperature(0, 0);
    const coldInlet = this.coldTemperature(0, 1);
    if (!(warmInlet - approach > coldInlet)) return 0;
    const coldOutlet = fluid.temperaturePressure(warmInlet - approach, cold.outletPressure, this.coldState).enthalpy;
    // A cold stream colder than the warm one's freezing point sets no limit of its own: the warm end will.
    const coldestOutlet = Math.max(coldInlet + approach, fluid.lowestTemperature(warm.outletPressure));
    const warmOutlet = fluid.temperaturePressure(coldestOutlet, warm.outletPressure, this.warmState).enthalpy;
    const warmEndAllows = cold.massFlow * (coldOutlet - cold.enthalpy) - this.heatLeak;
    const coldEndAllows = warm.massFlow * (warm.enthalpy - warmOutlet);
    const endsAllow = Math.min(warmEndAllows, coldEndAllows);
    if (!(endsAllow > 0)) return 0;
    // At one end the difference is the approach itself; only the other has to be computed.
    const spareAtWarmEnd =
      warmEndAllows <= coldEndAllows ? 0 : warmInlet - this.coldTemperature(endsAllow, 0) - approach;
    const spareAtColdEnd =
      warmEndAllows <= coldEndAllows ? this.warmTemperature(endsAllow, 1) - coldInlet - approach : 0;
    if (!this.comesClose(endsAllow, approach, spareAtWarmEnd, spareAtColdEnd)) return endsAllow;
    const spare = (duty: number): number => this.smallestDifference(duty).value - approach;
    const spareThere = spare(endsAllow);
    if (spareThere >= -ROUND_OFF) return endsAllow;
    return bracketedRoot(spare, 0, endsAllow, {}, undefined, spareThere);
  }

  /** Whether the difference somewhere inside is so small that it has to be looked at closely. */
  private comesClose(duty: number, approach: number, first: number, last: number): boolean {
    const small = SMALL * Math.max(first, last);
    const isClose = (place: number): boolean => {
      const straight = first + place * (last - first);
      return this.difference(duty, place) - approach < Math.min(small, SAGGING * straight) - ROUND_OFF;
    };
    for (const place of LOOKS) if (isClose(place)) return true;
    const { warm, cold } = this;
    return (
      this.isCloseAtPhaseChange(warm.pressure, warm.enthalpy, -duty / warm.massFlow, isClose, 0) ||
      this.isCloseAtPhaseChange(cold.pressure, cold.enthalpy, (duty + this.heatLeak) / cold.massFlow, isClose, 1)
    );
  }

  /**
   * The same about where a stream's enthalpy, on its way from its inlet, passes its bubble and dew points; those of its inlet
   * pressure do for a first look.
   */
  private isCloseAtPhaseChange(
    pressure: number,
    enthalpy: number,
    change: number,
    isClose: (place: number) => boolean,
    inletPlace: 0 | 1,
  ): boolean {
    if (pressure >= this.fluid.criticalPressure || pressure < this.fluid.lowestSaturationPressure) return false;
    const { liquidEnthalpy, vapourEnthalpy } = this.fluid.saturation(pressure);
    for (const boundary of [liquidEnthalpy, vapourEnthalpy]) {
      const passed = (boundary - enthalpy) / change;
      if (passed > 0 && passed < 1 && isClose(inletPlace === 0 ? passed : 1 - passed)) return true;
    }
    return false;
  }

  /** The smallest temperature difference (K) and the duty fraction from the warm end at which it stands. */
  smallestDifference(duty: number): { value: number; place: number } {
    return leastOf((place) => this.difference(duty, place), 0, 1, this.kinks(duty));
  }

  /** Duty fractions at which a stream starts or ends its change of phase: the difference may have a corner there. */
  private kinks(duty: number): number[] {
    const { warm, cold, fluid, heatLeak } = this;
    const places: number[] = [];
    const add = (pressure: number, change: number, enthalpyAt: (place: number) => number): void => {
      if (Math.max(pressure, pressure + change) >= fluid.criticalPressure) return;
      if (Math.min(pressure, pressure + change) < fluid.lowestSaturationPressure) return;
      for (const boundary of ["liquidEnthalpy", "vapourEnthalpy"] as const) {
        const over = (place: number): number =>
          enthalpyAt(place) - fluid.saturation(pressure + place * change)[boundary];
        const first = over(0);
        const last = over(1);
        if (!(first * last < 0)) continue;
        // Over a few percent of pressure the boundary is all but straight: one correction of the straight line's place is exact
        // to 1e-8, and saturation has to be solved at one pressure only that is not an end's.
        const straight = first / (first - last);
        places.push(Math.min(1, Math.max(0, straight + over(straight) / (first - last))));
      }
    };
    add(warm.pressure, warm.outletPressure - warm.pressure, (place) => warm.enthalpy - (place * duty) / warm.massFlow);
    add(
      cold.outletPressure,
      cold.pressure - cold.outletPressure,
      (place) => cold.enthalpy + ((1 - place) * (duty + heatLeak)) / cold.massFlow,
    );
    return places;
  }

  /**
   * Conductance (W/K) that the duty (W) takes: the integral of dQ/dT over the profile, by logarithmic mean differences of pieces
   * that are halved where it matters until the whole changes by less than 0.1 %. Infinity where the difference vanishes.
   */
  conductance(duty: number): number {
    let pieces = this.piecesOf(duty);
    let sum = pieces.reduce((total, piece) => total + piece.sum, 0);
    while (Number.isFinite(sum) && pieces.length < MOST_PIECES) {
      const halved = pieces.map((piece) => this.halve(duty, piece));
      const changes = halved.map(([first, second], i) => Math.abs(first.sum + second.sum - pieces[i].sum));
      if (changes.reduce((total, change) => total + change, 0) <= CONDUCTANCE_TOLERANCE * sum) break;
      const noticeable = (CONDUCTANCE_TOLERANCE * sum) / (2 * pieces.length);
      pieces = pieces.flatMap((piece, i) => (changes[i] > noticeable ? halved[i] : [piece]));
      sum = pieces.reduce((total, piece) => total + piece.sum, 0);
    }
    this.grid = [0, ...pieces.map(({ to }) => to)];
    return duty * sum;
  }

  private piecesOf(duty: number): Piece[] {
    const { grid } = this;
    const pieces: Piece[] = [];
    let before = this.difference(duty, 0);
    for (let i = 1; i < grid.length; i++) {
      const after = this.difference(duty, grid[i]);
      pieces.push(pieceOf(grid[i - 1], grid[i], before, after));
      before = after;
    }
    return pieces;
  }

  private halve(duty: number, { from, to, before, after }: Piece): [Piece, Piece] {
    const middle = (from + to) / 2;
    const between = this.difference(duty, middle);
    return [pieceOf(from, middle, before, between), pieceOf(middle, to, between, after)];
  }

  /** The sum over the pieces of the grid as it stands, so that it runs smoothly with the duty. */
  private summedConductance(duty: number): number {
    const { grid } = this;
    let sum = 0;
    let before = this.difference(duty, 0);
    for (let i = 1; i < grid.length; i++) {
      const after = this.difference(duty, grid[i]);
      sum += (grid[i] - grid[i - 1]) / logarithmicMean(before, after);
      before = after;
    }
    return sum * duty;
  }

  /** The duty (W) that an exchanger of the given conductance (W/K) transfers. */
  dutyAtConductance(conductance: number): number {
    const most = this.dutyAtApproach(0);
    if (most === 0) return 0;
    // The mean difference that the duty leaves, less the one that it needs: nearly straight in the duty.
    const spare = (duty: number): number => {
      if (duty === 0) return this.difference(0, 0);
      return duty / this.summedConductance(duty) - duty / conductance;
    };
    for (;;) {
      // The share of the last time splits the bracket: from one pass to the next it hardly changes.
      const guess = this.share * most;
      const spareThere = spare(guess);
      const [low, high, spareLow, spareHigh] =
        spareThere > 0 ? [guess, most, spareThere, -most / conductance] : [0, guess, spare(0), spareThere];
      const duty = bracketedRoot(spare, low, high, { tolerance: DUTY_TOLERANCE * most }, spareLow, spareHigh);
      this.share = duty / most;
      const pieces = this.grid.length;
      this.conductance(duty);
      if (this.grid.length === pieces) return duty;
    }
  }
}

/** A part of the profile, with the temperature differences at its ends and its share of the conductance over the duty. */
interface Piece {
  readonly from: number;
  readonly to: number;
  readonly before: number;
  readonly after: number;
  readonly sum: number;
}

function pieceOf(from: number, to: number, before: number, after: number): Piece {
  return { from, to, before, after, sum: (to - from) / logarithmicMean(before, after) };
}

/**
 * Logarithmic mean of two temperature differences (K); 0 where either is not positive.
 * Near equality the quotient loses its digits, so its series takes over there.
 */
export function logarithmicMean(first: number, second: number): number {
  if (!(first > 0) || !(second > 0)) return 0;
  const half = (first - second) / (first + second);
  if (Math.abs(half) < 1e-3) return ((first + second) / 2) * (1 - (half * half) / 3);
  return (first - second) / Math.log(first / second);
}
