import { describe, expect, it } from "vitest";
import { SURELY_GAS, SURELY_LIQUID } from "../../src/fluids/density.js";
import { criticalPoint } from "../../src/fluids/fluid-data.js";
import { Flash } from "../../src/fluids/flash.js";
import { HelmholtzEquation } from "../../src/fluids/helmholtz.js";
import { fluid, fluidData } from "../../src/fluids/registry.js";
import { bracketedRoot } from "../../src/fluids/root.js";
import { State } from "../../src/fluids/state.js";
import { expectClose } from "../tolerance.js";
import { sequence } from "./sweep.js";
import { referenceRows } from "./table.js";

const SEED = 815;
/** Densities between which roots of pressure are looked for. */
const GRID = 3000;

const pure = fluidData.filter(({ phases }) => phases.kind === "vapour-pressure").map((data) => [data.name, data] as const);

describe.each(pure)("phases of %s", (name, data) => {
  const gas = fluid(name);
  const equation = new HelmholtzEquation(data);
  const critical = criticalPoint(data);
  const gibbs = (): number => equation.enthalpy - equation.temperature * equation.entropy;

  /** Half the difference of density over its square-root law. */
  const half = (theta: number): number => {
    const { liquidDensity, vapourDensity } = gas.saturation(gas.bubblePressure(critical.temperature * (1 - theta)));
    return (liquidDensity - vapourDensity) / critical.density / Math.sqrt(theta);
  };

  /**
   * The states with this pressure on the branches that pressure rises along from zero density and falls along from high
   * density. What lies between are the equation's loops inside the two-phase region, which describe nothing.
   */
  const rootsOf = (temperature: number, pressure: number): number[] => {
    equation.setTemperature(temperature);
    const miss = (density: number): number => {
      equation.setDensity(density);
      return equation.pressure - pressure;
    };
    const branch = (first: number, last: number): number[] => {
      let before = first;
      for (let i = 1; i <= GRID; i++) {
        const density = first + ((last - first) * i) / GRID;
        if (miss(before) < 0 !== miss(density) < 0) return [bracketedRoot(miss, before, density)];
        if (equation.pressureByDensity < 0) return [];
        before = density;
      }
      return [];
    };
    const thin = 1e-3 * (pressure / (equation.specificGasConstant * temperature));
    return [...branch(thin, critical.density), ...branch(4.5 * critical.density, critical.density)];
  };

  it("the state at temperature and pressure is that of least Gibbs energy of gas and liquid", () => {
    const next = sequence(SEED);
    for (let i = 0; i < 60; i++) {
      const temperature = gas.minimumTemperature + (critical.temperature - gas.minimumTemperature) * next() ** 0.5;
      const saturation = gas.bubblePressure(temperature);
      // As often close to saturation as far from it.
      const pressure = Math.min(saturation * (1 + (2 * next() - 1) * 10 ** (-3 * next())), gas.maximumPressure);
      const state = gas.temperaturePressure(temperature, pressure, new State());
      equation.setTemperature(temperature);
      equation.setState(state.density);
      const own = gibbs();
      const roots = rootsOf(temperature, pressure);
      const nearest = Math.min(...roots.map((root) => Math.abs(root / state.density - 1)));
      expect(nearest, `${name} at ${temperature} K, ${pressure} Pa: ${state.density} kg/m3 is none of ${roots.join(", ")}`).toBeLessThan(1e-7);
      for (const root of roots) {
        equation.setTemperature(temperature);
        equation.setState(root);
        const slack = 1e-9 * equation.specificGasConstant * temperature;
        expect(gibbs(), `${name} at ${temperature} K, ${pressure} Pa: ${state.density} kg/m3, but also ${root}`).toBeGreaterThan(own - slack);
      }
    }
  });

  it("liquid and vapour have one pressure and one chemical potential along the whole vapour-pressure curve", () => {
    for (let i = 0; i <= 40; i++) {
      const temperature = gas.minimumTemperature + (critical.temperature * (1 - 1e-5) - gas.minimumTemperature) * (i / 40);
      const { liquidDensity, vapourDensity, bubbleTemperature, pressure } = gas.saturation(Math.max(gas.bubblePressure(temperature), gas.lowestSaturationPressure));
      equation.setTemperature(bubbleTemperature);
      const at = (density: number): { p: number; g: number } => {
        equation.setState(density);
        return { p: equation.pressure, g: gibbs() };
      };
      const scale = equation.specificGasConstant * bubbleTemperature;
      const [liquid, vapour] = [at(liquidDensity), at(vapourDensity)];
      // Pressures of dense liquid are differences of large terms.
      const roundOff = (5e-14 * liquidDensity * scale) / pressure;
      expectClose(`${name} at ${temperature} K, liquid pressure`, liquid.p, pressure, 1e-12 + roundOff);
      expectClose(`${name} at ${temperature} K, vapour pressure`, vapour.p, pressure, 1e-12 + 1e-14);
      expect(Math.abs(liquid.g - vapour.g) / scale, `${name} at ${temperature} K`).toBeLessThan(2e-13);
    }
  });

  it("Clapeyron's equation holds: dp/dT = (s_v - s_l) / (v_v - v_l)", () => {
    for (const share of [0.05, 0.3, 0.6, 0.9, 0.99]) {
      const temperature = gas.minimumTemperature + (critical.temperature - gas.minimumTemperature) * share;
      const step = 1e-4 * (critical.temperature - temperature);
      const slope = (8 * (gas.bubblePressure(temperature + step) - gas.bubblePressure(temperature - step)) - (gas.bubblePressure(temperature + 2 * step) - gas.bubblePressure(temperature - 2 * step))) / (12 * step);
      const { liquidEntropy, vapourEntropy, liquidDensity, vapourDensity } = gas.saturation(gas.bubblePressure(temperature));
      expectClose(`${name} at ${temperature} K`, (vapourEntropy - liquidEntropy) / (1 / vapourDensity - 1 / liquidDensity), slope, 1e-7);
    }
  });

  it("the critical point is the equation's own: dp/drho and d2p/drho2 vanish there", () => {
    equation.setTemperature(critical.temperature);
    const slope = (share: number): number => {
      equation.setDensity(critical.density * share);
      return equation.pressureByDensity / (equation.specificGasConstant * critical.temperature);
    };
    expect(Math.abs(slope(1))).toBeLessThan(1e-10);
    expect(Math.abs(slope(1 + 1e-3) - slope(1 - 1e-3)) / 2e-3).toBeLessThan(1e-4);
    equation.setDensity(critical.density);
    expectClose("critical pressure", equation.pressure, critical.pressure, 1e-9);
  });

  it("near the critical point agrees with 60-digit arithmetic", () => {
    const rows = referenceRows("near-critical", name);
    expect(rows.length).toBe(8);
    for (const row of rows) {
      const where = `${name} at ${row.temperature_K} K`;
      const pressure = gas.bubblePressure(row.temperature_K);
      const { bubbleTemperature, liquidDensity, vapourDensity } = gas.saturation(pressure);
      expectClose(`${where}, pressure`, pressure, row.pressure_Pa, 1e-10);
      expectClose(`${where}, temperature`, bubbleTemperature, row.temperature_K, 1e-13);
      expectClose(`${where}, liquid density`, liquidDensity, row.liquid_density_kg_m3, 5e-8);
      expectClose(`${where}, vapour density`, vapourDensity, row.vapour_density_kg_m3, 5e-8);
    }
  });

  it("near the critical point the densities meet, smoothly over the change of method", () => {
    // Both densities run as the square root of the distance, the equation being analytic.
    expectClose(`${name}`, half(0.9e-7), half(1.1e-7), 1e-4);
    expectClose(`${name}`, half(1e-9), half(1e-7), 1e-3);
    expectClose(`${name}`, half(1e-7), half(1e-6), 5e-3);
  });
});

describe.each(fluidData.map(({ name }) => name))("%s at its critical point", (name) => {
  const gas = fluid(name);

  it("gives whole states from every pair of inputs, down to a few units of the last digit from it", () => {
    const next = sequence(SEED);
    /** As often 1e-3 from it as 1e-16, on either side, sometimes not at all. */
    const nearly = (value: number): number => (next() < 0.1 ? value : value * (1 + Math.sign(next() - 0.5) * 10 ** (-16 + 13 * next())));
    for (let i = 0; i < 400; i++) {
      const temperature = nearly(gas.criticalTemperature);
      const pressure = nearly(gas.criticalPressure);
      const state = gas.temperaturePressure(temperature, pressure, new State());
      const where = `${name} at ${temperature} K, ${pressure} Pa`;
      const { enthalpy, entropy } = state;
      for (const other of [state, gas.pressureEnthalpy(pressure, enthalpy, new State()), gas.pressureEntropy(pressure, entropy, new State())]) {
        expectClose(where, other.temperature, temperature, 1e-8);
        expectClose(where, other.enthalpy, enthalpy, 1e-4, 1e5);
        if (other.phase === "two-phase") continue;
        expect(other.isobaricHeatCapacity, where).toBeGreaterThan(other.isochoricHeatCapacity);
        expect(other.speedOfSound, where).toBeGreaterThan(0);
      }
    }
  });
});

describe.each(fluidData.map((data) => [data.name, data] as const))("starting values of %s", (name, data) => {
  const { boundary } = new Flash(data);
  const gas = fluid(name);
  const { criticalTemperature, lowestPressure, criticalPressure } = boundary;

  it("are nearer to the saturated densities than the margin that is allowed them", () => {
    for (let i = 0; i <= 400; i++) {
      const pressure = i < 300 ? lowestPressure * (criticalPressure / lowestPressure) ** (i / 300.001) : criticalPressure * (1 - 10 ** (-1 - (i - 300) / 20));
      const { bubbleTemperature, dewTemperature, liquidDensity, vapourDensity } = gas.saturation(pressure);
      expectClose(`${name} at ${pressure} Pa, liquid`, boundary.liquidDensityGuess(bubbleTemperature), liquidDensity, 0.03);
      expectClose(`${name} at ${pressure} Pa, vapour`, boundary.vapourDensityGuess(dewTemperature), vapourDensity, 0.03);
    }
  });

  it("tell gas and liquid by density where the loops inside the two-phase region are out of reach", () => {
    const { equation } = new Flash(data);
    const critical = criticalPoint(data);
    for (let i = 0; i <= 60; i++) {
      equation.setTemperature(data.range.minimumTemperature + ((critical.temperature - data.range.minimumTemperature) * i) / 60);
      const risesAt = (share: number): number => {
        equation.setDensity(share * critical.density);
        return equation.pressureByDensity > 0 ? 1 : 0;
      };
      // From zero density up, and from high density down, pressure may stop rising once and does not rise again.
      for (const [from, to] of [[1e-4, SURELY_GAS], [4, SURELY_LIQUID]] as const) {
        let before = 1;
        for (let j = 0; j <= 400; j++) {
          const rises = risesAt(from + ((to - from) * j) / 400);
          expect(rises, `${name} at ${equation.temperature} K, ${equation.density} kg/m3`).toBeLessThanOrEqual(before);
          before = rises;
        }
      }
    }
  });

  it("of the vapour pressure lie within the tolerance stated in the data file", () => {
    if (data.phases.kind !== "vapour-pressure") return;
    const { pressureGuess, guessTolerance } = data.phases;
    for (let i = 0; i <= 300; i++) {
      const temperature = Math.min(data.range.minimumTemperature * (criticalTemperature / data.range.minimumTemperature) ** (i / 300), criticalTemperature * (1 - 1e-8));
      const sum = pressureGuess.reduce((total, [n, k]) => total + n * (1 - temperature / criticalTemperature) ** k, 0);
      const guess = criticalPressure * Math.exp((criticalTemperature / temperature) * sum);
      expectClose(`${name} at ${temperature} K`, guess, gas.bubblePressure(temperature), 0.9 * guessTolerance);
    }
  });
});
