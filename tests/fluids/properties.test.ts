import { assert, double, pre, property } from "fast-check";
import { describe, expect, it } from "vitest";
import { fluid, fluidNames } from "../../src/fluids/registry.js";
import { State } from "../../src/fluids/state.js";
import { expectClose } from "../tolerance.js";

const SEED = 4711;
const share = double({ min: 0, max: 1, noNaN: true });

/** Between two limits, evenly in the logarithm. */
const logBetween = (low: number, high: number, at: number): number => Math.exp(Math.log(low) + at * Math.log(high / low));

describe.each(fluidNames)("%s", (name) => {
  const gas = fluid(name);
  const pressureAt = (at: number): number => logBetween(gas.lowestSaturationPressure * 1.000001, gas.maximumPressure, at);
  const temperatureAt = (at: number, pressure: number): number => logBetween(gas.lowestTemperature(pressure), gas.maximumTemperature, at);

  it("enthalpy and entropy rise with temperature at constant pressure", () => {
    assert(
      property(share, share, share, (a, b, c) => {
        const pressure = pressureAt(c);
        const [low, high] = [temperatureAt(Math.min(a, b), pressure), temperatureAt(Math.max(a, b), pressure)];
        pre(high > low * (1 + 1e-9));
        const cold = gas.temperaturePressure(low, pressure, new State());
        const warm = gas.temperaturePressure(high, pressure, new State());
        expect(warm.enthalpy).toBeGreaterThan(cold.enthalpy);
        expect(warm.entropy).toBeGreaterThan(cold.entropy);
      }),
      { seed: SEED, numRuns: 1500 },
    );
  });

  it("temperature comes back from enthalpy and from entropy", () => {
    assert(
      property(share, share, (a, b) => {
        const pressure = pressureAt(b);
        const temperature = temperatureAt(a, pressure);
        const state = gas.temperaturePressure(temperature, pressure, new State());
        const { density, enthalpy, entropy } = state;
        pre(state.phase !== "two-phase" || name === "air");
        for (const back of [
          gas.pressureEnthalpy(pressure, enthalpy, new State()),
          gas.pressureEntropy(pressure, entropy, new State()),
          gas.pressureEnthalpy(pressure, enthalpy, state),
        ]) {
          expectClose(`${name} at ${temperature} K, ${pressure} Pa`, back.temperature, temperature, 1e-8);
          expectClose(`${name} at ${temperature} K, ${pressure} Pa, density`, back.density, density, 1e-8);
        }
      }),
      { seed: SEED, numRuns: 1500 },
    );
  });

  it("between bubble and dew, quality is the share of the way in enthalpy, entropy and volume", () => {
    assert(
      property(share, share, (a, quality) => {
        const pressure = logBetween(gas.lowestSaturationPressure, gas.criticalPressure * (1 - 1e-6), a);
        const state = gas.pressureQuality(pressure, quality, new State());
        const saturation = gas.saturation(pressure);
        const part = (liquid: number, vapour: number): number => liquid + quality * (vapour - liquid);
        expect(state.phase).toBe("two-phase");
        expect(state.isobaricHeatCapacity).toBeNaN();
        expectClose("enthalpy", state.enthalpy, part(saturation.liquidEnthalpy, saturation.vapourEnthalpy), 1e-12, 1e5);
        expectClose("entropy", state.entropy, part(saturation.liquidEntropy, saturation.vapourEntropy), 1e-12, 1e3);
        expectClose("volume", 1 / state.density, part(1 / saturation.liquidDensity, 1 / saturation.vapourDensity), 1e-12);
        expectClose("temperature", state.temperature, part(saturation.bubbleTemperature, saturation.dewTemperature), 1e-12);
      }),
      { seed: SEED, numRuns: 600 },
    );
  });

  it("meets the phase boundary from both sides", () => {
    assert(
      property(share, (a) => {
        const pressure = logBetween(gas.lowestSaturationPressure * 1.0001, gas.criticalPressure * 0.999, a);
        const { bubbleTemperature, dewTemperature, liquidDensity, vapourDensity } = gas.saturation(pressure);
        const liquid = gas.at({ temperature: bubbleTemperature * (1 - 1e-9), pressure });
        const vapour = gas.at({ temperature: dewTemperature * (1 + 1e-9), pressure });
        expect([liquid.phase, vapour.phase]).toEqual(["liquid", "gas"]);
        expectClose(`${name} liquid at ${pressure} Pa`, liquid.density, liquidDensity, 1e-5);
        expectClose(`${name} vapour at ${pressure} Pa`, vapour.density, vapourDensity, 1e-5);
        expectClose("bubble pressure", gas.bubblePressure(bubbleTemperature), pressure, 1e-9);
        expectClose("dew pressure", gas.dewPressure(dewTemperature), pressure, 1e-9);
      }),
      { seed: SEED, numRuns: 300 },
    );
  });
});
