import type { CycleResult, Station } from "../../src/cycle/result.js";
import { singleExpander } from "../cycle/definitions.js";

type Row = readonly [after: string, temperature: number, bar: number, enthalpy: number, entropy: number, density: number, exergy: number];

/** Made up, to look at the text alone: no machine, and no property of air, is behind these figures. */
const ROWS: readonly Row[] = [
  ["C1", 500, 40, 640.123456, 3.41234, 27.5678, 360.98765],
  ["A1", 305.15, 39.5, 430.5, 2.9, 45.4321, 320.1],
  ["HX1 warm", 120.456, 39.25, 140.75, 1.25, 400.06, 520.2],
  ["T1", 79.9996, 1.2, 99.95, 1.3333, 9.87654, 410],
  ["L1", 81, 1.2, 104.95, 1.39, 9.0009, 404.4],
  ["HX1 cold", 298.004, 1.05, 424.7, 3.8888, 1.2289, 2.5],
];

const stations = ROWS.map(
  ([after, temperature, bar, enthalpy, entropy, density, exergy], i): Station => ({
    station: i + 1,
    after,
    temperature,
    pressure: bar * 1e5,
    enthalpy: enthalpy * 1e3,
    entropy: entropy * 1e3,
    density,
    vapourFraction: bar > 38 ? null : temperature < 90 ? 0.51234 : 1,
    phase: bar > 38 ? (temperature < 130 ? "liquid" : "supercritical") : temperature < 90 ? "two-phase" : "gas",
    liquidOxygen: temperature < 90 ? 0.412 : null,
    vapourOxygen: temperature < 90 ? 0.15 : null,
    massFlow: 0.01,
    exergy: exergy * 1e3,
  }),
);

const profile = Array.from({ length: 11 }, (_, i) => ({
  dutyFraction: i / 10,
  warmTemperature: 305.15 - 18.4694 * i,
  coldTemperature: 298.004 - 21.7004 * i + 0.5 * i * (10 - i),
}));

/** A machine with the blocks of the made-up result. */
export const fixtureDefinition = singleExpander({ highPressure: 40e5, lowPressure: 1.2e5, aftercooled: 305.15, recuperator: { effectiveness: 0.95 }, expander: { efficiency: 0.5 } });

/** A result with a warning, a caution, liquid, a pinch inside, and stations above the critical pressure. */
export const fixture: CycleResult = {
  title: "A made-up machine",
  fluid: "air",
  circuit: "closed",
  converged: true,
  solver: { iterations: 12, residual: 3e-14, otherSteadyStates: true },
  surroundings: { temperature: 293.15, pressure: 101325, relativeHumidity: 0.5 },
  massFlow: 0.01,
  coldEnd: { temperature: 79.9996, station: 4 },
  refrigeration: { capacity: 50, loads: [{ name: "L1", heat: 50, inletTemperature: 79.9996, outletTemperature: 81 }] },
  power: { compression: 11000, drive: 12500, expansion: 408, recovered: 0, net: 12500 },
  performance: { cop: 0.004, carnotCop: 0.38, secondLawEfficiency: 0.0105263 },
  liquid: { where: "T1", massFlow: 0.0048766, fractionOfFlow: 0.48766, oxygenMoleFraction: 0.412 },
  liquefaction: { reached: true, margin: -98765, where: "T1", parameter: "T1.efficiency", required: 0.31415, reason: null, given: 0.5 },
  stations,
  blocks: [
    { name: "C1", kind: "compressor", power: 11000, drivePower: 12500, recoveredPower: 0, pressureRatio: 38.095238, stagePressureRatio: 3.365, dischargeTemperature: 500, stageDischargeTemperatures: [495.5, 499, 500], heatRejected: 8900 },
    { name: "A1", kind: "aftercooler", heatRejected: 2096.23, outletTemperature: 305.15, pressureDrop: 5e4 },
    {
      name: "HX1",
      kind: "recuperator",
      duty: 2897.5,
      effectiveness: 0.95,
      conductance: 188.8888,
      transferUnits: 12.3456,
      smallestDifference: 3.21,
      smallestDifferenceAt: 0.625,
      warmEndDifference: 7.146,
      coldEndDifference: 39.456,
      heatLeak: 0,
      profile,
    },
    { name: "T1", kind: "expander", power: 408, shaftPower: 408, pressureRatio: 32.7083, stagePressureRatio: 32.7083, inletTemperature: 120.456, outletTemperature: 79.9996, outletVapourFraction: 0.51234, isentropicEnthalpyDrop: 81600 },
    { name: "L1", kind: "load", heat: 50, inletTemperature: 79.9996, outletTemperature: 81 },
  ],
  audit: { energy: 1e-13, exergy: 2e-13 },
  exergy: [
    { block: "C1", destroyed: 7000, share: 0.5645 },
    { block: "C1 drive", destroyed: 1500, share: 0.121 },
    { block: "HX1", destroyed: 1234.5, share: 0.0996 },
    { block: "T1", destroyed: 2250, share: 0.1815 },
    { block: "T1 brake", destroyed: 408, share: 0.0329 },
    { block: "L1", destroyed: 0.004, share: 3e-7 },
  ],
  warnings: [{ code: "made-up", block: "T1", message: "the gas arrives as a liquid, for which the efficiency given stands only in this test and nowhere else in the world." }],
  moisture: null,
  cautions: [{ code: "made-up", title: "A hazard", text: "What is made up hurts nobody, but its text has to be long enough to be broken into two lines of the terminal.", figures: { temperature: 79.9996 } }],
};
