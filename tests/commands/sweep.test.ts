import { mkdtempSync, readFileSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { fileURLToPath } from "node:url";
import { afterAll, describe, expect, it } from "vitest";
import { breakeven } from "../../src/commands/breakeven.js";
import type { Command, Input } from "../../src/commands/command.js";
import { sweep } from "../../src/commands/sweep.js";
import { InputError } from "../../src/cyclefile/errors.js";

const bench = fileURLToPath(new URL("../../cycles/bench-cooler.yaml", import.meta.url));
const folder = mkdtempSync(join(tmpdir(), "rimeloop-sweep-"));
afterAll(() => rmSync(folder, { recursive: true }));

const WITHOUT_LOAD = ["HX1.effectiveness=0.90", "L1.heat=0 W"];

async function ask(command: Command, options: Input["options"]): Promise<{ status: number; out: string; told: string }> {
  let [out, told] = ["", ""];
  const defaults = Object.fromEntries(command.options.flatMap(({ flag, default: fallback }) => (fallback === undefined ? [] : [[flag.slice(2), fallback]])));
  const status = await command.run(
    { arguments: [bench], options: { ...defaults, ...options } },
    { write: (text) => void (out += text), tell: (text) => void (told += text), clear: () => {}, colour: false },
  );
  return { status, out, told };
}

describe("sweep", () => {
  it("prints table, break-even and chart within 100 columns", async () => {
    const { status, out } = await ask(sweep, { vary: ["T1.efficiency=30%..80%"], set: WITHOUT_LOAD });
    expect(status).toBe(0);
    for (const line of out.split("\n")) expect(line.length).toBeLessThanOrEqual(100);
    expect(out.match(/^ *\d+[* ] +\d+\.\d\d /gm)).toHaveLength(26);
    expect(out).toMatch(/48\.0360\d %/);
    // The mark stands where 48.04 lies between 30 and 80, on 78 columns behind the labels' 12.
    const pointer = out.split("\n").find((line) => line.trimStart().startsWith("^"));
    expect(pointer?.indexOf("^")).toBe(12 + Math.round((18.036 / 50) * 77));
  });

  it("marks the machines that liquefy, from the break-even on", async () => {
    const { out } = await ask(sweep, { vary: ["T1.efficiency=46%..50%"], steps: "5", set: WITHOUT_LOAD, show: "liquid.fraction" });
    const marked = [...out.matchAll(/^ +(\d+)([* ]) +[\d.]+$/gm)].map(([, value, mark]) => [Number(value), mark]);
    expect(marked).toEqual([[46, " "], [47, " "], [48, " "], [49, "*"], [50, "*"]]);
  });

  it("prints two variables as a map with the break-even of every column", async () => {
    const { out } = await ask(sweep, { vary: ["T1.efficiency=30%..80%", "HX1.effectiveness=85%..97%"], steps: "4" });
    const lines = out.split("\n");
    expect(lines.find((line) => line.includes("46.6667"))).toMatch(/46\.6667 +[\d.]+ +[\d.]+ +[\d.]+\* +[\d.]+\*/);
    const found = lines.find((line) => line.includes('"liquefies" '))?.match(/[\d.]+|-/g);
    expect(found).toHaveLength(4);
    const { out: alone } = await ask(breakeven, { vary: "T1.efficiency=30%..80%", set: ["HX1.effectiveness=85%"], json: true });
    expect(Number(found?.[0])).toBeCloseTo((JSON.parse(alone) as { turns: { inUnit: number }[] }).turns[0].inUnit, 1);
  });

  it("breaks a map that is too wide into several tables", async () => {
    const { out } = await ask(sweep, { vary: ["T1.efficiency=0.4,0.5", "HX1.effectiveness=80%..97%"], steps: "20" });
    for (const line of out.split("\n")) expect(line.length).toBeLessThanOrEqual(100);
    expect(out.match(/^T1\.efficiency /gm)?.length).toBeGreaterThan(1);
  });

  it("writes CSV with all digits and a status in every row", async () => {
    const { out } = await ask(sweep, { vary: ["L1.heat=20,5000 W"], format: "csv", show: "capacity,T1.outlet-temperature" });
    const [heading, first, second] = out.split("\n");
    expect(heading).toBe("L1.heat (W),capacity (W),T1.outlet-temperature (K),status,liquefies,reason");
    expect(first).toMatch(/^20,20,82\.\d{5,},solved,yes,$/);
    expect(second).toMatch(/^5000,,,no steady state,,"?L1/);
  });

  it("writes JSON in SI units, with the break-even", async () => {
    const { out } = await ask(sweep, { vary: ["T1.efficiency=30%..80%"], steps: "3", format: "json", set: WITHOUT_LOAD });
    const found = JSON.parse(out) as { rows: { values: object; results: Record<string, number> }[]; breakEvens: { turns: { at: number }[] }[] };
    expect(found.rows.map(({ values }) => values)).toEqual([0.3, 0.55, 0.8].map((value) => ({ "T1.efficiency": value })));
    expect(found.breakEvens[0].turns[0].at).toBeCloseTo(0.48036, 5);
    expect(found.rows[0].results["liquid.fraction"]).toBe(0);
  });

  it("has status 1 where no machine of it has a steady state", async () => {
    expect((await ask(sweep, { vary: ["L1.heat=2000,5000 W"] })).status).toBe(1);
  });

  it("replaces no file unless forced, and says so before computing", async () => {
    const path = join(folder, "kept.csv");
    writeFileSync(path, "precious");
    const options = { vary: ["T1.efficiency=0.4,0.5"], format: "csv", out: path };
    await expect(ask(sweep, options)).rejects.toThrow(InputError);
    expect(readFileSync(path, "utf8")).toBe("precious");
    const { status, out } = await ask(sweep, { ...options, force: true });
    expect([status, out]).toEqual([0, ""]);
    expect(readFileSync(path, "utf8").split("\n")).toHaveLength(4);
  });

  it.each([
    { vary: undefined },
    { vary: ["T1.efficiency"] },
    { vary: ["a=1,2", "b=1,2", "c=1,2"] },
    { vary: ["T1.efficiency=0.4,0.5"], steps: "1" },
    { vary: ["T1.efficiency=0.4..0.5"], steps: "100001" },
    { vary: ["T1.efficiency=0.4..0.5", "L1.heat=0..1 W"], steps: "400" },
    { vary: ["T1.efficiency=0.4,0.5"], show: "coldness" },
    { vary: ["T1.efficiency=0.4,0.5"], out: folder },
  ])("refuses %j", async (options) => {
    await expect(ask(sweep, options)).rejects.toThrow(InputError);
  });
});

describe("breakeven", () => {
  it("answers the efficiency at which the bench cooler begins to liquefy", async () => {
    const { status, out } = await ask(breakeven, { vary: "T1.efficiency=10%..100%", set: WITHOUT_LOAD });
    expect(status).toBe(0);
    expect(out).toMatch(/T1\.efficiency = 48\.0360\d %/);
    for (const line of out.split("\n")) expect(line.length).toBeLessThanOrEqual(100);
  });

  it("has status 1 where nothing in the range has a steady state", async () => {
    const { status, out } = await ask(breakeven, { vary: "L1.heat=1..2 kW" });
    expect(status).toBe(1);
    expect(out).toContain("L1");
  });

  it("wants a number to move", async () => {
    await expect(ask(breakeven, {})).rejects.toThrow(InputError);
  });
});
