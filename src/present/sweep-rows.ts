import type { BreakEven } from "../studies/breakeven.js";
import type { ResultQuantity } from "../studies/quantities.js";
import type { Swept, SweepRow } from "../studies/sweep.js";
import { breakEvenJson } from "./breakeven.js";
import { shownAs } from "./shown-quantity.js";
import { headed, inFull } from "./sweep-table.js";
import { csvTable } from "./table.js";

/** Writes a sweep row by row, so that each row can be kept as soon as its machine is solved. */
export interface RowWriter {
  /** What stands before the rows. */
  readonly start: string;
  row(row: SweepRow): string;
  /** What stands behind them. */
  end(breakEvens: readonly BreakEven[]): string;
}

/** Comma-separated rows with all digits, units in the heading. */
export function csvRows(swept: readonly Swept[], shown: readonly ResultQuantity[]): RowWriter {
  const heading = [
    ...swept.map(({ variable }) => headed(variable.address, variable.unit)),
    ...shown.map(({ name, dimension }) => headed(name, shownAs(dimension).unit)),
    "status",
    "liquefies",
    "reason",
  ];
  return {
    start: `${line(heading)}\n`,
    row: ({ values, results, status, wet, reason }) => {
      const figures = results.map((value, i) => (value === null ? "" : inFull(shownAs(shown[i].dimension).scale(value))));
      return `${line([...values.map(inFull), ...figures, status, status === "solved" ? (wet ? "yes" : "no") : "", reason ?? ""])}\n`;
    },
    end: () => "",
  };
}

function line(cells: readonly string[]): string {
  return csvTable(cells.map((heading) => ({ heading })), []);
}

/** A JSON object with a list of rows, SI units throughout. */
export function jsonRows(swept: readonly Swept[], shown: readonly ResultQuantity[]): RowWriter {
  const vary = swept.map(({ variable, values }) => ({ address: variable.address, dimension: variable.about.dimension, values: values.map((value) => variable.toSI(value)) }));
  const show = shown.map(({ name, dimension, help }) => ({ name, dimension, help }));
  let separator = "\n";
  const [, second] = swept;
  /** What the second variable of a map holds while the first is moved. */
  const secondOf = (i: number): object => (second === undefined ? {} : { with: { [second.variable.address]: second.variable.toSI(second.values[i]) } });
  return {
    start: `{\n  "vary": ${JSON.stringify(vary)},\n  "show": ${JSON.stringify(show)},\n  "rows": [`,
    row: ({ values, results, status, reason, wet }) => {
      const row = {
        values: Object.fromEntries(values.map((value, i) => [swept[i].variable.address, swept[i].variable.toSI(value)])),
        status,
        reason,
        liquefies: status === "solved" ? wet : null,
        results: Object.fromEntries(results.map((value, i) => [shown[i].name, value])),
      };
      const text = `${separator}    ${JSON.stringify(row)}`;
      separator = ",\n";
      return text;
    },
    end: (breakEvens) => {
      const found = breakEvens.map((each, i) => `\n    ${JSON.stringify({ ...secondOf(i), ...breakEvenJson(each) })}`);
      return `\n  ],\n  "breakEvens": [${found.join(",")}\n  ]\n}\n`;
    },
  };
}
