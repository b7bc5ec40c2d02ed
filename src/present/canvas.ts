/** Characters in rows and columns, to draw on. */
export class Canvas {
  private readonly rows: string[][] = [];

  /** Puts a text over what is there; a space covers too. */
  put(x: number, y: number, text: string): void {
    while (this.rows.length <= y) this.rows.push([]);
    const row = this.rows[y] as string[];
    while (row.length < x) row.push(" ");
    Array.from(text).forEach((character, i) => {
      row[x + i] = character;
    });
  }

  /** A plain box around lines of text. */
  box(x: number, y: number, width: number, lines: readonly string[]): void {
    const inside = width - 2;
    this.put(x, y, `┌${"─".repeat(inside)}┐`);
    lines.forEach((line, i) => this.put(x, y + 1 + i, `│ ${line.padEnd(inside - 1)}│`));
    this.put(x, y + 1 + lines.length, `└${"─".repeat(inside)}┘`);
  }

  /** What was drawn, without empty rows around it. */
  toString(): string {
    const lines = this.rows.map((row) => row.join("").trimEnd());
    const isDrawn = (line: string): boolean => line !== "";
    return lines.slice(lines.findIndex(isDrawn), lines.findLastIndex(isDrawn) + 1).join("\n");
  }
}
