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

  it("names every station where the surrounding air condenses, and no other", () => {
    const [station] = liquefying.stations;
    const at = (after: string, temperature: number) => ({ ...station, after, temperature, phase: "gas" as const, vapourFraction: 1 });
    const text = found({ ...liquefying, fluid: "helium", stations: [at("C1", 300), at("T1", 60), at("L1", 81), at("HX1 cold", 82)] }, "oxygen-enriched-condensate")?.text;
    for (const cold of ["T1", "L1"]) expect(text).toContain(cold);
    expect(text).not.toMatch(/C1|HX1/);
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

  /** A machine's contents as liquid air at 1 atm, as a separator holds it. */
  const holdingLiquid: SteadyState = {
    ...liquefying,
    surroundings: { ...liquefying.surroundings, temperature: 293.15 },
    stations: [{ ...liquefying.stations[0], temperature: 78.9, density: fluid("air").saturation(101325).liquidDensity, phase: "liquid", vapourFraction: 0 }],
  };

  it("says where the equation ends for liquid", () => {
    const { figures } = found(holdingLiquid, "trapped-fluid") as Caution;
    expect(figures.warmedPressure).toBe(fluid("air").maximumPressure);
    // 728: volume of gas from one of liquid air at about 20 degC, as published for liquid-air breathing sets; good to 0.5 %.
    expect(Math.abs(figures.expansionRatio / 728 - 1)).toBeLessThan(0.005);
    expect(figures.liquidExpansionRatio).toBeUndefined();
  });

  it("tells what the liquid of a wet station does where it collects", () => {
    const { figures } = found(liquefying, "trapped-fluid") as Caution;
    expect(figures.liquidExpansionRatio).toBeGreaterThan(10 * figures.expansionRatio);
    expect(figures.liquidWarmedPressure).toBe(fluid("air").maximumPressure);
    const { figures: dry } = found(mild(), "trapped-fluid") as Caution;
    expect(dry.liquidExpansionRatio).toBeUndefined();
  });

  it("is not named for a machine that is nowhere cold", () => {
    expect(found({ ...liquefying, stations: liquefying.stations.filter(({ temperature }) => temperature > 290) }, "trapped-fluid")).toBeUndefined();
  });
});

describe("stored pressure", () => {
  const held = (fluidName: string, pressure: number, warm = liquefying.surroundings): SteadyState => ({
    ...liquefying,
    fluid: fluidName,
    surroundings: warm,
    stations: [{ ...liquefying.stations[0], pressure }],
  });

  it("is what an ideal gas gives off on expanding without loss", () => {
    // p / (k - 1) (1 - (p0 / p)^((k - 1) / k)): helium, k = 5/3, and air, k = 7/5, are close to ideal at 5 bar.
    for (const [name, k] of [["helium", 5 / 3], ["air", 7 / 5]] as const) {
      const { figures } = found(held(name, 5e5), "stored-pressure") as Caution;
      const ideal = (5e5 / (k - 1)) * (1 - (liquefying.surroundings.pressure / 5e5) ** ((k - 1) / k));
      expect(Math.abs(figures.storedEnergyPerVolume / ideal - 1), name).toBeLessThan(0.02);
    }
  });

  it("is named above 0.5 bar over the surroundings, whatever their pressure", () => {
    for (const pressure of [0.6e5, 1.01325e5]) {
      const surroundings = { ...liquefying.surroundings, pressure };
      expect(found(held("air", pressure + 0.49e5, surroundings), "stored-pressure")).toBeUndefined();
      expect(found(held("air", pressure + 0.51e5, surroundings), "stored-pressure")?.figures.gaugePressure).toBeCloseTo(0.51e5, 4);
    }
  });

  it("goes without the energy where the expanded gas leaves the equation", () => {
    const { figures } = found(held("air", 900e5, { ...liquefying.surroundings, pressure: 1 }), "stored-pressure") as Caution;
    expect(figures.highestPressure).toBe(900e5);
    expect(figures.storedEnergyPerVolume).toBeUndefined();
  });
});

describe("compressor discharge", () => {
  it("is named with the hottest discharge", () => {
    const { figures } = found(liquefying, "compressor-discharge") as Caution;
    expect(figures.dischargeTemperature).toBe(liquefying.blocks.find(({ name }) => name === "C1")?.dischargeTemperature);
    expect(figures.dischargeTemperature).toBeGreaterThan(figures.oilCokes);
  });

  it("names the hottest stage of every hot compressor", () => {
    const [compressor] = liquefying.blocks;
    const blocks = [
      { ...compressor, name: "C1", dischargeTemperature: 400, stageDischargeTemperatures: [350, 400, 390] },
      { ...compressor, name: "C2", dischargeTemperature: 450, stageDischargeTemperatures: [450] },
      { ...compressor, name: "C3", dischargeTemperature: 320, stageDischargeTemperatures: [320] },
      { name: "T1", kind: "expander", power: 3 },
    ];
    const { text, figures } = found({ ...liquefying, blocks }, "compressor-discharge") as Caution;
    expect(text).toMatch(/C1 stage 2 at 127 degC, C2 at 177 degC\./);
    expect(text).not.toContain("C3");
    expect(figures.dischargeTemperature).toBe(450);
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
