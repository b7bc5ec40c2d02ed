/** A column of a text table: its heading in one or two lines, and on which side its cells stand. */
export interface Column {
  readonly heading: string;
  /** Second line of the heading: the unit. */
  readonly unit?: string;
  readonly align?: "left" | "right";
}

/** Between two columns. */
export const GAP = "  ";

/** Rows in aligned columns under their headings, units in the second line. A cell may have more than one line. */
export function textTable(columns: readonly Column[], given: readonly (readonly string[])[]): string {
  const rows = given.flatMap(linesOfRow);
  const widths = columns.map(({ heading, unit = "" }, i) => Math.max(heading.length, unit.length, ...rows.map((row) => row[i].length)));
  const line = (cells: readonly string[]): string =>
    cells
      .map((cell, i) => (columns[i].align === "left" ? cell.padEnd(widths[i]) : cell.padStart(widths[i])))
      .join(GAP)
      .trimEnd();
  const headings = [line(columns.map(({ heading }) => heading))];
  if (columns.some(({ unit = "" }) => unit !== "")) headings.push(line(columns.map(({ unit = "" }) => unit)));
  const rule = "-".repeat(widths.reduce((sum, width) => sum + width, GAP.length * (widths.length - 1)));
  return [...headings, rule, ...rows.map(line)].join("\n");
}

/** A row as many times as its tallest cell has lines. */
function linesOfRow(row: readonly string[]): string[][] {
  const lines = row.map((cell) => cell.split("\n"));
  return Array.from({ length: Math.max(...lines.map(({ length }) => length)) }, (_, i) => lines.map((each) => each[i] ?? ""));
}

/** The same as comma-separated values; headings carry their unit. */
export function csvTable(columns: readonly Column[], rows: readonly (readonly string[])[]): string {
  return [columns.map(headingWithUnit), ...rows].map((row) => row.map(csvCell).join(",")).join("\n");
}

/** The same as a Markdown table. */
export function markdownTable(columns: readonly Column[], rows: readonly (readonly string[])[]): string {
  const rule = columns.map(({ align }) => (align === "left" ? ":--" : "--:"));
  return [columns.map(headingWithUnit), rule, ...rows].map(markdownLine).join("\n");
}

function headingWithUnit({ heading, unit = "" }: Column): string {
  return unit === "" ? heading : `${heading} (${unit})`;
}

/** A cell that holds a separator is quoted, as RFC 4180 has it. */
function csvCell(text: string): string {
  return /[",\r\n]/.test(text) ? `"${text.replaceAll('"', '""')}"` : text;
}

function markdownLine(cells: readonly string[]): string {
  return `| ${cells.map((text) => text.replaceAll("|", "\\|")).join(" | ")} |`;
}

/** How a table is written. */
export type TableFormat = "text" | "csv" | "md";

/** A table in the format asked for. */
export function writeTable(format: TableFormat, columns: readonly Column[], rows: readonly (readonly string[])[]): string {
  const write = { text: textTable, csv: csvTable, md: markdownTable }[format];
  return write(columns, rows);
}
