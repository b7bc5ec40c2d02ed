import { array, assert, double, property } from "fast-check";
import { describe, expect, it } from "vitest";
import { crossings } from "../../src/studies/crossings.js";

const scan = (from: number, to: number, steps = 20): number[] => Array.from({ length: steps + 1 }, (_, i) => from + ((to - from) * i) / steps);

describe("crossings", () => {
  it("finds every root, and on which side the condition is met", () => {
    const { turns } = crossings(Math.cos, scan(0, 10));
    expect(turns.map(({ metAbove, kind }) => [metAbove, kind])).toEqual([[true, "root"], [false, "root"], [true, "root"]]);
    turns.forEach(({ x }, i) => expect(x).toBeCloseTo(Math.PI * (i + 0.5), 8));
  });

  it("finds both roots of a dip between two scanned places", () => {
    const { turns } = crossings((x) => (x - 0.503) ** 2 - 1e-6, scan(0, 1, 10));
    expect(turns.map(({ x }) => x)).toEqual([expect.closeTo(0.502, 8), expect.closeTo(0.504, 8)]);
  });

  it("finds both roots of a dip beside an end of the span", () => {
    for (const dip of [0.05, 0.96]) {
      const { turns } = crossings((x) => (x - dip) ** 2 - 1e-6, scan(0, 1, 10));
      expect(turns.map(({ x }) => x)).toEqual([expect.closeTo(dip - 1e-3, 8), expect.closeTo(dip + 1e-3, 8)]);
    }
  });

  it("finds the roots of any polynomial that a fine grid finds", () => {
    assert(
      property(array(double({ min: -3, max: 3, noNaN: true }), { minLength: 1, maxLength: 5 }), (roots) => {
        const follow = (x: number): number => roots.reduce((product, root) => product * (x - root), 1);
        const fine = scan(-2.02, 2.03, 400);
        const changes = fine.filter((x, i) => i > 0 && follow(x) < 0 !== follow(fine[i - 1]) < 0).length;
        const { turns } = crossings(follow, scan(-2.02, 2.03, 60));
        expect(turns.length).toBeGreaterThanOrEqual(changes);
        for (const { x } of turns) expect(Math.min(...roots.map((root) => Math.abs(root - x)))).toBeLessThan(2e-3);
        turns.forEach(({ metAbove }, i) => expect(metAbove).toBe(i % 2 === 0 ? follow(-2.02) >= 0 : follow(-2.02) < 0));
      }),
      { seed: 7 },
    );
  });

  it("finds none where the function stays on one side", () => {
    const found = crossings((x) => x * x + 1, scan(-1, 1));
    expect(found.turns).toEqual([]);
    expect(found.edges).toEqual([]);
  });

  it("tells a leap over zero from a root", () => {
    const [turn] = crossings((x) => (x < 0.3 ? 1 + x : -2), scan(0, 1)).turns;
    expect(turn).toMatchObject({ kind: "jump", metAbove: true });
    expect(turn.x).toBeCloseTo(0.3, 8);
  });

  it("finds where values end, and says whether the condition turns there", () => {
    const { turns, edges } = crossings((x) => (x > 0.7123 ? { reason: "beyond" } : 0.2 - x), scan(0, 1));
    expect(turns.map(({ kind, metAbove }) => [kind, metAbove])).toEqual([["root", true], ["edge", false]]);
    expect(turns[1].x).toBeCloseTo(0.7123, 8);
    expect(turns[1].reason).toBe("beyond");
    expect(edges).toEqual([]);
    const unmet = crossings((x) => (x > 0.7123 ? { reason: "beyond" } : 1 + x), scan(0, 1));
    expect(unmet.turns).toEqual([]);
    expect(unmet.edges[0]).toMatchObject({ reason: "beyond", valuesAbove: false });
  });

  it("finds a root between the last scanned value and the end of values", () => {
    const { turns } = crossings((x) => (x > 0.74 ? { reason: "beyond" } : 0.72 - x), scan(0, 1, 10));
    expect(turns.map(({ x, kind }) => [kind, x])).toEqual([["root", expect.closeTo(0.72, 8)], ["edge", expect.closeTo(0.74, 8)]]);
  });

  it("finds a gap inside a bracket", () => {
    const { turns } = crossings((x) => (Math.abs(x - 0.5) < 0.02 ? { reason: "gap" } : 0.5 - x), scan(0, 1, 3));
    expect(turns).toEqual([expect.objectContaining({ kind: "edge", metAbove: true })]);
    expect(turns[0].x).toBeCloseTo(0.52, 8);
  });

  it("answers nothing but the scan where there are no values at all", () => {
    const found = crossings(() => ({ reason: "never" }), scan(0, 1, 4));
    expect([found.turns, found.edges, found.scan.length]).toEqual([[], [], 5]);
  });
});
