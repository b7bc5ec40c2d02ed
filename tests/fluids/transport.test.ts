import { describe, expect, it } from "vitest";
import { NoCorrelationError } from "../../src/fluids/errors.js";
import { fluid, fluidNames } from "../../src/fluids/registry.js";
import { State } from "../../src/fluids/state.js";
import { expectClose } from "../tolerance.js";
import { referenceRows } from "./table.js";

/** kg/m3 that stands for the limit of zero density. */
const THIN = 1e-9;

// E. W. Lemmon, R. T Jacobsen, Int. J. Thermophys. 25 (2004) 21, verification table: K, mol/dm3, uPa s, mW/(m K). The last
// row of each fluid lies next to its critical point.
const VERIFICATION: Record<string, readonly (readonly [number, number, number, number])[]> = {
  nitrogen: [
    [100, 0, 6.90349, 9.27749],
    [300, 0, 17.8771, 25.9361],
    [100, 25, 79.7418, 103.834],
    [200, 10, 21.081, 36.0099],
    [300, 5, 20.743, 32.7694],
    [126.195, 11.18, 18.2978, 675.8],
  ],
  argon: [
    [100, 0, 8.1894, 6.36587],
    [300, 0, 22.7241, 17.8042],
    [100, 33, 184.232, 111.266],
    [200, 10, 25.5662, 26.1377],
    [300, 5, 26.3706, 23.2302],
    [150.69, 13.4, 27.6101, 856.793],
  ],
  oxygen: [
    [100, 0, 7.70243, 8.94334],
    [300, 0, 20.6307, 26.4403],
    [100, 35, 172.136, 146.044],
    [200, 10, 22.4445, 34.6124],
    [300, 5, 23.7577, 32.5491],
    [154.6, 13.6, 24.7898, 377.476],
  ],
  air: [
    [100, 0, 7.09559, 9.35902],
    [300, 0, 18.523, 26.3529],
    [100, 28, 107.923, 119.221],
    [200, 10, 21.1392, 35.3185],
    [300, 5, 21.3241, 32.6062],
    [132.64, 10.4, 17.7623, 75.6231],
  ],
};

describe("transport properties", () => {
  it.each(Object.entries(VERIFICATION))("%s: has the verification table's values", (name, rows) => {
    const gas = fluid(name);
    for (const [temperature, molar, viscosity, conductivity] of rows) {
      const state = gas.temperatureDensity(temperature, Math.max(molar * 1e3 * gas.molarMass, THIN), new State());
      const where = `${name} at ${temperature} K, ${molar} mol/dm3`;
      expectClose(`${where}, viscosity`, gas.viscosity(state) * 1e6, viscosity, 2e-5);
      expectClose(`${where}, conductivity`, gas.thermalConductivity(state) * 1e3, conductivity, 2e-5);
    }
  });

  it.each(fluidNames.filter((name) => name !== "neon"))("%s: agrees with the table in tests/reference", (name) => {
    const gas = fluid(name);
    let compared = 0;
    for (const row of referenceRows(`${name}-states`)) {
      const state = gas.temperaturePressure(row.temperature_K, row.pressure_Pa, new State());
      const where = `${name} at ${row.temperature_K} K, ${row.pressure_Pa} Pa`;
      expectClose(`${where}, viscosity`, gas.viscosity(state), row.viscosity_Pa_s, 1e-5);
      if (name === "helium" && row.temperature_K < 12) continue;
      compared++;
      expectClose(`${where}, conductivity`, gas.thermalConductivity(state), row.conductivity_W_mK, 1e-5);
    }
    expect(compared).toBeGreaterThan(25);
  });

  it("helium has the printed values of its two correlations", () => {
    const helium = fluid("helium");
    const at = (temperature: number, pressure: number): State => helium.temperaturePressure(temperature, pressure, new State());
    // Arp, McCarty and Friend, NIST Technical Note 1334.
    expectClose("viscosity at 50 K", helium.viscosity(at(50, 0.18e6)), 6.376e-6, 1e-3);
    expectClose("viscosity at 400 K", helium.viscosity(at(400, 0.18e6)), 24.29e-6, 1e-3);
    // Hands and Arp, Cryogenics 21 (1981).
    expectClose("conductivity at 20 K", helium.thermalConductivity(at(20, 0.1e6)), 0.0262, 1e-3);
    expectClose("conductivity at 300 K", helium.thermalConductivity(at(300, 0.1e6)), 0.156, 1e-3);
    expectClose("conductivity at 800 K", helium.thermalConductivity(at(800, 0.1e6)), 0.3085, 1e-3);
  });

  it("air's Prandtl number near ambient is 0.71", () => {
    // Common practice: 0.71.
    const { viscosity, thermalConductivity, isobaricHeatCapacity } = fluid("air").at({ temperature: 300, pressure: 101325 });
    expect(((viscosity ?? NaN) * (isobaricHeatCapacity ?? NaN)) / (thermalConductivity ?? NaN)).toBeCloseTo(0.71, 2);
  });

  it("where there is none, `at` gives null and the methods say why", () => {
    const wet = fluid("air").at({ pressure: 101325, quality: 0.5 });
    expect([wet.viscosity, wet.thermalConductivity]).toEqual([null, null]);
    const state = fluid("air").pressureQuality(101325, 0.5, new State());
    expect(() => fluid("air").viscosity(state)).toThrow(new NoCorrelationError("air", "viscosity", "liquid and vapour each have their own"));
    const neon = fluid("neon").at({ temperature: 300, pressure: 1e5 });
    expect([neon.viscosity, neon.thermalConductivity]).toEqual([null, null]);
    const gas = fluid("neon").temperaturePressure(300, 1e5, new State());
    expect(() => fluid("neon").thermalConductivity(gas)).toThrow("no published correlation is at hand");
    const cold = fluid("helium").at({ temperature: 6, pressure: 1e5 });
    expect(cold.viscosity).toBeGreaterThan(0);
    expect(cold.thermalConductivity).toBeNull();
    const coldState = fluid("helium").temperaturePressure(6, 1e5, new State());
    expect(() => fluid("helium").thermalConductivity(coldState)).toThrow("critical enhancement");
  });

  it("leaves the state it is asked about as it was", () => {
    const air = fluid("air");
    const state = air.temperaturePressure(140, 4e6, new State());
    const before = { ...state };
    air.thermalConductivity(state);
    expect({ ...state }).toEqual(before);
    expect({ ...air.temperaturePressure(140, 4e6, new State()) }).toEqual(before);
  });
});
