import { readdirSync, readFileSync } from "node:fs";
import { describe, expect, it } from "vitest";
import type { BlockKind } from "../../src/blocks/kind.js";
import { blockKinds } from "../../src/blocks/registry.js";

const folder = new URL("../../src/blocks/", import.meta.url);
const cycles = new URL("../../cycles/", import.meta.url);

const isBlockKind = (value: unknown): value is BlockKind =>
  typeof value === "object" && value !== null && "kind" in value && "place" in value && "keys" in value;

describe("the register of blocks", () => {
  it("lists every block kind of the folder", async () => {
    const files = readdirSync(folder).filter((file) => file.endsWith(".ts") && file !== "registry.ts");
    const modules: Record<string, unknown>[] = await Promise.all(files.map((file) => import(new URL(file, folder).href)));
    const inFolder = modules.flatMap((module) => Object.values(module).filter(isBlockKind)).map(({ kind }) => kind);
    expect(blockKinds.map(({ kind }) => kind).toSorted()).toEqual(inFolder.toSorted());
  });

  it.each(blockKinds.map((kind) => [kind.kind, kind] as const))("%s: every key is told once, with help", (_name, kind) => {
    expect(kind.summary).toMatch(/\.$/);
    const seen = kind.keys.map(({ name, side }) => `${name} ${(side ?? "")}`);
    expect(new Set(seen).size).toBe(seen.length);
    for (const key of kind.keys) {
      expect(key.name).toMatch(/^[a-z]+(-[a-z]+)*$/);
      expect(key.help.length).toBeGreaterThan(5);
      if (key.side !== undefined) expect(kind.sides).toContain(key.side);
    }
  });

  it.each(blockKinds.map((kind) => [kind.kind, kind] as const))("%s: alternatives and keys name each other", (_name, kind) => {
    const named = new Set(kind.keys.flatMap((key) => (key.type === "number" && key.alternative !== undefined ? [key.alternative] : [])));
    expect([...named].toSorted()).toEqual(kind.alternatives.map(({ name }) => name).toSorted());
  });

  it.each(blockKinds.map((kind) => [kind.kind] as const))("%s stands in an example", (kind) => {
    const examples = readdirSync(cycles).map((file) => readFileSync(new URL(file, cycles), "utf8"));
    expect(examples.some((text) => text.includes(`- ${kind}:`))).toBe(true);
  });
});
