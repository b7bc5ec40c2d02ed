import { readdirSync, readFileSync } from "node:fs";
import { fileURLToPath } from "node:url";
import { describe, expect, it } from "vitest";
import { cautionRecords, cautions } from "../../src/cautions/registry.js";
import type { Caution, SteadyState } from "../../src/cycle/result.js";
import { solve } from "../../src/cycle/solve.js";
import { fluid } from "../../src/fluids/registry.js";
import { benchCooler, singleExpander, type SingleExpander } from "../cycle/definitions.js";

const QUICK = { threshold: false, lookColder: false };

function found(result: SteadyState, code: string): Caution | undefined {
  return cautions(result).find((caution) => caution.code === code);
}

/** A cooler whose load holds the gas at 200 K, nowhere near condensing. */
function mild(changes: Partial<SingleExpander> = {}): SteadyState {
  return solve(
    singleExpander({
      highPressure: 3e5,
      lowPressure: 1.5e5,
      aftercooled: 300,
      recuperator: { effectiveness: 0.8 },
      expander: { efficiency: 0.5 },
      load: { "outlet-temperature": 262 },
      ...changes,
    }),
    QUICK,
  );
}

const liquefying = solve(benchCooler(0.6, 0.9, 0), QUICK);

describe("the register of cautions", () => {
  it("holds every file of the folder", () => {
    const folder = fileURLToPath(new URL("../../src/cautions/", import.meta.url));
    const files = readdirSync(folder).filter((name) => !["registry.ts", "caution.ts"].includes(name));
    const registry = readFileSync(`${folder}registry.ts`, "utf8");
    for (const file of files) expect(registry).toContain(`"./${file.replace(".ts", ".js")}"`);
    expect(files).toHaveLength(cautionRecords.length);
  });

  it("has each code once, in kebab-case, with a title and a trigger", () => {
    const codes = cautionRecords.map(({ code }) => code);
    expect(new Set(codes).size).toBe(codes.length);
    for (const { code, title, trigger } of cautionRecords) {
      expect(code).toMatch(/^[a-z]+(-[a-z]+)*$/);
      expect(title).not.toBe("");
      expect(trigger).not.toBe("");
    }
  });

  it("is the list of docs/safety.md, code and trigger", () => {
    const text = readFileSync(fileURLToPath(new URL("../../docs/safety.md", import.meta.url)), "utf8");
    const rows = [...text.matchAll(/^\| `([a-z-]+)` \| (.+?) \| (.+?) \|$/gm)].map(([, code, title, trigger]) => [code, title, trigger]);
    expect(rows).toEqual(cautionRecords.map(({ code, title, trigger }) => [code, title, trigger]));
  });

  it("ends every list with licensed practice", () => {
    for (const result of [liquefying, mild()]) expect(cautions(result).at(-1)?.code).toBe("licensed-practice");
  });
});

describe("oxygen-enriched condensate", () => {
  it("is named where air condenses in the loop", () => {
    const caution = found(liquefying, "oxygen-enriched-condensate");
    expect(caution?.figures.coldestTemperature).toBeCloseTo(liquefying.coldEnd.temperature, 9);
  });

  it("is named for a helium loop colder than the dew point of the air around it", () => {
    const cold = mild({ fluid: "helium", highPressure: 10e5, expander: { efficiency: 0.9 }, recuperator: { effectiveness: 0.97 }, load: { "outlet-temperature": 60 } });
    expect(cold.coldEnd.temperature).toBeLessThan(70);
    // 81.72 K: dew point of air at 101.325 kPa, Lemmon et al., J. Phys. Chem. Ref. Data 29 (2000) 331.
    expect(found(cold, "oxygen-enriched-condensate")?.figures.airDewPoint).toBeCloseTo(81.72, 1);
  });

  it("is not named above both dew points", () => {
    expect(found(mild(), "oxygen-enriched-condensate")).toBeUndefined();
  });

  it("takes surroundings of any pressure", () => {
    const cold = mild();
    for (const pressure of [1, 1e8]) expect(() => cautions({ ...cold, surroundings: { ...cold.surroundings, pressure } })).not.toThrow();
  });
});

describe("a closed-off section that warms up", () => {
  it("reaches the pressure of its density at the surroundings' temperature", () => {
    const { figures } = found(liquefying, "trapped-fluid") as Caution;
    const densest = Math.max(...liquefying.stations.filter(({ temperature }) => temperature < 275).map(({ density }) => density));
    const warm = fluid("air").at({ temperature: liquefying.surroundings.temperature, density: densest });
    expect(figures.warmedPressure).toBeCloseTo(warm.pressure, 3);
    expect(figures.warmedPressure).toBeGreaterThan(figures.highestPressure);
  });

  it("says where the equation ends for liquid", () => {
    const [station] = liquefying.stations;
    const liquid = { ...liquefying, stations: [{ ...station, temperature: 79, density: 874, phase: "liquid" as const, vapourFraction: 0 }] };
    const { figures } = found(liquid, "trapped-fluid") as Caution;
    expect(figures.warmedPressure).toBe(fluid("air").maximumPressure);
    // Liquid air expands about 730 times: 874 kg/m3 against 1.2 kg/m3.
    expect(figures.expansionRatio).toBeGreaterThan(700);
    expect(figures.expansionRatio).toBeLessThan(750);
  });

  it("is not named for a machine that is nowhere cold", () => {
    expect(found({ ...liquefying, stations: liquefying.stations.filter(({ temperature }) => temperature > 290) }, "trapped-fluid")).toBeUndefined();
  });
});

describe("compressor discharge", () => {
  it("is named with the hottest discharge", () => {
    const { figures } = found(liquefying, "compressor-discharge") as Caution;
    expect(figures.dischargeTemperature).toBe(liquefying.blocks.find(({ name }) => name === "C1")?.dischargeTemperature);
    expect(figures.dischargeTemperature).toBeGreaterThan(figures.oilCokes);
  });

  it("is not named for a cool one", () => {
    const blocks = liquefying.blocks.map((block) => (block.name === "C1" ? { ...block, dischargeTemperature: 330 } : block));
    expect(found({ ...liquefying, blocks }, "compressor-discharge")).toBeUndefined();
  });
});

describe("cold parts", () => {
  it("are named below 253.15 K and not above", () => {
    expect(found(liquefying, "cold")?.figures.coldestTemperature).toBeCloseTo(liquefying.coldEnd.temperature, 9);
    const warm = liquefying.stations.filter(({ temperature }) => temperature > 253.15);
    expect(found({ ...liquefying, stations: warm }, "cold")).toBeUndefined();
  });
});

describe("the working gas", () => {
  it.each(["nitrogen", "argon", "helium", "neon"])("%s asphyxiates", (name) => {
    const figures = found({ ...liquefying, fluid: name }, "asphyxiation")?.figures;
    // 29 CFR 1910.146(b): oxygen-deficient below 19.5 % by volume.
    expect(figures?.deficientLimit).toBe(0.195);
    expect(figures?.shareOfRoom).toBeCloseTo(1 - 0.195 / 0.2096, 9);
  });

  it("air and oxygen do not", () => {
    for (const name of ["air", "oxygen"]) expect(found({ ...liquefying, fluid: name }, "asphyxiation")).toBeUndefined();
  });

  it("oxygen enriches a room", () => {
    // 29 CFR 1910.146(b): enriched above 23.5 % by volume.
    expect(found({ ...liquefying, fluid: "oxygen" }, "oxygen-service")?.figures.enrichedLimit).toBe(0.235);
    expect(found(liquefying, "oxygen-service")).toBeUndefined();
  });
});
