import type { PhaseBoundary, Saturation } from "./saturation.js";

/**
 * Pressures remembered, two to a hash: more than the streams of a cycle and the segments of its exchangers take together.
 * A power of two.
 */
const SLOTS = 1024;
/** Knuth's multiplicative hash, floor(2^32 / golden ratio), spreads pressures that differ in few bits. */
const GOLDEN = 0x9e3779b1;

/** Saturation at recently used pressures: a solver asks for the same few thousands of times. */
export class SaturationCache {
  private readonly slots: (Saturation | undefined)[] = Array.from({ length: SLOTS });
  private readonly pressures = new Float64Array(SLOTS);
  private readonly double = new Float64Array(1);
  private readonly words = new Int32Array(this.double.buffer);

  constructor(private readonly boundary: PhaseBoundary) {}

  /** Saturation at a pressure (Pa) between the boundary's lowest and critical ones. */
  at(pressure: number): Saturation {
    const known = this.known(pressure);
    if (known !== undefined) return known;
    const solved = this.boundary.solve(pressure);
    // The newer of the two of this hash stays.
    const slot = this.slotOf(pressure);
    this.pressures[slot + 1] = this.pressures[slot];
    this.slots[slot + 1] = this.slots[slot];
    this.pressures[slot] = pressure;
    this.slots[slot] = solved;
    return solved;
  }

  /** The same, but only where it is known already. */
  known(pressure: number): Saturation | undefined {
    const slot = this.slotOf(pressure);
    if (this.pressures[slot] === pressure) return this.slots[slot];
    return this.pressures[slot + 1] === pressure ? this.slots[slot + 1] : undefined;
  }

  private slotOf(pressure: number): number {
    this.double[0] = pressure;
    return (Math.imul(this.words[0] ^ this.words[1], GOLDEN) >>> 16) & (SLOTS - 2);
  }
}
