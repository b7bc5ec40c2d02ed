import { mkdirSync, mkdtempSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { InputError } from "../../src/cyclefile/errors.js";
import { loadCycleFile, parseSetting } from "../../src/cyclefile/load.js";
import { readCycle } from "../../src/cyclefile/read.js";
import { bench, example } from "./cases.js";

let folder: string;
beforeAll(() => {
  folder = mkdtempSync(join(tmpdir(), "cyclefile-"));
});
afterAll(() => rmSync(folder, { recursive: true, force: true }));

function written(name: string, content: string | Buffer): string {
  const path = join(folder, name);
  writeFileSync(path, content);
  return path;
}

async function refused(path: string): Promise<InputError> {
  const start = performance.now();
  const error: unknown = await loadCycleFile(path)
    .then((file) => file.define())
    .catch((reason: unknown) => reason);
  expect(performance.now() - start, "milliseconds").toBeLessThan(3000);
  if (!(error instanceof InputError)) throw new Error(`not refused: ${String(error)}`);
  return error;
}

describe("a file on disk", () => {
  it("is read, and gets the evaluator of expressions where it needs it", async () => {
    const path = written("throttle.yaml", example("throttle-cooler"));
    expect((await loadCycleFile(path)).define()).toEqual(readCycle(example("throttle-cooler")));
    const overrides = [{ address: "T1.outlet-pressure", value: "p_high / 4" }];
    const file = await loadCycleFile(written("bench.yaml", bench), overrides);
    expect(file.define(overrides).loop[3].values["outlet-pressure"]).toBe(2e5);
  });

  const deep = { "[": "[".repeat(50_000), "{a: ": "{a: ".repeat(20_000), "- ": "- ".repeat(40_000) };
  it.each([
    ["no file at all", () => join(folder, "missing.yaml"), "no-file"],
    ["a folder", () => { mkdirSync(join(folder, "folder"), { recursive: true }); return join(folder, "folder"); }, "no-file"],
    ["a file within a file", () => join(written("plain.yaml", bench), "x"), "no-file"],
    ["an empty file", () => written("empty.yaml", ""), "empty"],
    ["10 MB", () => written("large.yaml", "# filling\n".repeat(1_000_000)), "too-long"],
    ["bytes of every value", () => written("bytes.yaml", Buffer.from(Array.from({ length: 4096 }, (_, i) => (i * 7919 + (i >> 3) * 104_729) % 256))), "not-text"],
    ["zeros", () => written("zeros.yaml", Buffer.alloc(1000)), "not-text"],
    ["brackets without end", () => written("brackets.yaml", deep["["]), "too-deep"],
    ["maps without end", () => written("maps.yaml", deep["{a: "]), "too-deep"],
    ["lists in lists without end", () => written("lists.yaml", deep["- "]), "too-deep"],
  ])("%s is refused in one line", async (_what, path, code) => {
    const { problems, message } = await refused(path());
    expect(problems.map((problem) => problem.code)).toEqual([code]);
    expect(message).toMatch(/^[^\n]+:1:1: [^\n]+; expected [^\n]+$/);
  });

  it("without an end is refused by its size", async () => {
    expect((await refused("/dev/zero")).problems[0].code).toBe("too-long");
  });

  it("full of keys, aliases or faults is refused soon", async () => {
    const keys = Array.from({ length: 9000 }, (_, i) => `k${i}: 1`).join("\n");
    expect((await refused(written("keys.yaml", keys))).problems.length).toBeGreaterThan(9000);
    await refused(written("entries.yaml", `loop:\n${"  - a: { b: c }\n".repeat(6000)}`));
    await refused(written("colons.yaml", ": ".repeat(50_000)));
    await refused(written("tags.yaml", "!a ".repeat(30_000)));
  });
});

describe("a setting of the command line", () => {
  it.each([
    ["T1.efficiency=55%", "T1.efficiency", "55%"],
    ["T1.efficiency = 55 %", "T1.efficiency", "55 %"],
    ["let.p_high=2 * 4 bar", "let.p_high", "2 * 4 bar"],
    ["L1.x=a=b", "L1.x", "a=b"],
  ])("%s", (text, address, value) => expect(parseSetting(text)).toEqual({ address, value }));

  it.each(["", "=", "T1.efficiency", "T1.efficiency=", "=5", " = "])("%j is refused", (text) => {
    expect(() => parseSetting(text)).toThrow(InputError);
  });
});
