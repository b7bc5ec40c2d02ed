import { bracketedRoot } from "../fluids/root.js";

/** A function's value at a place, or why there is none. */
export type Sample = { readonly x: number; readonly value: number } | { readonly x: number; readonly value: null; readonly reason: string };

/** A place where a condition (value < 0) turns. */
export interface Turn {
  readonly x: number;
  /** True where the condition is met above the place and not below it. */
  readonly metAbove: boolean;
  /**
   * "root": the value passes zero. "jump": it leaps over zero, as a machine does that falls from one steady state to another.
   * "edge": it is met up to here, and beyond there is no value.
   */
  readonly kind: "root" | "jump" | "edge";
  /** Why there is no value beyond an edge. */
  readonly reason: string | null;
}

/** A place where values end without the condition turning there. */
export interface Edge {
  readonly x: number;
  /** True where there are values above the place. */
  readonly valuesAbove: boolean;
  readonly reason: string;
}

export interface Crossings {
  readonly turns: readonly Turn[];
  readonly edges: readonly Edge[];
  /** The samples of the scan, in their order. */
  readonly scan: readonly Sample[];
}

/** What a function answers: a number, or the reason that there is none. */
export type Followed = (x: number) => number | { readonly reason: string };

/** Share of the scanned span to which places are known. */
const TOLERANCE = 1e-10;
/** Share of the span on either side of a root at which a leap is told from a crossing. */
const BESIDE = 1e-6;
/** Share of the way from an edge to the next scanned place at which the reason for it is asked. */
const BEYOND = 0.02;
/** Deepest nesting of gaps found inside gaps. */
const MOST_GAPS = 8;
/** Steps of the search for a dip between scanned places. */
const DIP_STEPS = 30;
const GOLDEN = (Math.sqrt(5) - 1) / 2;

/**
 * Every place in a span at which a function's sign turns: roots between scanned places of different sign, places where its values
 * end, and dips that pass zero and come back between two scanned places.
 *
 * @param places where to scan, ascending
 */
export function crossings(follow: Followed, places: readonly number[]): Crossings {
  const span = places[places.length - 1] - places[0];
  const tolerance = TOLERANCE * span;
  const turns: Turn[] = [];
  const edges: Edge[] = [];
  const sample = (x: number): Sample => {
    const answer = follow(x);
    return typeof answer === "number" ? { x, value: answer } : { x, value: null, reason: answer.reason };
  };
  const scan = places.map(sample);

  for (let i = 1; i < scan.length; i++) between(scan[i - 1], scan[i], 0);
  for (let i = 1; i < scan.length - 1; i++) dip(scan[i - 1], scan[i], scan[i + 1]);
  endDip(scan[0], scan[1]);
  endDip(scan[scan.length - 1], scan[scan.length - 2]);
  return { turns: distinct(turns, tolerance), edges: edges.toSorted((a, b) => a.x - b.x), scan };

  function between(left: Sample, right: Sample, depth: number): void {
    if (left.value !== null && right.value !== null) {
      if (left.value < 0 !== right.value < 0) signChange(left, right, depth);
      return;
    }
    if (left.value === null && right.value === null) return;
    edge(left, right, depth);
  }

  function signChange(left: Sample, right: Sample, depth: number): void {
    let gap: Sample | undefined;
    let x: number;
    try {
      x = bracketedRoot(
        (at) => {
          const found = sample(at);
          if (found.value !== null) return found.value;
          gap = found;
          throw new GapFound();
        },
        left.x,
        right.x,
        { tolerance },
        left.value as number,
        right.value as number,
      );
    } catch (error) {
      if (!(error instanceof GapFound) || gap === undefined) throw error;
      if (depth < MOST_GAPS) {
        between(left, gap, depth + 1);
        between(gap, right, depth + 1);
      }
      return;
    }
    turns.push({ x, metAbove: (right.value as number) < 0, kind: leaps(x, left, right) ? "jump" : "root", reason: null });
  }

  /** Whether the function leaps over zero: it is still a good part of the bracket's height away, however near. */
  function leaps(x: number, left: Sample, right: Sample): boolean {
    const height = Math.abs((right.value as number) - (left.value as number));
    const beside = [Math.max(left.x, x - BESIDE * span), Math.min(right.x, x + BESIDE * span)].map((at) => sample(at).value);
    return beside.every((value) => value !== null && Math.abs(value) > 0.01 * height);
  }

  /** Between a place with a value and one without: halved to where the values end. */
  function edge(left: Sample, right: Sample, depth: number): void {
    const first = left.value === null ? right : left;
    let inside = first;
    let outside = left.value === null ? left : right;
    while (Math.abs(outside.x - inside.x) > tolerance) {
      const middle = sample((inside.x + outside.x) / 2);
      if (middle.value === null) outside = middle;
      else inside = middle;
    }
    if (first.value !== null && inside.value !== null && first.value < 0 !== inside.value < 0 && first.x !== inside.x) {
      if (first.x < inside.x) signChange(first, inside, depth + 1);
      else signChange(inside, first, depth + 1);
    }
    const valuesAbove = first === right;
    const reason = reasonBeyond(inside.x, outside, left.value === null ? left : right);
    if (inside.value !== null && inside.value < 0) turns.push({ x: inside.x, metAbove: valuesAbove, kind: "edge", reason });
    else edges.push({ x: inside.x, valuesAbove, reason });
  }

  /** At the edge itself round-off decides which of several reasons comes first; a little beyond it, the machine does. */
  function reasonBeyond(x: number, outside: Sample, scanned: Sample): string {
    for (const beyond of [sample(x + BEYOND * (scanned.x - x)), outside]) if (beyond.value === null) return beyond.reason;
    return "";
  }

  /** Where a scanned place lies nearer to zero than both neighbours of the same sign, the function may pass zero beside it. */
  function dip(left: Sample, middle: Sample, right: Sample): void {
    if (left.value === null || middle.value === null || right.value === null) return;
    const sign = Math.sign(middle.value);
    if (sign === 0 || Math.sign(left.value) !== sign || Math.sign(right.value) !== sign) return;
    if (sign * middle.value > sign * left.value || sign * middle.value > sign * right.value) return;
    const lowest = least(sign, left.x, right.x);
    if (lowest === null || lowest.value === null || Math.sign(lowest.value) === sign) return;
    signChange(left, lowest, 0);
    signChange(lowest, right, 0);
  }

  /** The same beside an end of the span: there the function has to fall inwards to dip. */
  function endDip(end: Sample, next: Sample): void {
    const beside = sample(end.x + BESIDE * (next.x - end.x));
    if (end.value === null || beside.value === null || Math.abs(beside.value) >= Math.abs(end.value)) return;
    if (end.x < next.x) dip(end, beside, next);
    else dip(next, beside, end);
  }

  /** The place between two nearest to zero or past it, by golden section; null where it meets a gap. */
  function least(sign: number, from: number, to: number): Sample | null {
    let [a, b] = [from, to];
    let [left, right] = [sample(b - GOLDEN * (b - a)), sample(a + GOLDEN * (b - a))];
    for (let step = 0; step < DIP_STEPS; step++) {
      if (left.value === null || right.value === null) return null;
      if (Math.sign(left.value) !== sign) return left;
      if (Math.sign(right.value) !== sign) return right;
      if (sign * left.value < sign * right.value) {
        b = right.x;
        right = left;
        left = sample(b - GOLDEN * (b - a));
      } else {
        a = left.x;
        left = right;
        right = sample(a + GOLDEN * (b - a));
      }
    }
    return left;
  }
}

class GapFound extends Error {}

function distinct(turns: readonly Turn[], tolerance: number): Turn[] {
  return turns.toSorted((a, b) => a.x - b.x).filter(({ x, metAbove }, i, all) => i === 0 || x - all[i - 1].x > 10 * tolerance || metAbove !== all[i - 1].metAbove);
}
