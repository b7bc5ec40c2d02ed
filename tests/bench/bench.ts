/**
 * What the program costs: microseconds per property call, milliseconds per solution, and the whole process against a
 * bare node start. Each time is the least of several rounds, the round least disturbed by others on the machine, and is
 * given also as a multiple of a fixed arithmetic loop timed in the same run, so that runs on other machines compare.
 */
import { spawnSync } from "node:child_process";
import { readFileSync } from "node:fs";
import { fluid, readCycle } from "../../src/index.js";
import { solve } from "../../src/cycle/solve.js";
import { fluidNames } from "../../src/fluids/registry.js";
import type { Fluid } from "../../src/fluids/fluid.js";
import { State } from "../../src/fluids/state.js";
import { dryAir } from "../../src/fluids/data/air-mixture.js";
import { mixture } from "../../src/fluids/mixture.js";

const ROUNDS = 15;
const STATES = 400;

/** Least time of a call, in microseconds, over rounds that each make `calls` of them. */
function microseconds(calls: number, round: () => void): number {
  round();
  let least = Infinity;
  for (let i = 0; i < ROUNDS; i++) {
    const start = performance.now();
    round();
    least = Math.min(least, performance.now() - start);
  }
  return (least / calls) * 1e3;
}

/** A million dependent multiplications and additions: the yardstick. */
function yardstick(): number {
  let x = 0.5;
  for (let i = 0; i < 1e6; i++) x = x * 0.999999 + 1e-7;
  return x;
}

/** A repeatable sequence of numbers between 0 and 1 (Park and Miller's generator). */
function sequence(): () => number {
  let seed = 20_260_101;
  return () => (seed = (seed * 48_271) % 2_147_483_647) / 2_147_483_647;
}

/** States spread evenly in the logarithms of temperature and pressure over the range in which coolers work. */
function spread(gas: Fluid): State[] {
  const next = sequence();
  const lowest = gas.minimumTemperature * 1.02;
  const highest = Math.min(500, gas.maximumTemperature);
  const states: State[] = [];
  while (states.length < STATES) {
    const temperature = lowest * (highest / lowest) ** next();
    const pressure = 2e4 * (2e7 / 2e4) ** next();
    try {
      const state = gas.temperaturePressure(temperature, pressure, new State());
      if (state.phase !== "two-phase") states.push(state);
    } catch {
      // Solid there: not a state to time.
    }
  }
  return states;
}

const print = (line: string): void => void process.stdout.write(`${line}\n`);
const unit = microseconds(1, yardstick);
print(`node ${process.version}; the yardstick, 1e6 multiply-adds, takes ${(unit / 1e3).toFixed(2)} ms; a ratio of 1 is a thousandth of it`);
print("");

const figure = (time: number): string => `${time.toFixed(2).padStart(7)} (${((time / unit) * 1e3).toFixed(2).padStart(6)})`;

print("Property calls, us (ratio); cold start, then from the neighbouring state");
print("                  T,p              p,h              p,s              p,x              T,rho          p,h next to it");
for (const name of fluidNames) {
  const gas = fluid(name);
  const states = spread(gas);
  const scratch = new State();
  const time = (call: (state: State, into: State) => void): number =>
    microseconds(states.length, () => {
      for (const state of states) {
        scratch.temperature = NaN;
        scratch.density = NaN;
        call(state, scratch);
      }
    });
  const wet = states.filter(({ pressure }) => pressure < gas.criticalPressure && pressure > gas.lowestSaturationPressure);
  const figures = [
    time((s, into) => gas.temperaturePressure(s.temperature, s.pressure, into)),
    time((s, into) => gas.pressureEnthalpy(s.pressure, s.enthalpy, into)),
    time((s, into) => gas.pressureEntropy(s.pressure, s.entropy, into)),
    microseconds(wet.length, () => {
      for (const { pressure } of wet) gas.pressureQuality(pressure, 0.5, scratch);
    }),
    time((s, into) => gas.temperatureDensity(s.temperature, s.density, into)),
    microseconds(states.length, () => {
      for (const s of states) {
        Object.assign(scratch, s);
        gas.pressureEnthalpy(s.pressure, s.enthalpy * 1.001, scratch);
      }
    }),
  ];
  print(`${name.padEnd(9)} ${figures.map(figure).join(" ")}`);
}

print("");
print("Mixture flash of air, us (ratio); pressures from 0.5 to 30 bar in no order");
print("                  p,x              bubble point");
{
  const next = sequence();
  const wet = mixture(dryAir);
  const cases = Array.from({ length: STATES }, () => ({ pressure: 5e4 * (3e6 / 5e4) ** next(), vapourFraction: next() }));
  const figures = [
    microseconds(cases.length, () => cases.forEach((each) => wet.flash(each))),
    microseconds(cases.length, () => cases.forEach(({ pressure }) => wet.bubblePoint(pressure))),
  ];
  print(`air       ${figures.map(figure).join(" ")}`);
}

print("");
print("Solutions, ms (ratio)");
for (const file of ["bench-cooler", "two-expanders", "workshop-air", "nitrogen-loop", "helium-loop"]) {
  const definition = readCycle(readFileSync(`cycles/${file}.yaml`, "utf8"));
  const alone = microseconds(20, () => {
    for (let i = 0; i < 20; i++) solve(definition, { threshold: false });
  });
  const whole = microseconds(3, () => {
    for (let i = 0; i < 3; i++) solve(definition);
  });
  const ms = (time: number): string => `${(time / 1e3).toFixed(3).padStart(8)} (${((time / unit) * 1e3).toFixed(0)})`;
  print(`${file.padEnd(15)} ${ms(alone)}   with the liquefaction threshold ${ms(whole)}`);
}

print("");
const processTime = (args: string[]): number => {
  const times = Array.from({ length: 11 }, () => {
    const start = performance.now();
    spawnSync(process.execPath, args, { stdio: "ignore" });
    return performance.now() - start;
  });
  return times.toSorted((a, b) => a - b)[5] ?? NaN;
};
const bare = processTime(["-e", "0"]);
const run = processTime(["dist/cli.js", "run", "cycles/bench-cooler.yaml"]);
print(`Whole process, median of 11: node -e 0 ${bare.toFixed(0)} ms; rimeloop run ${run.toFixed(0)} ms; ${(run / bare).toFixed(2)} times`);
