import { readdirSync, readFileSync } from "node:fs";
import { describe, expect, it } from "vitest";
import { cautions } from "../../src/cautions/registry.js";
import { moisture } from "../../src/cycle/moisture.js";
import type { Moisture } from "../../src/cycle/moisture-result.js";
import type { SteadyState } from "../../src/cycle/result.js";
import { solve } from "../../src/cycle/solve.js";
import { readCycle } from "../../src/cyclefile/read.js";
import { moistureText } from "../../src/present/moisture.js";

const folder = new URL("../../cycles/", import.meta.url);
const QUICK = { threshold: false, lookColder: false };
/** kg/mol: water (IAPWS-95), carbon dioxide (Span and Wagner 1996), air (Lemmon et al. 2000). */
const [WATER, CARBON_DIOXIDE, AIR] = [0.018015268, 0.0440098, 0.0289586];

function found(file: string, changes: readonly (readonly [string, string])[] = []): { state: SteadyState; found: Moisture } {
  let text = readFileSync(new URL(file, folder), "utf8");
  for (const [from, to] of changes) {
    expect(text).toContain(from);
    text = text.replace(from, to);
  }
  const definition = readCycle(text, { file });
  const state = solve(definition, QUICK);
  return { state, found: moisture(definition, state) as Moisture };
}

/** kg of water and of carbon dioxide that leave the gas, of each kg of fresh air. */
function collected({ removals, deposits }: Moisture): { water: number; carbonDioxide: number } {
  const sum = (amounts: readonly { readonly perFreshAir: number }[]): number => amounts.reduce((total, { perFreshAir }) => total + perFreshAir, 0);
  return {
    water: sum(removals) + sum(deposits.filter(({ substance }) => substance === "water")),
    carbonDioxide: sum(deposits.filter(({ substance }) => substance === "carbonDioxide")),
  };
}

const workshop = found("workshop-air.yaml");

describe("an open circuit's moisture", () => {
  const { removals, deposits, fresh, left, stations } = workshop.found;

  it("comes with the intake at the surroundings' humidity", () => {
    // 2339.3 Pa: water at 20 degC, steam tables; 60 % of it at 1 atm.
    const vapour = 0.6 * 2339.3;
    expect(fresh.water / (vapour / (101325 - vapour))).toBeCloseTo(1, 3);
    expect(fresh.carbonDioxide).toBe(420e-6);
    expect(workshop.found).toMatchObject({ source: "intake", freshAir: workshop.state.massFlow });
  });

  it("condenses in the aftercooler down to saturation there", () => {
    // 4759.6 Pa: water at 32 degC, steam tables.
    const vapour = 4759.6;
    const kept = vapour / (781325 - vapour);
    expect((left as { water: number }).water / kept).toBeCloseTo(1, 3);
    expect(left?.pressureDewPoint).toBeCloseTo(305.15, 6);
    expect(left?.waterClass).toBeNull();
    expect(removals).toHaveLength(1);
    expect(removals[0].rate as number).toBeCloseTo((workshop.state.massFlow * (fresh.water - kept) * WATER) / AIR, 7);
  });

  it("leaves as ice in the recuperator, from 0 degC on, and the carbon dioxide in the expander", () => {
    expect(deposits.map(({ after, substance }) => [after, substance])).toEqual([["HX1 warm", "water"], ["T1", "carbonDioxide"]]);
    const [ice, frost] = deposits;
    expect(ice.begins.temperature).toBeCloseTo(273.16, 4);
    expect(ice.ends.temperature).toBeLessThan(ice.begins.temperature);
    expect(ice.arrivesLiquid as number).toBeLessThan(ice.rate as number);
    expect(frost.begins.dutyFraction).toBeNull();
  });

  it("is accounted for: what comes in leaves in traps, as frost, or with the exhaust", () => {
    const out = collected(workshop.found);
    const exhaust = stations.at(-1) as (typeof stations)[number];
    // Deposits under a millionth are left out.
    expect(out.water / (((fresh.water - exhaust.water) * WATER) / AIR)).toBeCloseTo(1, 5);
    expect(out.carbonDioxide).toBeCloseTo(((fresh.carbonDioxide - exhaust.carbonDioxide) * CARBON_DIOXIDE) / AIR, 12);
  });

  it("freezes nowhere below its dew and frost points as they stand behind each block", () => {
    for (const { after, dewPoint, frostPoint } of stations) {
      const { temperature } = workshop.state.stations.find((station) => station.after === after) as { temperature: number };
      if (temperature < 273.15) expect(dewPoint as number).toBeLessThan(temperature + 1e-6);
      expect(frostPoint as number).toBeLessThan(temperature + 1e-6);
    }
  });

  it("is dried by a class of ISO 8573-1 or by the dew point that it stands for", () => {
    const byClass = found("workshop-air.yaml", [["approach: 12 K, pressure-drop: 0.2 bar", "approach: 12 K, pressure-drop: 0.2 bar, dryer-class: 2"]]).found;
    const byDewPoint = found("workshop-air.yaml", [["approach: 12 K, pressure-drop: 0.2 bar", "approach: 12 K, pressure-drop: 0.2 bar, dryer: -40 degC"]]).found;
    expect(byClass.left).toMatchObject({ waterClass: 2 });
    expect(byDewPoint).toEqual(byClass);
    expect(byClass.removals.map(({ by }) => by)).toEqual(["trap", "dryer"]);
    expect(byClass.deposits.find(({ substance }) => substance === "water")?.begins.temperature).toBeLessThan(233.15);
  });

  it("travels on where the aftercooler has no trap", () => {
    const without = found("workshop-air.yaml", [["approach: 12 K, pressure-drop: 0.2 bar", "approach: 12 K, pressure-drop: 0.2 bar, trap: false"]]).found;
    expect(without.removals).toEqual([]);
    expect(without.left).toBeNull();
    expect(collected(without).water).toBeCloseTo(collected(workshop.found).water, 12);
  });

  it("follows the surroundings' carbon dioxide", () => {
    const none = found("workshop-air.yaml", [["relative-humidity: 60 %", "relative-humidity: 0, carbon-dioxide: 0"]]);
    expect(none.found).toMatchObject({ removals: [], deposits: [], fillings: [] });
    expect(cautions({ ...none.state, moisture: none.found }).map(({ code }) => code)).not.toContain("frost");
    expect(moistureText(none.found)).toContain("Nothing");
    const more = found("workshop-air.yaml", [["relative-humidity: 60 %", "carbon-dioxide: 800 ppm"]]).found;
    expect(more.fresh.carbonDioxide).toBeCloseTo(800e-6, 15);
  });

  it("condenses in the intercoolers whose pressure is high enough", () => {
    const staged = found("workshop-air.yaml", [["efficiency: 0.55", "efficiency: 0.55, stages: 3, intercool-to: 25 degC"]]).found;
    expect(staged.removals.map(({ at }) => at)).toEqual(["C1 intercooler 2", "A1"]);
    // 3169.7 Pa: water at 25 degC, ASHRAE. The first stage's 2.03 bar keeps 15.7e-3, more than comes in; the second's 4.0 bar does not.
    expect(staged.removals[0].pressure / 101325).toBeCloseTo((801325 / 101325) ** (2 / 3), 6);
    expect(found("workshop-air.yaml", [["efficiency: 0.55", "efficiency: 0.55, stages: 3, intercool-to: 25 degC, intercooler-traps: false"]]).found.removals.map(({ at }) => at)).toEqual(["A1"]);
  });
});

describe("the time in which a passage fills", () => {
  const changes = (filled: string) => [["heat-leak: 8 W", `heat-leak: 8 W, passage-volume: 0.6 L${filled}`]] as const;
  const filling = found("workshop-air.yaml", changes(""));

  it("is a tenth of its volume over the growth of solid ice", () => {
    const ice = workshop.found.deposits[0].rate as number;
    expect(filling.found.fillings).toHaveLength(1);
    expect(filling.found.fillings[0].time / ((0.1 * 0.6e-3 * 917) / ice)).toBeCloseTo(1, 9);
  });

  it("goes with the share asked for", () => {
    const half = found("workshop-air.yaml", changes(", passage-filled: 50 %")).found;
    expect(half.fillings[0].time).toBeCloseTo(5 * filling.found.fillings[0].time, 6);
  });

  it("stands in the text and in the caution", () => {
    expect(moistureText(filling.found)).toMatch(/0\.600 L in 0\.799 h/);
    const caution = cautions({ ...filling.state, moisture: filling.found }).find(({ code }) => code === "frost");
    expect(caution?.figures.fillingTime).toBe(filling.found.fillings[0].time);
  });
});

describe("a closed circuit", () => {
  it("has amounts but no rates of its first fill", () => {
    const bench = found("bench-cooler.yaml").found;
    expect(bench).toMatchObject({ source: "first fill", freshAir: null, fillings: [] });
    expect(bench.deposits.length).toBeGreaterThan(0);
    for (const { rate, perFreshAir } of [...bench.removals, ...bench.deposits]) {
      expect(rate).toBeNull();
      expect(perFreshAir).toBeGreaterThan(0);
    }
    expect(moistureText(bench)).toContain("no rate");
  });

  it("collects all that its make-up brings, whatever circulates", () => {
    const kapitza = found("kapitza.yaml");
    expect(kapitza.found.source).toBe("make-up");
    const makeUp = kapitza.state.blocks.find(({ kind }) => kind === "make-up")?.makeUpFlow as number;
    expect(kapitza.found.freshAir).toBe(makeUp);
    const { fresh } = kapitza.found;
    const out = collected(kapitza.found);
    // Deposits under a millionth are left out.
    expect(out.water / ((fresh.water * WATER) / AIR)).toBeCloseTo(1, 5);
    expect(out.carbonDioxide / ((fresh.carbonDioxide * CARBON_DIOXIDE) / AIR)).toBeCloseTo(1, 5);
  });
});

describe("every example", () => {
  it.each(readdirSync(folder))("%s has moisture if it works with air, accounted for, in lines that fit a terminal", (file) => {
    const { state, found: result } = found(file);
    if (state.fluid !== "air") {
      expect(result).toBeNull();
      return;
    }
    const out = collected(result);
    expect(out.water).toBeLessThanOrEqual(((result.fresh.water * WATER) / AIR) * (1 + 1e-9));
    expect(out.carbonDioxide).toBeLessThanOrEqual(((result.fresh.carbonDioxide * CARBON_DIOXIDE) / AIR) * (1 + 1e-9));
    expect(result.stations).toHaveLength(state.stations.length);
    for (const line of moistureText(result).split("\n")) expect(line.length).toBeLessThanOrEqual(100);
  });
});
