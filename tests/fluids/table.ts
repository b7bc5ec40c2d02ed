import { existsSync, readFileSync } from "node:fs";
import { fileURLToPath } from "node:url";

export type Row = Readonly<Record<string, number>>;

/** The rows of a table in tests/reference; none where there is no such table. */
export function referenceRows(name: string): Row[] {
  const path = fileURLToPath(new URL(`../reference/${name}.csv`, import.meta.url));
  if (!existsSync(path)) return [];
  const [head = "", ...lines] = readFileSync(path, "utf8").trim().split("\n");
  const columns = head.split(",");
  return lines.map((line) => {
    const cells = line.split(",");
    return Object.fromEntries(columns.map((column, i) => [column, Number(cells[i])]));
  });
}
