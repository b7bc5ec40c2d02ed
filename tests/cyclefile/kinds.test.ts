import { describe, expect, it, vi } from "vitest";
import type { BlockKind } from "../../src/blocks/kind.js";
import { readCycle } from "../../src/cyclefile/read.js";
import { bench, changed, codesOf } from "./cases.js";

/** A kind with a key of every type, which no other has. */
const everything = vi.hoisted((): Omit<BlockKind, "place"> => ({
  kind: "everything",
  summary: "Has every type of key.",
  keys: [
    { type: "flag", name: "trap", help: "true or false", default: false },
    { type: "block", name: "follows", kind: "expander", help: "an expander" },
    { type: "number", name: "volume", dimension: "volume", range: { lowest: 0, highest: 1e-3, open: "both" }, help: "a volume", required: true },
    { type: "number", name: "first", dimension: "power", range: {}, help: "one of two", alternative: "pair" },
    { type: "number", name: "second", dimension: "conductance", range: {}, help: "one of two", alternative: "pair" },
  ],
  alternatives: [{ name: "pair", optional: true }],
  figures: [],
  check: ([entry]) => (entry?.values["volume"] === 5e-4 ? [{ code: "half-a-litre", entry, key: "volume", found: "half a litre", expected: "another volume" }] : []),
  pressureChange: "falls or stays",
  outletPressure: (_entry, inlet) => inlet,
}));

vi.mock(import("../../src/blocks/registry.js"), async (original) => {
  const registry = await original();
  const kind = everything as BlockKind;
  return { blockKinds: [...registry.blockKinds, kind], blockKind: (name) => (name === kind.kind ? kind : registry.blockKind(name)) };
});

const withKeys = (keys: string): string => changed(bench, ["  - load:", `  - everything: { name: E1, ${keys} }\n  - load:`]);
const valuesOf = (keys: string): unknown => readCycle(withKeys(keys)).loop.find(({ name }) => name === "E1")?.values;

describe("a kind is read by its record alone", () => {
  it("with its defaults, flags and names of blocks", () => {
    expect(valuesOf("volume: 3 mL")).toEqual({ trap: false, volume: 3e-6 });
    expect(valuesOf("volume: 3 mL, trap: true, follows: T1, second: 2 W/K")).toEqual({ trap: true, follows: "T1", volume: 3e-6, second: 2 });
  });

  it.each([
    ["volume: 3 mL, trap: yes", "flag 14:49"],
    ["volume: 3 mL, follows: C1", "no-such-block 14:52"],
    ["trap: true", "missing-key 14:5"],
    ["volume: 1 L", "range 14:37"],
    ["volume: 0 L", "range 14:37"],
    ["volume: 0.5 L", "half-a-litre 14:37"],
    ["volume: 3 mL, first: 1 W, second: 1 W/K", "alternatives 14:5"],
  ])("%s", (keys, expected) => expect(codesOf(withKeys(keys))).toEqual([expected]));
});
