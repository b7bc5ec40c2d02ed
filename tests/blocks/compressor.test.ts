import { describe, expect, it } from "vitest";
import type { Value } from "../../src/blocks/definition.js";
import { solve } from "../../src/cycle/solve.js";
import { entry, singleExpander } from "../cycle/definitions.js";

/** The compressor of a small air cooler, 1 to 8 bar, with some values of its own. */
function compressor(values: Record<string, Value>): Readonly<Record<string, unknown>> {
  const machine = singleExpander({ highPressure: 8e5, lowPressure: 1e5, aftercooled: 293.15, recuperator: { effectiveness: 0.9 }, expander: { efficiency: 0.5 }, load: { heat: 0 } });
  const loop = machine.loop.map((block) => (block.name === "C1" ? entry("compressor", "C1", { "outlet-pressure": 8e5, ...values }) : block));
  const found = solve({ ...machine, loop }).blocks.find(({ name }) => name === "C1");
  if (found === undefined) throw new Error("no compressor in the result");
  return found;
}

describe("the isentropic efficiency of a whole compressor", () => {
  it("is the stage's own where there is one stage, and lower than that over several", () => {
    expect(compressor({ efficiency: 0.7 }).isentropicEfficiency).toBeCloseTo(0.7, 8);
    const { isentropicEfficiency } = compressor({ efficiency: 0.7, stages: 3 });
    expect(isentropicEfficiency).toBeGreaterThan(0.6);
    expect(isentropicEfficiency).toBeLessThan(0.69);
  });

  it("is not told of a machine cooled on the way, which would do better than 100 %", () => {
    const cooled = compressor({ efficiency: 0.9, stages: 5, "intercool-to": 293.15 });
    const uncooled = compressor({ efficiency: 0.9, stages: 5 });
    expect(Number(cooled.power)).toBeLessThan(Number(uncooled.power) * Number(uncooled.isentropicEfficiency));
    expect(cooled.isentropicEfficiency).toBeUndefined();
    expect(compressor({ "isothermal-efficiency": 0.9 }).isentropicEfficiency).toBeUndefined();
  });
});
