import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { dryAir } from "../../src/fluids/data/air-mixture.js";
import { mixture } from "../../src/fluids/mixture.js";
import { boiloff, OXYGEN_MARKS } from "../../src/studies/boiloff.js";

const ATMOSPHERE = 101325;
/** Source of the figures: integrated with the reference property library's mixture of nitrogen, argon and oxygen. */
const REMAINING = [
  { left: 0.9, oxygen: 0.2256, temperature: 79.06 },
  { left: 0.75, oxygen: 0.2559 },
  { left: 0.5, oxygen: 0.3364, temperature: 80.014 },
  { left: 0.25, oxygen: 0.5201, temperature: 81.85 },
  { left: 0.1, oxygen: 0.8125, temperature: 86.049 },
];

describe("liquid air that evaporates", () => {
  const answer = boiloff(dryAir, ATMOSPHERE, 20);

  it.each(REMAINING)("in an open vessel holds $oxygen oxygen when $left is left", ({ left, oxygen, temperature }) => {
    const point = answer.open.find(({ evaporated }) => Math.abs(evaporated - (1 - left)) < 1e-9);
    expect(Math.abs((point?.liquid.oxygen ?? NaN) - oxygen)).toBeLessThan(0.003);
    if (temperature !== undefined) expect(Math.abs((point?.temperature ?? NaN) - temperature)).toBeLessThan(0.05);
  });

  it("starts as liquid air at its bubble point", () => {
    const bubble = mixture(dryAir).bubblePoint(ATMOSPHERE);
    for (const [first] of [answer.open, answer.closed]) {
      expect(first.temperature).toBeCloseTo(bubble.temperature, 8);
      expect(first.liquid.oxygen).toBeCloseTo(dryAir.oxygen, 10);
    }
  });

  it("ends in a closed vessel at the dew point", () => {
    expect(answer.closed.at(-1)?.temperature).toBeCloseTo(mixture(dryAir).dewPoint(ATMOSPHERE).temperature, 8);
  });

  it("passes the marks where the tables do", () => {
    for (const { oxygen, open, closed } of answer.marks) {
      for (const [at, points] of [[open, answer.open], [closed, answer.closed]] as const) {
        const before = points.filter(({ evaporated }) => evaporated <= (at ?? 1));
        const after = points.filter(({ evaporated }) => evaporated > (at ?? 1));
        for (const { liquid } of before) expect(liquid.oxygen).toBeLessThanOrEqual(oxygen + 1e-9);
        for (const { liquid } of after) expect(liquid.oxygen).toBeGreaterThan(oxygen);
      }
    }
    // The last of the liquid in a closed vessel is the first that condenses: half oxygen, never 90 %.
    expect(answer.marks.map(({ open, closed }) => [open !== null, closed !== null])).toEqual([[true, true], [true, true], [true, false]]);
  });

  it("counts a mark as passed from the start by a liquid that begins above it", () => {
    const rich = boiloff({ nitrogen: 0.38, argon: 0.02, oxygen: 0.6 }, ATMOSPHERE, 2);
    expect(rich.marks.map(({ open }) => open)).toEqual([0, 0, expect.any(Number)]);
    expect(rich.marks.map(({ oxygen }) => oxygen)).toEqual(OXYGEN_MARKS);
  });
});

describe("any mixture of air's gases that evaporates", () => {
  const liquids = fc
    .record({ oxygen: fc.double({ min: 0.05, max: 0.9, noNaN: true }), argon: fc.double({ min: 0, max: 0.05, noNaN: true }), bar: fc.double({ min: 0.8, max: 12, noNaN: true }) })
    .map(({ oxygen, argon, bar }) => ({ start: { nitrogen: 1 - oxygen - argon, argon, oxygen }, pressure: bar * 1e5 }));

  it("keeps its matter in a closed vessel, grows richer in oxygen and warmer, and more so in an open one", () => {
    fc.assert(
      fc.property(liquids, ({ start, pressure }) => {
        const { open, closed } = boiloff(start, pressure, 8);
        for (const { evaporated, liquid } of closed) {
          const { vapour } = mixture(start).flash({ pressure, vapourFraction: evaporated });
          for (const name of ["nitrogen", "argon", "oxygen"] as const) {
            expect((1 - evaporated) * liquid[name] + evaporated * (vapour?.[name] ?? NaN)).toBeCloseTo(start[name], 9);
          }
        }
        for (const points of [open, closed]) {
          for (let i = 1; i < points.length; i++) {
            expect(points[i].liquid.oxygen).toBeGreaterThan(points[i - 1].liquid.oxygen);
            expect(points[i].temperature).toBeGreaterThan(points[i - 1].temperature);
          }
        }
        for (let i = 1; i < open.length - 1; i++) expect(open[i].liquid.oxygen).toBeGreaterThan(closed[i].liquid.oxygen);
      }),
      { numRuns: 25 },
    );
  });
});
