import { readdirSync, readFileSync, statSync } from "node:fs";
import { dirname, join, relative } from "node:path";
import { fileURLToPath } from "node:url";
import { describe, expect, it } from "vitest";

const source = fileURLToPath(new URL("../src/", import.meta.url));

/** What the files of each folder may import from: one way, as docs and DEVELOPERS.md draw it. */
const MAY_IMPORT: Record<string, readonly string[]> = {
  fluids: ["fluids"],
  blocks: ["blocks", "fluids"],
  cycle: ["cycle", "blocks", "fluids"],
  cyclefile: ["cyclefile", "cycle", "blocks", "fluids"],
  studies: ["studies", "cyclefile", "cycle", "blocks", "fluids"],
  cautions: ["cautions", "cycle", "blocks", "fluids"],
  present: ["present", "studies", "cautions", "cyclefile", "cycle", "blocks", "fluids"],
  commands: ["commands", "present", "cautions", "studies", "cyclefile", "cycle", "blocks", "fluids"],
};

function sourceFiles(folder = source): string[] {
  return readdirSync(folder).flatMap((name) => {
    const path = join(folder, name);
    return statSync(path).isDirectory() ? sourceFiles(path) : path.endsWith(".ts") ? [path] : [];
  });
}

describe("the layout", () => {
  it.each(sourceFiles().map((path) => relative(source, path)))("%s imports one way only", (file) => {
    const [folder] = file.split("/");
    const allowed = MAY_IMPORT[folder ?? ""];
    if (!file.includes("/") || allowed === undefined) {
      expect(["cli.ts", "index.ts"]).toContain(file);
      return;
    }
    const text = readFileSync(join(source, file), "utf8");
    for (const [, specifier = ""] of text.matchAll(/(?:from|import\()\s*"(\.[^"]+)"/g)) {
      const target = relative(source, join(source, dirname(file), specifier));
      expect(allowed, `${file} imports ${target}`).toContain(target.split("/")[0]);
    }
  });

  it.each(sourceFiles().map((path) => relative(source, path)))("%s has at most 300 lines", (file) => {
    expect(readFileSync(join(source, file), "utf8").split("\n").length).toBeLessThanOrEqual(301);
  });
});
