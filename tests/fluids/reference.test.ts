import { describe, expect, it } from "vitest";
import { HelmholtzEquation } from "../../src/fluids/helmholtz.js";
import { fluid, fluidData, fluidNames } from "../../src/fluids/registry.js";
import { State } from "../../src/fluids/state.js";
import { expectClose } from "../tolerance.js";
import { referenceRows } from "./table.js";

/** Relative, by the tables' own digits. Enthalpy and entropy count as at least 1e5 J/kg and 1e3 J/(kg K). */
const TOLERANCE = 5e-9;
/** K; the tables print ten digits */
const TEMPERATURE_TOLERANCE = 1e-7;
/** Relative, by double precision: near the critical point some digits are lost. */
const EXACT = 2e-12;

describe.each(fluidNames)("%s against the tables in tests/reference", (name) => {
  const gas = fluid(name);
  const states = referenceRows(`${name}-states`);
  const saturations = referenceRows(`${name}-saturation`);

  it("has tables", () => {
    expect(states.length).toBeGreaterThanOrEqual(40);
    expect(saturations.length).toBeGreaterThanOrEqual(5);
  });

  it("gives the states at temperature and pressure", () => {
    const state = new State();
    for (const row of states) {
      gas.temperaturePressure(row.temperature_K, row.pressure_Pa, state);
      const where = `${name} at ${row.temperature_K} K, ${row.pressure_Pa} Pa`;
      expectClose(`${where}, density`, state.density, row.density_kg_m3, TOLERANCE);
      expectClose(`${where}, enthalpy`, state.enthalpy, row.enthalpy_J_kg, TOLERANCE, 1e5);
      expectClose(`${where}, entropy`, state.entropy, row.entropy_J_kgK, TOLERANCE, 1e3);
      expectClose(`${where}, cp`, state.isobaricHeatCapacity, row.cp_J_kgK, TOLERANCE);
      expectClose(`${where}, cv`, state.isochoricHeatCapacity, row.cv_J_kgK, TOLERANCE);
      expectClose(`${where}, speed of sound`, state.speedOfSound, row.speed_of_sound_m_s, TOLERANCE);
    }
  });

  it("gives the temperatures back from pressure with enthalpy and with entropy", () => {
    const state = new State();
    for (const row of states) {
      const { temperature_K: temperature, pressure_Pa: pressure } = row;
      const where = `${name} at ${temperature} K, ${pressure} Pa`;
      // The tables carry 12 digits; what they lose of enthalpy moves temperature by that over cp.
      const slack = 1e-9 + (1e-10 * Math.max(Math.abs(row.enthalpy_J_kg), 1e5)) / row.cp_J_kgK / temperature;
      gas.pressureEnthalpy(pressure, row.enthalpy_J_kg, state);
      expectClose(`${where}, from enthalpy`, state.temperature, temperature, TOLERANCE + slack);
      gas.pressureEntropy(pressure, row.entropy_J_kgK, state);
      expectClose(`${where}, from entropy`, state.temperature, temperature, TOLERANCE + slack);
    }
  });

  it("gives the saturated states", () => {
    for (const row of saturations) {
      const saturation = gas.saturation(row.pressure_Pa);
      const where = `${name} at ${row.pressure_Pa} Pa`;
      expect(Math.abs(saturation.bubbleTemperature - row.bubble_temperature_K), where).toBeLessThan(TEMPERATURE_TOLERANCE);
      expect(Math.abs(saturation.dewTemperature - row.dew_temperature_K), where).toBeLessThan(TEMPERATURE_TOLERANCE);
      expectClose(`${where}, liquid density`, saturation.liquidDensity, row.liquid_density_kg_m3, TOLERANCE);
      expectClose(`${where}, vapour density`, saturation.vapourDensity, row.vapour_density_kg_m3, TOLERANCE);
      expectClose(`${where}, liquid enthalpy`, saturation.liquidEnthalpy, row.liquid_enthalpy_J_kg, TOLERANCE, 1e5);
      expectClose(`${where}, vapour enthalpy`, saturation.vapourEnthalpy, row.vapour_enthalpy_J_kg, TOLERANCE, 1e5);
      expectClose(`${where}, liquid entropy`, saturation.liquidEntropy, row.liquid_entropy_J_kgK, TOLERANCE, 1e3);
      expectClose(`${where}, vapour entropy`, saturation.vapourEntropy, row.vapour_entropy_J_kgK, TOLERANCE, 1e3);
    }
  });
});

describe.each(fluidData.map((data) => [data.name, data] as const))("%s against many-digit arithmetic", (name, data) => {
  it("gives the equation's states to double precision", () => {
    const gas = fluid(name);
    const equation = new HelmholtzEquation(data);
    const state = new State();
    const rows = referenceRows("exact-states", `${name},`);
    expect(rows.length).toBeGreaterThanOrEqual(10);
    for (const row of rows) {
      gas.temperaturePressure(row.temperature_K, row.pressure_Pa, state);
      equation.setTemperature(row.temperature_K);
      equation.setState(state.density);
      const where = `${name} at ${row.temperature_K} K, ${row.pressure_Pa} Pa`;
      expectClose(`${where}, density`, state.density, row.density_kg_m3, EXACT);
      expectClose(`${where}, enthalpy`, equation.enthalpy, row.own_enthalpy_J_kg, EXACT, 1e5);
      expectClose(`${where}, entropy`, equation.entropy, row.own_entropy_J_kgK, EXACT, 1e3);
      expectClose(`${where}, cp`, state.isobaricHeatCapacity, row.cp_J_kgK, 10 * EXACT);
      expectClose(`${where}, cv`, state.isochoricHeatCapacity, row.cv_J_kgK, EXACT);
      expectClose(`${where}, speed of sound`, state.speedOfSound, row.speed_of_sound_m_s, EXACT);
    }
  });
});
