import { execFileSync, spawnSync } from "node:child_process";
import { cpSync, mkdtempSync, rmSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { fileURLToPath } from "node:url";

const root = fileURLToPath(new URL("../", import.meta.url));

/** What a run of the program answered. */
export interface Answer {
  readonly status: number | null;
  readonly out: string;
  readonly told: string;
}

/** The program bundled as it is for its users, in a folder of its own, run as a process of its own. */
export class Program {
  readonly folder = mkdtempSync(join(tmpdir(), "rimeloop-"));
  readonly file = join(this.folder, "dist", "cli.js");

  constructor() {
    execFileSync("npm", ["run", "--silent", "bundle", "--", `--outdir=${join(this.folder, "dist")}`], { cwd: root });
    cpSync(join(root, "package.json"), join(this.folder, "package.json"));
    cpSync(join(root, "cycles"), join(this.folder, "cycles"), { recursive: true });
  }

  /** Runs it in its folder, without a terminal. */
  run(...words: string[]): Answer {
    return this.runWith({}, ...words);
  }

  runWith(environment: Record<string, string>, ...words: string[]): Answer {
    const { status, stdout, stderr } = spawnSync(process.execPath, [this.file, ...words], {
      cwd: this.folder,
      encoding: "utf8",
      env: { ...process.env, RIMELOOP_DEBUG: "", ...environment },
      timeout: 30_000,
    });
    return { status, out: stdout, told: stderr };
  }

  path(name: string): string {
    return join(this.folder, name);
  }

  remove(): void {
    rmSync(this.folder, { recursive: true, force: true });
  }
}
