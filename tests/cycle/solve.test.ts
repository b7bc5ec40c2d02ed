import { describe, expect, it } from "vitest";
import { NoSteadyState } from "../../src/cycle/failure.js";
import { solve } from "../../src/cycle/solve.js";
import { benchCooler, singleExpander } from "./definitions.js";

const expanderOutlet = (definition: Parameters<typeof solve>[0]) => {
  const station = solve(definition).stations.find(({ after }) => after === "T1");
  if (station === undefined) throw new Error("no station behind T1");
  return station;
};

describe("the bench cooler without load at an effectiveness of 0.90", () => {
  // Source: computed independently, with another solver on the reference property library.
  it("is wet behind the expander at an efficiency of 0.5: 83.13 K, vapour fraction 0.981", () => {
    const { temperature, vapourFraction } = expanderOutlet(benchCooler(0.5, 0.9, 0));
    expect(temperature).toBeCloseTo(83.13, 2);
    expect(vapourFraction).toBeCloseTo(0.981, 3);
  });

  it("stays dry at an efficiency of 0.3: 121.09 K", () => {
    const { temperature, vapourFraction } = expanderOutlet(benchCooler(0.3, 0.9, 0));
    expect(temperature).toBeCloseTo(121.09, 2);
    expect(vapourFraction).toBe(1);
  });

  it("begins to liquefy at an efficiency of 0.4804", () => {
    for (const efficiency of [0.3, 0.5, 0.9]) {
      const { liquefaction } = solve(benchCooler(efficiency, 0.9, 0));
      expect(liquefaction.required).toBeCloseTo(0.4804, 4);
      expect(liquefaction.given).toBe(efficiency);
      expect(liquefaction.reached).toBe(efficiency > 0.4804);
    }
  });

  it("stands at the dew point at its own threshold", () => {
    const { liquefaction } = solve(benchCooler(0.5, 0.9, 0));
    const atThreshold = solve(benchCooler(liquefaction.required as number, 0.9, 0));
    expect(Math.abs(atThreshold.liquefaction.margin as number)).toBeLessThan(0.1);
  });
});

describe("the low-pressure limit", () => {
  // Closed form of the recuperated loop for a constant heat capacity, derived in docs/theory.md.
  const closedForm = (T1: number, pi: number, eta: number, eps: number, load: number, gamma: number): number => {
    const tau = 1 - eta * (1 - pi ** (-(gamma - 1) / gamma));
    return (tau * (T1 * (1 - eps) + eps * load)) / (1 - eps * tau);
  };

  it.each([
    { pi: 3, eta: 0.4, eps: 0.8, load: 0 },
    { pi: 4, eta: 0.5, eps: 0.9, load: 60 },
    { pi: 2, eta: 0.5, eps: 0.95, load: 30 },
    { pi: 8, eta: 0.3, eps: 0.5, load: 0 },
  ])("is met by argon, whose heat capacity is constant: $pi, $eta, $eps, $load K", ({ pi, eta, eps, load }) => {
    const gasConstant = 8.31451 / 0.039948;
    const lowPressure = 1;
    const expected = closedForm(300, pi, eta, eps, load, 5 / 3);
    expect(expected).toBeGreaterThan(100);
    const definition = singleExpander({
      fluid: "argon",
      flow: 0.01,
      highPressure: pi * lowPressure,
      lowPressure,
      aftercooled: 300,
      recuperator: { effectiveness: eps },
      expander: { efficiency: eta },
      load: { heat: 0.01 * 2.5 * gasConstant * load },
    });
    expect(expanderOutlet(definition).temperature / expected).toBeCloseTo(1, 6);
  });
});

describe("a machine without a steady state", () => {
  it("says what it lifts when the load is too large", () => {
    try {
      solve(benchCooler(0.5, 0.9, 5000));
      expect.unreachable();
    } catch (error) {
      expect(error).toBeInstanceOf(NoSteadyState);
      expect(error).toMatchObject({ block: "L1", quantity: "heat" });
      expect((error as NoSteadyState).reason).toMatch(/5000 W.*lifts about \d/);
    }
  });

  it("refuses a load that would have to be cooled", () => {
    const warm = singleExpander({
      highPressure: 4e5,
      lowPressure: 1.1e5,
      aftercooled: 300,
      recuperator: { effectiveness: 0.5 },
      expander: { efficiency: 0.3 },
      load: { "outlet-temperature": 100 },
    });
    expect(() => solve(warm)).toThrowError(NoSteadyState);
  });
});

describe("a neighbour to start from", () => {
  it("changes no digit that counts, whichever way the sweep goes", () => {
    const efficiencies = [0.25, 0.3, 0.4, 0.5, 0.7, 0.5, 0.4, 0.3, 0.25];
    let neighbour: ReturnType<typeof solve> | undefined;
    for (const efficiency of efficiencies) {
      const definition = benchCooler(efficiency, 0.9, 20);
      const alone = solve(definition, { threshold: false });
      neighbour = solve(definition, { threshold: false, ...(neighbour === undefined ? {} : { neighbour }) });
      expect(neighbour.coldEnd.temperature).toBeCloseTo(alone.coldEnd.temperature, 7);
    }
  });

  it("saves passes where the machine gets colder", () => {
    const neighbour = solve(benchCooler(0.4, 0.9, 20), { threshold: false, lookColder: false });
    const alone = solve(benchCooler(0.41, 0.9, 20), { threshold: false, lookColder: false });
    const started = solve(benchCooler(0.41, 0.9, 20), { threshold: false, lookColder: false, neighbour });
    expect(started.solver.iterations).toBeLessThan(alone.solver.iterations);
  });
});

describe("values far from any machine's", () => {
  it.each([
    ["a load of a megawatt", benchCooler(0.5, 0.9, 1e6)],
    ["a nearly vanishing effectiveness", benchCooler(0.5, 1e-6, 20)],
    ["a perfect exchanger and a perfect expander", benchCooler(1, 1, 0)],
  ])("%s is answered with a result or a reason, never a raw error", (_what, definition) => {
    try {
      expect(solve(definition).audit.energy).toBeLessThan(1e-8);
    } catch (error) {
      expect(error).toBeInstanceOf(NoSteadyState);
    }
  });
});
