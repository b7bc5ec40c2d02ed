import { expect, it } from "vitest";
import { fluid, fluidNames } from "../../src/fluids/registry.js";
import { sweep } from "./sweep.js";

/** States a fluid; RIMELOOP_SWEEP=100000 gives the full sweep, whose counts are printed. */
const COUNT = Number(process.env["RIMELOOP_SWEEP"] ?? 3000);
const SEED = Number(process.env["RIMELOOP_SEED"] ?? 20_260_101);
const MOST_MINUTES = 10;

it.each(fluidNames)(
  "%s: every pair of inputs leads back to the state, all over the range",
  (name) => {
    const { failures, ...counts } = sweep(fluid(name), COUNT, SEED);
    if (process.env["RIMELOOP_SWEEP"] !== undefined) process.stdout.write(`${JSON.stringify({ ...counts, failures: failures.length })}\n`);
    expect(failures.slice(0, 5), `${failures.length} failures`).toEqual([]);
    // A sweep that saw no state proves nothing.
    expect(counts.states).toBeGreaterThan(1.2 * COUNT);
    expect(Math.min(counts.liquid, counts.gas, counts.twoPhase, counts.supercritical)).toBeGreaterThan(0.05 * COUNT);
  },
  MOST_MINUTES * 60e3,
);
