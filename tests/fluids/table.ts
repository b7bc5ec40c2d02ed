import { existsSync, readFileSync } from "node:fs";
import { fileURLToPath } from "node:url";

/** One line of a table by column; a cell that is no number is NaN here. */
export type Row = Readonly<Record<string, number>>;

/** The rows of a table in tests/reference, those whose line starts as given; none where there is no such table. */
export function referenceRows(name: string, start = ""): Row[] {
  const path = fileURLToPath(new URL(`../reference/${name}.csv`, import.meta.url));
  if (!existsSync(path)) return [];
  const [head = "", ...lines] = readFileSync(path, "utf8").trim().split("\n");
  const columns = head.split(",");
  return lines.filter((line) => line.startsWith(start)).map((line) => {
    const cells = line.split(",");
    return Object.fromEntries(columns.map((column, i) => [column, Number(cells[i])]));
  });
}
