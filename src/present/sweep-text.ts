import type { BreakEven } from "../studies/breakeven.js";
import type { ResultQuantity } from "../studies/quantities.js";
import type { Swept, SweepRow } from "../studies/sweep.js";
import { breakEvenText, turnText } from "./breakeven.js";
import { significant } from "./numbers.js";
import { withUnit } from "./shown-quantity.js";
import { sweepChart } from "./sweep-chart.js";
import { sweepMap, sweepTable } from "./sweep-table.js";
import { wrap } from "./wrap.js";

/** Charts below a table. */
const MOST_CHARTS = 2;

/** A sweep for a person: table, break-even and charts, or a map of every result shown. */
export function sweepText(swept: readonly Swept[], shown: readonly ResultQuantity[], rows: readonly SweepRow[], breakEvens: readonly BreakEven[]): string {
  const [first, second] = swept;
  if (second !== undefined) {
    return shown.map((quantity, i) => sweepMap([first, second], quantity, rows.map((row) => ({ ...row, results: [row.results[i]] })), breakEvens)).join("\n\n");
  }
  const [breakEven] = breakEvens;
  const marks = breakEven === undefined ? [] : breakEven.turns.map(({ x }) => ({ x, text: `${breakEven.condition.text}: ${withUnit(significant(x, 5), breakEven.variable.unit)}` }));
  const charts = shown.map((quantity, i) => sweepChart(first, i, quantity, rows, marks)).filter((chart) => chart !== null);
  return [sweepTable(swept, shown, rows), ...(breakEven === undefined ? [] : [breakEvenLines(breakEven)]), ...charts.slice(0, MOST_CHARTS)].join("\n\n");
}

function breakEvenLines(breakEven: BreakEven): string {
  if (breakEven.turns.length === 0) return breakEvenText(breakEven).split("\n\n")[0];
  return breakEven.turns.map((turn) => wrap(`"${breakEven.condition.text}" turns at ${turnText(turn, breakEven)}`)).join("\n");
}
