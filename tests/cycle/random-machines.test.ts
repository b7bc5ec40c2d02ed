import fc from "fast-check";
import { describe, expect, it } from "vitest";
import type { CycleDefinition } from "../../src/cycle/definition.js";
import { NoSteadyState } from "../../src/cycle/failure.js";
import { planProblems } from "../../src/cycle/plan.js";
import { solve } from "../../src/cycle/solve.js";
import { entry } from "./definitions.js";

const between = (min: number, max: number) => fc.integer({ min: 0, max: 1000 }).map((n) => min + ((max - min) * n) / 1000);
const percent = between(0.1, 1);

const sizes = fc.oneof(
  between(0.2, 1).map((effectiveness) => ({ effectiveness })),
  between(0, 20).map((approach) => ({ approach })),
  between(0.3, 30).map((transferUnits) => ({ transferUnits })),
);
const compression = fc.oneof(
  between(0.25, 1).map((efficiency) => ({ efficiency })),
  between(0.3, 1).map((polytropic) => ({ "polytropic-efficiency": polytropic })),
  percent.map((isothermal) => ({ "isothermal-efficiency": isothermal })),
);
/** J/kg, or K at the outlet. */
const duties = fc.oneof(
  { arbitrary: between(0, 2e4).map((perMass) => ({ perMass })), weight: 3 },
  { arbitrary: between(70, 290).map((temperature) => ({ temperature })), weight: 1 },
);

/** Machines with one or two expanders or a valve, closed or open, of any quality: legal, and not all of them possible. */
const machines = fc
  .record({
    stages: fc.integer({ min: 1, max: 2 }),
    open: fc.boolean(),
    volumeFlow: fc.boolean(),
    throttled: fc.boolean(),
    lowPressure: between(1.15e5, 3e5),
    ratio: between(1.5, 15),
    compression,
    aftercooled: between(0, 25),
    sizes: fc.tuple(sizes, sizes),
    efficiencies: fc.tuple(percent, percent),
    leak: between(0, 0.2),
    duty: duties,
    heatLeak: between(0, 10),
    drop: between(0, 5e3),
    flow: between(1e-3, 3e-2),
  })
  .map((m): CycleDefinition => {
    const highPressure = m.lowPressure * m.ratio;
    const middle = m.stages === 1 ? highPressure : Math.sqrt(m.lowPressure * (highPressure - 2 * m.drop));
    const drop = { "pressure-drop": m.drop };
    const size = (each: typeof m.sizes[number]) =>
      "transferUnits" in each ? { conductance: each.transferUnits * 1005 * m.flow } : each;
    const isothermal = "isothermal-efficiency" in m.compression;
    const duty: Record<string, number> = "perMass" in m.duty ? { heat: m.duty.perMass * m.flow } : { "outlet-temperature": m.duty.temperature };
    const expand = (name: string, pressure: number, efficiency: number) =>
      m.throttled && name === "T2"
        ? entry("valve", name, { "outlet-pressure": pressure })
        : entry("expander", name, { "outlet-pressure": pressure, efficiency, "seal-leak": m.leak });
    return {
      title: "random machine",
      fluid: "air",
      surroundings: { temperature: 293.15, pressure: 101325, relativeHumidity: 0.5 },
      circuit: m.open ? "open" : "closed",
      flow: m.volumeFlow ? { kind: "inlet volume", value: m.flow / 1.2 } : { kind: "mass", value: m.flow },
      loop: [
        entry("compressor", "C1", { "outlet-pressure": highPressure, ...m.compression }),
        entry("aftercooler", "A1", { approach: isothermal ? 0 : m.aftercooled, ...drop }),
        entry("recuperator", "HX1", { ...size(m.sizes[0]), ...drop }, "warm"),
        ...(m.stages === 2
          ? [expand("T1", middle, m.efficiencies[0]), entry("recuperator", "HX2", { ...size(m.sizes[1]), "heat-leak": m.heatLeak }, "warm")]
          : []),
        expand("T2", m.lowPressure, m.efficiencies[1]),
        entry("load", "L1", duty),
        ...(m.stages === 2 ? [entry("recuperator", "HX2", {}, "cold")] : []),
        entry("line", "P1", { "heat-leak": m.heatLeak }),
        entry("recuperator", "HX1", { "pressure-drop": m.drop / 2 }, "cold"),
      ],
      branches: {},
    };
  })
  .filter((definition) => planProblems(definition).length === 0);

describe("a random legal machine", () => {
  it("converges with its accounts closed, or says why it cannot", () => {
    const counts = { solved: 0, refused: 0 };
    fc.assert(
      fc.property(machines, (definition) => {
        try {
          const result = solve(definition, { threshold: false });
          counts.solved++;
          expect(result.audit.energy).toBeLessThan(1e-8);
          expect(result.audit.exergy).toBeLessThan(1e-8);
          expect(result.solver.residual).toBeLessThan(1e-9);
          expect(JSON.stringify(result)).not.toMatch(/NaN/);
          for (const station of result.stations) {
            expect(Number.isFinite(station.temperature + station.enthalpy + station.entropy + station.density)).toBe(true);
          }
          // The second law: nothing makes exergy, and no exchanger works against the temperatures.
          // Between bubble and dew the pseudo-pure equation's straight lines hold dh = T ds to 2 % only (docs/theory.md).
          const wet = result.stations.some(({ phase }) => phase === "two-phase");
          const allowed = 1e-7 * Math.max(result.power.compression, 1);
          const duty = (name: string) => Number(result.blocks.find((block) => block.name === name)?.duty ?? 0);
          const warned = new Set(result.warnings.filter(({ code }) => code === "leak-into-warm-gas").map(({ block }) => block));
          for (const { block, destroyed } of result.exergy) {
            if (!warned.has(block)) expect(destroyed, block).toBeGreaterThan(-allowed - (wet ? 0.06 * duty(block) : 0));
          }
          for (const block of result.blocks) {
            if (typeof block.smallestDifference === "number") expect(block.smallestDifference).toBeGreaterThan(-2e-3);
          }
        } catch (error) {
          if (!(error instanceof NoSteadyState)) throw error;
          counts.refused++;
          expect(error.reason.length).toBeGreaterThan(20);
          expect(error.advice.length).toBeGreaterThan(10);
          expect(error.message).not.toMatch(/NaN|undefined/);
        }
      }),
      { seed: 20260101, numRuns: 400, endOnFailure: true },
    );
    process.stdout.write(`random machines: ${counts.solved} solved, ${counts.refused} refused with a reason\n`);
    expect(counts.solved).toBeGreaterThan(120);
  }, 300_000);
});
