import { spawn } from "node:child_process";
import { mkdirSync, renameSync, writeFileSync } from "node:fs";
import { afterAll, beforeAll, describe, expect, it, vi } from "vitest";
import { commands } from "../src/commands/registry.js";
import { Program, type Answer } from "./program.js";

let program: Program;
beforeAll(() => {
  program = new Program();
});
afterAll(() => program.remove());

/** Wrong input, said in exactly one line and without a stack. */
function expectOneLine({ status, out, told }: Answer): void {
  expect(status).toBe(2);
  expect(out).toBe("");
  expect(told).toMatch(/^[^\n]+\n$/);
  expect(told).not.toMatch(/\bat .+:\d+:\d+\)|node:internal/);
  expect(told.length).toBeLessThan(300);
}

/** A cycle file that tells its load in its title. */
function machine(heat: number): string {
  return `title: load of ${heat}
fluid: air
circuit: closed
flow: 6 g/s
loop:
  - compressor: { name: C1, outlet-pressure: 8 bar, efficiency: 0.6 }
  - aftercooler: { name: A1, outlet-temperature: 30 degC }
  - recuperator: { name: HX1, side: warm, effectiveness: 0.9 }
  - expander: { name: T1, outlet-pressure: 1.2 bar, efficiency: 0.5 }
  - load: { name: L1, heat: ${heat} W }
  - recuperator: { name: HX1, side: cold }
`;
}

describe("the program", () => {
  it("prints its version", () => {
    expect(program.run("--version")).toMatchObject({ status: 0, out: expect.stringMatching(/^\d+\.\d+\.\d+\n$/), told: "" });
  });

  it.each([
    ["rum", "run"],
    ["states", "state"],
  ])("refuses the unknown command %s and names the nearest, %s", (word, meant) => {
    const { status, out, told } = program.run(word);
    expect({ status, out }).toEqual({ status: 2, out: "" });
    expect(told).toMatch(new RegExp(`\\b${meant}\\b`));
  });

  it("refuses an unknown option, a choice that there is not, and a word too many", () => {
    const wrong = [["run", "x.yaml", "--jsno"], ["points", "x.yaml", "--format", "xls"], ["check", "x.yaml", "y.yaml"], ["run"]];
    for (const words of wrong) expect(program.run(...words), words.join(" ")).toMatchObject({ status: 2, out: "" });
    expect(program.run("run", "x.yaml", "--jsno").told).toContain("--json");
  });

  it("lists every command in its help, with a line to copy, and names the help to whoever mistypes", () => {
    for (const flag of ["--help", "-h"]) {
      const { status, out, told } = program.run(flag);
      expect({ status, told }).toEqual({ status: 0, told: "" });
      for (const { name, examples } of commands) {
        expect(out).toMatch(new RegExp(`^  ${name} `, "m"));
        expect(out).toContain(examples[0][0]);
      }
      for (const line of out.split("\n")) expect(line.length, line).toBeLessThanOrEqual(100);
    }
    expect(program.run("nothing").told).toContain("rimeloop --help");
    expect(program.run("points").told).toContain("rimeloop points --help");
    expect(program.run()).toMatchObject({ status: 2, out: "" });
  });

  it.each(commands.map(({ name }) => name))("prints the help of %s within a terminal's width", (name) => {
    const { status, out } = program.run(name, "--help");
    expect(status).toBe(0);
    // Lines to copy stay whole.
    for (const line of out.split("\n").filter((each) => !each.startsWith("  rimeloop "))) expect(line.length, line).toBeLessThanOrEqual(100);
    expect(out).toContain(`rimeloop ${name}`);
  });
});

describe("a file that is none", () => {
  it("is refused in one line", () => {
    mkdirSync(program.path("folder"));
    writeFileSync(program.path("empty.yaml"), "");
    writeFileSync(program.path("long.yaml"), "# filling\n".repeat(1_000_000));
    writeFileSync(program.path("random.yaml"), Buffer.from(Array.from({ length: 4096 }, (_, i) => (i * 7919 + (i >> 3) * 104729) % 256)));
    for (const name of ["missing.yaml", "empty.yaml", "folder", "long.yaml", "random.yaml"]) {
      const answer = program.run("run", name);
      expectOneLine(answer);
      expect(answer.told.startsWith(name), answer.told).toBe(true);
    }
  });

  it("is refused quickly where its anchors multiply", () => {
    const levels = Array.from({ length: 40 }, (_, i) => `  x${i}: &x${i} [${i === 0 ? "1, 1" : `*x${i - 1}, *x${i - 1}`}]`);
    writeFileSync(program.path("anchors.yaml"), `title: anchors\nlet:\n${levels.join("\n")}\nloop: *x39\n`);
    const start = performance.now();
    const { status, out, told } = program.run("run", "anchors.yaml");
    expect({ status, out }).toEqual({ status: 2, out: "" });
    expect(told).toContain("anchors.yaml");
    expect(performance.now() - start).toBeLessThan(5000);
  });

  it("has its stack shown on request only", () => {
    expect(program.runWith({ RIMELOOP_DEBUG: "1" }, "run", "missing.yaml").told).toMatch(/InputError/);
    expect(program.run("run", "missing.yaml").told).not.toMatch(/InputError/);
  });
});

describe("run", () => {
  const bench = "cycles/bench-cooler.yaml";

  it("answers with figures on standard output only, without colour", () => {
    const { status, out, told } = program.runWith({ FORCE_COLOR: "1" }, "run", bench);
    expect({ status, told }).toEqual({ status: 0, told: "" });
    expect(out.includes("\u001B")).toBe(false);
    expect(out).toContain("82.47 K");
  });

  it("prints the whole result as JSON, every number finite", () => {
    const result = JSON.parse(program.run("run", bench, "--json").out) as Record<string, unknown>;
    for (const key of ["title", "solver", "coldEnd", "refrigeration", "power", "performance", "liquefaction", "stations", "blocks", "audit", "exergy", "warnings", "cautions"]) {
      expect(result, key).toHaveProperty(key);
    }
    expect(result.stations).toHaveLength(6);
    expect(result).toHaveProperty("coldEnd.temperature", expect.closeTo(82.47, 1));
  });

  it("takes settings, and names one that fits nothing", () => {
    const warmer = JSON.parse(program.run("run", bench, "--json", "--set", "T1.efficiency=20%", "--set", "L1.heat=0 W").out) as { coldEnd: { temperature: number } };
    expect(warmer.coldEnd.temperature).toBeGreaterThan(95);
    expectOneLine(program.run("run", bench, "--set", "L1.heta=3 W"));
    expectOneLine(program.run("run", bench, "--set", "T1.efficiency"));
  });

  it("ends with 1 and the reason where there is no steady state", () => {
    const { status, out, told } = program.run("run", bench, "--set", "L1.heat=900 W");
    expect({ status, out }).toEqual({ status: 1, out: "" });
    expect(told).toContain("L1");
    expect(told).toContain("900");
    for (const line of told.split("\n")) expect(line.length).toBeLessThanOrEqual(100);
  });

  it("does not mind a reader that stops early", async () => {
    const child = spawn(process.execPath, [program.file, "run", bench], { cwd: program.folder, stdio: ["ignore", "pipe", "pipe"] });
    let told = "";
    child.stderr.on("data", (piece: Buffer) => (told += piece.toString()));
    child.stdout.destroy();
    const status = await new Promise((resolve) => child.on("exit", resolve));
    expect({ status, told }).toEqual({ status: 0, told: "" });
  });

  it("watches: runs again when the file is replaced, and goes on through faults", async () => {
    writeFileSync(program.path("watched.yaml"), machine(20));
    const child = spawn(process.execPath, [program.file, "run", "watched.yaml", "--watch"], { cwd: program.folder });
    let out = "";
    let told = "";
    child.stdout.on("data", (piece: Buffer) => (out += piece.toString()));
    child.stderr.on("data", (piece: Buffer) => (told += piece.toString()));
    const until = (done: () => boolean): Promise<void> => vi.waitFor(() => expect(done(), out + told).toBe(true), { timeout: 10_000, interval: 25 });
    const replace = (content: string): void => {
      writeFileSync(program.path("watched.new"), content);
      renameSync(program.path("watched.new"), program.path("watched.yaml"));
    };
    try {
      await until(() => out.includes("load of 20") && told.includes("watched.yaml"));
      replace("loop: [");
      await until(() => /watched\.yaml:\d+:\d+/.test(told));
      replace(machine(30));
      await until(() => out.includes("load of 30"));
      expect(out.includes("\u001B")).toBe(false);
    } finally {
      child.kill("SIGINT");
    }
    expect(await new Promise((resolve) => child.on("exit", resolve))).toBe(0);
  });
});
