import { describe, expect, it } from "vitest";
import { NoSteadyState } from "../../src/cycle/failure.js";
import { planProblems } from "../../src/cycle/plan.js";
import { solve } from "../../src/cycle/solve.js";
import { randomMachine, sequence } from "./battery.js";

const MACHINES = 320;

describe(`${MACHINES} random machines with branches, boosters and separators in six fluids`, () => {
  it("converge with their accounts closed, or say why they cannot", () => {
    const next = sequence(20_261_201);
    const counts = { solved: 0, refused: 0, unsettled: 0, branched: 0, boosted: 0, liquid: 0 };
    for (let i = 0; i < MACHINES; i++) {
      const definition = randomMachine(next);
      expect(planProblems(definition), `machine ${i}`).toEqual([]);
      try {
        const result = solve(definition, { threshold: false });
        counts.solved++;
        if (Object.keys(definition.branches).length > 0) counts.branched++;
        if (result.power.recovered > 0) counts.boosted++;
        if (result.liquid !== null) counts.liquid++;
        expect(result.solver.residual, `machine ${i}`).toBeLessThan(1e-9);
        expect(result.audit.energy, `machine ${i}`).toBeLessThan(1e-8);
        expect(result.audit.exergy, `machine ${i}`).toBeLessThan(1e-8);
        expect(JSON.stringify(result)).not.toMatch(/NaN/);
        for (const { smallestDifference } of result.blocks) {
          if (typeof smallestDifference === "number") expect(smallestDifference, `machine ${i}`).toBeGreaterThan(-2e-3);
        }
      } catch (error) {
        if (!(error instanceof NoSteadyState)) throw error;
        if (error.quantity === "balance") counts.unsettled++;
        else counts.refused++;
        expect(error.reason.length).toBeGreaterThan(20);
        expect(error.message).not.toMatch(/NaN|undefined/);
      }
    }
    process.stdout.write(`battery: ${JSON.stringify(counts)}\n`);
    expect(counts.solved).toBeGreaterThan(0.5 * MACHINES);
    expect(counts.unsettled).toBe(0);
  }, 120_000);
});
