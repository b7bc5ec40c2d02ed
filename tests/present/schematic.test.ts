import { readdirSync, readFileSync } from "node:fs";
import fc from "fast-check";
import { describe, expect, it } from "vitest";
import type { BlockDefinition } from "../../src/blocks/definition.js";
import type { CycleDefinition } from "../../src/cycle/definition.js";
import { linesOf } from "../../src/cycle/lines.js";
import { buildNetwork } from "../../src/cycle/network.js";
import type { Station } from "../../src/cycle/result.js";
import { solve } from "../../src/cycle/solve.js";
import { readCycle } from "../../src/cyclefile/read.js";
import { schematic } from "../../src/present/schematic.js";
import { entry } from "../cycle/definitions.js";

const folder = new URL("../../cycles/", import.meta.url);
const files = readdirSync(folder);

function example(file: string): CycleDefinition {
  return readCycle(readFileSync(new URL(file, folder), "utf8"), { file });
}

/** The stations in their order and with their labels, of any temperature. */
function stationsOf(definition: CycleDefinition): Station[] {
  const { labelled } = buildNetwork(definition);
  const labels = [...(definition.circuit === "open" ? ["intake"] : []), ...labelled.map(({ after }) => after)];
  const first = definition.circuit === "open" ? 0 : 1;
  return labels.map((after, i) => ({ station: i + first, after, temperature: 300 - i }) as Station);
}

/** The numbers of stations in a drawing: in a line, or beside one that goes up or down. */
function numbersIn(text: string): number[] {
  const across = [...text.matchAll(/[─├◄](\d+)[─┤►]/g)];
  const beside = [...text.matchAll(/(?<=^| )(\d+) [\d.]+ K/gm)];
  return [...across, ...beside].map(([, number]) => Number(number)).toSorted((a, b) => a - b);
}

function labelOf({ name, side }: BlockDefinition): string {
  return side === undefined ? name : `${name} ${side}`;
}

/** What each drawing owes its reader; the boxes are whole, and each holds what it should. */
function expectDrawn(definition: CycleDefinition, stations: readonly Station[], text: string): void {
  expect(numbersIn(text), text).toEqual(stations.map(({ station }) => station).toSorted((a, b) => a - b));
  for (const line of text.split("\n")) {
    expect(line.length, line).toBeLessThanOrEqual(100);
    expect(line).toBe(line.trimEnd());
  }
  const entries = linesOf(definition).flatMap((line) => line.entries);
  for (const each of entries) expect(text.match(new RegExp(`[│┤] ${labelOf(each)} `, "g")), text).toHaveLength(1);
  const boxes = entries.length + (stations.some(({ after }) => after === "make-up") ? 1 : 0);
  // The closing line's corner may stand alone where no box is.
  for (const corner of [/┌[─┴▼]{2}/g, /[─┬▲]{2}┘/g]) expect([...text.matchAll(corner)].length, text).toBeGreaterThanOrEqual(boxes);
  expect(text).not.toMatch(/NaN|undefined/);
}

describe("the drawing of the machine", () => {
  it.each(files)("of %s shows every block and every station once, within a terminal's width", (file) => {
    const definition = example(file);
    const { stations } = solve(definition, { threshold: false, composition: false });
    expectDrawn(definition, stations, schematic(definition, { stations }));
  });

  it.each(["bench-cooler", "claude", "workshop-air"])("of %s is as it was looked at and found good", async (name) => {
    const definition = example(`${name}.yaml`);
    const stations = stationsOf(definition);
    await expect(`${schematic(definition, { stations })}\n`).toMatchFileSnapshot(`golden/schematic-${name}.txt`);
  });

  it("has each cold side beneath its warm side", () => {
    for (const file of files) {
      const definition = example(file);
      const rows = schematic(definition, { stations: stationsOf(definition) }).split("\n");
      for (const { name } of definition.loop.filter(({ side }) => side === "warm")) {
        const [warm, cold] = ["warm", "cold"].map((side) => rows.findIndex((row) => row.includes(` ${name} ${side} `)));
        const at = (row: number | undefined, side: string) => rows[row ?? -1]?.indexOf(`${name} ${side}`);
        expect(cold).toBe((warm ?? NaN) + 5);
        expect(at(cold, "cold")).toBe(at(warm, "warm"));
      }
    }
  });

  it("shortens a long name in its middle and keeps its side", () => {
    const definition = example("bench-cooler.yaml");
    const long = { ...definition, loop: definition.loop.map((each) => ({ ...each, name: `${each.name}-in-the-upper-part-of-the-cold-box` })) };
    const text = schematic(long, { stations: stationsOf(long) });
    expect(text).toMatch(/HX1-in-t….{7} cold/);
    for (const line of text.split("\n")) expect(line.length).toBeLessThanOrEqual(100);
    expect(numbersIn(text)).toHaveLength(6);
  });
});

const HIGH = 8e5;
const LOW = 1.2e5;
const passing = fc.constantFrom("line", "load", "aftercooler", "precooler");

/** Shuffled machines of up to some 25 blocks: exchangers in any order, blocks between them, branches within branches, liquid drawn. */
const machines = fc
  .record({
    open: fc.boolean(),
    exchangers: fc.integer({ min: 0, max: 4 }),
    warmKinds: fc.array(passing, { maxLength: 6 }),
    coldKinds: fc.array(passing, { maxLength: 6 }),
    branches: fc.constantFrom(0, 1, 2),
    draw: fc.constantFrom("none", "product", "branch"),
    turned: fc.nat(),
    order: fc.array(fc.nat(), { minLength: 40, maxLength: 40 }),
  })
  .map(({ open, exchangers, warmKinds, coldKinds, branches, draw, turned, order }): CycleDefinition => {
    let drawn = 0;
    const shuffled = (entries: BlockDefinition[]) => entries.map((each) => [order[drawn++ % order.length] ?? 0, each] as const).toSorted(([a], [b]) => a - b).map(([, each]) => each);
    const pass = (kind: string, name: string) => entry(kind, name, kind === "load" ? { heat: 0 } : { "outlet-temperature": 280, "work-ratio": 1, "heat-leak": 0 });
    const names = Array.from({ length: exchangers }, (_, i) => `HX${i + 1}`);
    const warm = shuffled([...names.map((name) => entry("recuperator", name, { effectiveness: 0.5 }, "warm")), ...warmKinds.map((kind, i) => pass(kind, `W${i}`)), ...(branches > 0 ? [entry("splitter", "S1", { branch: "first", fraction: 0.5 })] : [])]);
    const cold = shuffled([...names.map((name) => entry("recuperator", name, {}, "cold")), ...coldKinds.map((kind, i) => pass(kind, `K${i}`)), ...(branches > 0 ? [entry("mixer", "M1", { branch: "first" })] : [])]);
    const separator = draw === "none" ? [] : [entry("separator", "F1", { liquid: draw === "product" ? "product" : "drawn" })];
    const inner = branches > 1 ? [entry("splitter", "S2", { branch: "second", fraction: 0.5 })] : [];
    const innerEnd = branches > 1 ? [entry("mixer", "M2", { branch: "second" })] : [];
    const loop = [entry("compressor", "C1", { "outlet-pressure": HIGH, efficiency: 0.7 }), ...warm, entry("valve", "V1", { "outlet-pressure": LOW }), ...separator, ...cold];
    const start = open ? 0 : turned % loop.length;
    return {
      title: "shuffled machine",
      fluid: "air",
      surroundings: { temperature: 293.15, pressure: 101325, relativeHumidity: 0.5 },
      circuit: open ? "open" : "closed",
      flow: { kind: "mass", value: 0.01 },
      loop: [...loop.slice(start), ...loop.slice(0, start)],
      branches: {
        ...(branches > 0 ? { first: [...inner, entry("expander", "T1", { "outlet-pressure": LOW, efficiency: 0.7 }), ...innerEnd] } : {}),
        ...(branches > 1 ? { second: [pass("line", "P2"), entry("expander", "T2", { "outlet-pressure": LOW, efficiency: 0.7 })] } : {}),
        ...(draw === "branch" ? { drawn: [pass("line", "P3"), entry("product", "D1", {})] } : {}),
      },
    };
  });

describe("the drawing of any machine", () => {
  it("shows every block and every station once, within a terminal's width", () => {
    fc.assert(
      fc.property(machines, (definition) => {
        const stations = stationsOf(definition);
        expectDrawn(definition, stations, schematic(definition, { stations }));
      }),
      { numRuns: 500, seed: 3 },
    );
  });
});
