import type { BlockDefinition } from "../../src/blocks/definition.js";
import type { CycleDefinition } from "../../src/cycle/definition.js";
import { entry } from "./definitions.js";

/** Fluids with a pressure at which machines run on them, Pa, and whether their liquid may be drawn. */
const FLUIDS = [
  { name: "air", low: 1.2e5, condenses: true },
  { name: "nitrogen", low: 1.3e5, condenses: true },
  { name: "argon", low: 1.4e5, condenses: true },
  { name: "oxygen", low: 1.3e5, condenses: true },
  { name: "neon", low: 1.5e5, condenses: false },
  { name: "helium", low: 2e5, condenses: false },
] as const;

/** A repeatable sequence of numbers between 0 and 1 (Park and Miller's generator). */
export function sequence(seed: number): () => number {
  let state = seed;
  return () => (state = (state * 48_271) % 2_147_483_647) / 2_147_483_647;
}

/**
 * A machine of random make-up and quality: 1 to 3 expanders in series or one beside a throttle, 1 to 5 exchangers, with and
 * without precooler, booster, branch, separator and product, in any of the six fluids. Legal, and not all of them possible.
 */
export function randomMachine(next: () => number): CycleDefinition {
  const between = (low: number, high: number): number => low + (high - low) * next();
  const chance = (probability: number): boolean => next() < probability;
  const whole = (low: number, high: number): number => low + Math.floor(next() * (high - low + 1));
  const { name: fluid, low, condenses } = FLUIDS[whole(0, FLUIDS.length - 1)];
  const liquefier = condenses && chance(0.5);
  const exchangers = liquefier ? whole(1, 4) : whole(1, 3);
  const expanders = liquefier ? 0 : whole(1, exchangers);
  const branched = liquefier && exchangers > 1 && chance(0.7);
  const boosted = (expanders > 1 || branched) && chance(0.5);
  const high = low * (liquefier ? between(15, 100) : between(2.5, 9));
  const aftercooler = (name: string): BlockDefinition => entry("aftercooler", name, { "outlet-temperature": between(296, 308) });
  const size = (): Record<string, number> => (chance(0.8) ? { effectiveness: between(0.8, 0.985) } : { approach: between(1, 8) });
  const efficiency = (): number => between(0.3, 0.85);
  const warm = (i: number): BlockDefinition => entry("recuperator", `HX${i}`, { ...size(), "pressure-drop": between(0, 0.01) * high }, "warm");

  const loop: BlockDefinition[] = [
    entry("compressor", "C1", { "outlet-pressure": high, efficiency: between(0.5, 0.85), stages: liquefier ? 4 : 2, "intercool-to": 303 }),
    aftercooler("A1"),
  ];
  if (boosted) loop.push(entry("compressor", "C2", { efficiency: between(0.5, 0.8) }), aftercooler("A2"));
  const branches: Record<string, BlockDefinition[]> = {};
  const split = branched ? whole(1, exchangers - 1) : 0;
  // Pressures from high to low in equal ratios over the expanders in series.
  let pressure = high;
  for (let i = 1; i <= exchangers; i++) {
    loop.push(warm(i));
    if (i === 1 && liquefier && chance(0.3)) loop.push(entry("precooler", "R1", { "outlet-temperature": between(235, 250), "work-ratio": 1 }));
    if (i === split) {
      loop.push(entry("splitter", "S1", { branch: "turbine", fraction: between(0.3, 0.9) }));
      branches.turbine = [entry("expander", "T1", { "outlet-pressure": low, efficiency: efficiency(), ...(boosted ? { drives: "C2" } : {}) })];
    }
    if (i > exchangers - expanders) {
      const remaining = exchangers - i + 1;
      pressure = remaining === 1 ? low : pressure * (low / pressure) ** (1 / remaining);
      const driving = boosted && i === exchangers - expanders + 1 && !branched;
      loop.push(entry("expander", `T${i}`, { "outlet-pressure": pressure, efficiency: efficiency(), ...(driving ? { drives: "C2" } : {}) }));
    }
  }
  if (liquefier) {
    loop.push(entry("valve", "V1", { "outlet-pressure": low }));
    const drawn = chance(0.6);
    loop.push(entry("separator", "F1", { liquid: drawn ? "product" : "draw" }));
    if (!drawn) branches.draw = [entry("line", "P1", { "heat-leak": between(0, 2) }), entry("product", "D1", {})];
  }
  if (chance(0.6)) loop.push(entry("load", "L1", { heat: between(0, 30) }));
  for (let i = exchangers; i >= 1; i--) {
    if (i === split) loop.push(entry("mixer", "M1", { branch: "turbine" }));
    loop.push(entry("recuperator", `HX${i}`, {}, "cold"));
  }
  return {
    title: "random machine",
    fluid,
    surroundings: { temperature: 293.15, pressure: 101325, relativeHumidity: 0.5 },
    circuit: "closed",
    flow: { kind: "mass", value: 0.01 },
    loop,
    branches,
  };
}
