import { describe, expect, it } from "vitest";
import { HelmholtzEquation } from "../../src/fluids/helmholtz.js";
import type { FluidData } from "../../src/fluids/fluid-data.js";
import { criticalPoint } from "../../src/fluids/fluid-data.js";
import { fluidData } from "../../src/fluids/registry.js";
import { IdealHelmholtz } from "../../src/fluids/ideal.js";
import { ResidualHelmholtz } from "../../src/fluids/residual.js";
import { expectClose } from "../tolerance.js";

/** Reduced temperatures and densities all over the range, liquid, gas and between. */
const TAUS = [0.1, 0.5, 0.9, 1, 1.3, 2];
const DELTAS = [1e-3, 0.1, 0.7, 1, 1.9, 3];
/** Relative steps of a central difference of fourth order; its error is near 1e-12 of the function over the step. */
const STEP = 5e-4;

/** x f'(x) by central differences. */
function slope(f: (x: number) => number, x: number): number {
  const step = STEP * x;
  return ((8 * (f(x + step) - f(x - step)) - (f(x + 2 * step) - f(x - 2 * step))) / (12 * step)) * x;
}

/** x^2 f''(x) by central differences. */
function bend(f: (x: number) => number, x: number): number {
  const step = STEP * x;
  const sum = 16 * (f(x + step) + f(x - step)) - (f(x + 2 * step) + f(x - 2 * step)) - 30 * f(x);
  return (sum / (12 * step * step)) * x * x;
}

describe.each(fluidData.map((data) => [data.name, data] as const))("derivatives of %s", (name, data) => {
  const residual = new ResidualHelmholtz(data.residual);
  const ideal = new IdealHelmholtz(data.ideal);
  const at = (tau: number, delta: number): ResidualHelmholtz => {
    residual.setTau(tau);
    residual.setDeltaFully(delta);
    return residual;
  };
  const idealAt = (tau: number): number => {
    ideal.setTau(tau);
    return ideal.value;
  };
  const value = (tau: number, delta: number): number => at(tau, delta).value;

  it("of the residual part are those of its value", () => {
    for (const tau of TAUS) {
      for (const delta of DELTAS) {
        const where = `${name} at tau ${tau}, delta ${delta}`;
        const scale = 1e-2 * (Math.abs(value(tau, delta)) + delta);
        const { delta1, delta2, tau1, tau2, tau1delta1 } = { ...at(tau, delta) };
        expectClose(`${where}, delta1`, delta1, slope((x) => value(tau, x), delta), 1e-6, scale);
        expectClose(`${where}, tau1`, tau1, slope((x) => value(x, delta), tau), 1e-6, scale);
        expectClose(`${where}, delta2`, delta2, bend((x) => value(tau, x), delta), 1e-5, scale);
        expectClose(`${where}, tau2`, tau2, bend((x) => value(x, delta), tau), 1e-5, scale);
        expectClose(`${where}, mixed`, tau1delta1, slope((x) => at(x, delta).delta1, tau), 1e-6, scale);
      }
    }
  });

  it("are the same in the short and the full evaluation", () => {
    for (const tau of TAUS) {
      for (const delta of DELTAS) {
        const { delta1, delta2 } = { ...at(tau, delta) };
        residual.setDelta(delta);
        expect([residual.delta1, residual.delta2]).toEqual([delta1, delta2]);
      }
    }
  });

  it("of the ideal part are those of its value", () => {
    for (const tau of TAUS) {
      ideal.setTau(tau);
      const { tau1, tau2 } = { ...ideal };
      expectClose(`${name} at tau ${tau}, tau1`, tau1, slope(idealAt, tau), 1e-8, 1);
      expectClose(`${name} at tau ${tau}, tau2`, tau2, bend(idealAt, tau), 1e-6, 1);
    }
  });

  it("at low density give the virial coefficients", () => {
    for (const tau of TAUS) {
      residual.setTau(tau);
      const second = residual.secondVirial();
      const third = residual.thirdVirial();
      const thin = 1e-5;
      residual.setDelta(thin);
      expectClose(`${name} at tau ${tau}, second`, residual.delta1 / thin, second, 1e-3, 0.1);
      expectClose(`${name} at tau ${tau}, third`, (residual.delta1 / thin - second) / thin, third, 1e-2, 1);
    }
  });
});

describe.each(fluidData.map((data) => [data.name, data] as const))("identities of %s", (name, data) => {
  const equation = new HelmholtzEquation(data);
  const places = placesOf(data);
  const at = (temperature: number, density: number): HelmholtzEquation => {
    equation.setTemperature(temperature);
    equation.setState(density);
    return equation;
  };

  it("enthalpy, entropy and pressure hang together: dh = T ds + dp / rho", () => {
    for (const [temperature, density] of places) {
      const where = `${name} at ${temperature} K, ${density} kg/m3`;
      const { pressureByDensity, pressureByTemperature, isochoricHeatCapacity } = { ...at(temperature, density) };
      const byTemperature = (quantity: "enthalpy" | "entropy" | "pressure"): number =>
        slope((t) => at(t, density)[quantity], temperature) / temperature;
      const byDensity = (quantity: "enthalpy" | "entropy" | "pressure"): number =>
        slope((rho) => at(temperature, rho)[quantity], density) / density;
      const gasConstant = equation.specificGasConstant;
      expectClose(`${where}, dp/dT`, byTemperature("pressure"), pressureByTemperature, 1e-6, density * gasConstant);
      expectClose(`${where}, dp/drho`, byDensity("pressure"), pressureByDensity, 1e-6, gasConstant * temperature);
      expectClose(`${where}, T ds/dT = cv`, temperature * byTemperature("entropy"), isochoricHeatCapacity, 1e-6);
      // Maxwell's relation
      expectClose(`${where}, ds/drho`, byDensity("entropy") * density, -pressureByTemperature / density, 1e-6, gasConstant);
      expectClose(`${where}, dh/dT`, byTemperature("enthalpy"), isochoricHeatCapacity + pressureByTemperature / density, 1e-6, gasConstant);
      at(temperature, density);
      expectClose(`${where}, dh/drho`, byDensity("enthalpy"), at(temperature, density).enthalpyByDensity(), 1e-5, (gasConstant * temperature) / density);
      expectClose(`${where}, ds/drho`, byDensity("entropy"), at(temperature, density).entropyByDensity(), 1e-5, gasConstant / density);
    }
  });

  it("the speed of sound is that of an isentropic change of density", () => {
    for (const [temperature, density] of places) {
      const { entropy, isochoricHeatCapacity } = { ...at(temperature, density) };
      const along = (rho: number): number => {
        // Newton's steps in temperature at constant entropy; cv / T is the slope.
        let t = temperature;
        for (let i = 0; i < 8; i++) t += ((entropy - at(t, rho).entropy) * t) / isochoricHeatCapacity;
        return at(t, rho).pressure;
      };
      const squared = slope(along, density) / density;
      expectClose(`${name} at ${temperature} K, ${density} kg/m3`, at(temperature, density).speedOfSound() ** 2, squared, 1e-6);
    }
  });

  it("cp is dh/dT along an isobar, and cp / cv is the ratio of the squares of the two speeds of sound", () => {
    for (const [temperature, density] of places) {
      const where = `${name} at ${temperature} K, ${density} kg/m3`;
      const { pressure } = at(temperature, density);
      const along = (t: number): number => {
        let rho = density;
        for (let i = 0; i < 12; i++) rho += (pressure - at(t, rho).pressure) / at(t, rho).pressureByDensity;
        return at(t, rho).enthalpy;
      };
      const cp = slope(along, temperature) / temperature;
      expectClose(`${where}, cp`, at(temperature, density).isobaricHeatCapacity(), cp, 1e-6);
      const ratio = equation.speedOfSound() ** 2 / equation.pressureByDensity;
      expectClose(`${where}, cp / cv`, equation.isobaricHeatCapacity() / equation.isochoricHeatCapacity, ratio, 1e-12);
    }
  });
});

/** Stable states of liquid, gas and dense fluid: K and kg/m3. */
function placesOf(data: FluidData): (readonly [number, number])[] {
  const { temperature, density } = criticalPoint(data);
  const liquid = 0.999 * densityOfLiquid(data, 0.6 * temperature);
  return [
    [0.6 * temperature, liquid * 1.02],
    [0.6 * temperature, 1e-4 * density],
    [1.1 * temperature, 1.2 * density],
    [1.5 * temperature, 0.3 * density],
    [3 * temperature, 2 * density],
    [5 * temperature, 0.01 * density],
  ];
}

function densityOfLiquid(data: FluidData, temperature: number): number {
  const { guess } = data.phases;
  const x = Math.cbrt(1 - temperature / criticalPoint(data).temperature);
  return criticalPoint(data).density * guess.liquidDensity.reduce((sum, c, i) => sum + c * x ** i, 0);
}
