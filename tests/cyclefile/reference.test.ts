import { readFileSync } from "node:fs";
import { fileURLToPath } from "node:url";
import { describe, expect, it } from "vitest";
import { evaluateExpression } from "../../src/cyclefile/expression.js";
import { readCycle } from "../../src/cyclefile/read.js";
import { isQuantity } from "../../src/cyclefile/values.js";
import { scopeOf } from "./cases.js";
import { generated, withGenerated } from "./reference.js";

const path = fileURLToPath(new URL("../../docs/cycle-file.md", import.meta.url));
const text = readFileSync(path, "utf8");
const yaml = [...text.matchAll(/```yaml\n([^]*?)```/g)].map(([, block]) => block);

describe("the reference of the cycle file", () => {
  it("says of blocks, keys and units what their records say (vitest -u renews it)", async () => {
    for (const name of Object.keys(generated)) expect(text).toContain(`<!-- ${name}: generated -->`);
    await expect(withGenerated(text)).toMatchFileSnapshot(path);
  });

  it("shows examples that are read", () => {
    const whole = yaml.filter((block) => block.includes("loop:"));
    expect(whole.length).toBeGreaterThan(1);
    for (const block of whole) expect(readCycle(block).loop.length).toBeGreaterThan(3);
  });

  it("shows names that are read", () => {
    const [whole] = yaml;
    const lets = yaml.filter((block) => block.startsWith("let:"));
    expect(lets).toHaveLength(1);
    const { loop } = readCycle(whole.replace("let: { p_high: 8 bar }\n", lets[0]), { set: [{ address: "L1.heat", value: "leak" }, { address: "A1.outlet-temperature", value: "warm" }] });
    expect(loop[0].values["outlet-pressure"]).toBeCloseTo(1.3 ** 4 * 2.4e5, 6);
    expect(loop[1].values["outlet-temperature"]).toBeCloseTo(303.15, 10);
    expect(loop[4].values.heat).toBeCloseTo(0.05 * 205.15, 10);
  });

  it("shows expressions with what they come to", () => {
    const rows = [...text.matchAll(/^\| `(.*\d.*)` \| (.*) \|$/gm)].filter(([, expression]) => /[-+*] /.test(expression));
    expect(rows.length).toBeGreaterThan(4);
    for (const [, expression, says] of rows) {
      const value = evaluateExpression(expression, scopeOf());
      if (says.startsWith("refused")) expect(isQuantity(value), expression).toBe(false);
      else if (!isQuantity(value)) expect.fail(`${expression}: ${value?.found}`);
      else if (says.includes("over the surroundings")) expect(value.value).toBeCloseTo(6.8e5 + 101325, 6);
      else {
        const [, number, unit] = /([\d.]+) (K|bar)/.exec(says) ?? [];
        expect(value.value / (unit === "bar" ? 1e5 : 1), expression).toBeCloseTo(Number(number), 5);
      }
    }
  });
});
