import type { BreakEven, BreakEvenTurn, Looked } from "../studies/breakeven.js";
import type { Turn } from "../studies/crossings.js";
import { fixed } from "./numbers.js";
import { resultText, withUnit } from "./shown-quantity.js";
import { significantOf } from "./sweep-table.js";
import { wrap } from "./wrap.js";

/** Digits of a break-even value: it is known to 1e-6. */
const DIGITS = 7;

/** Where a condition turns, in words. */
export function breakEvenText(answer: BreakEven): string {
  const { variable, condition, range, turns, edges, ends, given } = answer;
  const at = (x: number): string => withUnit(significantOf(x), variable.unit);
  const span = `${variable.address} from ${at(range[0])} to ${at(range[1])}`;
  const lines: string[] = [];
  if (turns.length === 0) {
    const solved = ends.filter(({ value }) => value !== null);
    const always = solved.length === 0 ? "" : solved.every(({ met }) => met) ? ": it is met wherever there is a steady state" : ": it is met nowhere";
    lines.push(wrap(`"${condition.text}" never turns for ${span}${answer.solved ? always : ": no place looked at has an answer"}.`));
  } else {
    lines.push(`"${condition.text}", looked at for ${span}:`, ...turns.flatMap((turn) => [wrap(turnText(turn, answer), "  "), ...sides(turn)]));
  }
  lines.push("");
  for (const end of given === null || given.x === range[0] || given.x === range[1] ? ends : [ends[0], given, ends[1]]) {
    lines.push(wrap(`${end === given ? "in the file, " : ""}at ${at(end.x)}: ${lookedText(end, answer)}`, "  "));
  }
  for (const { x, valuesAbove, reason } of edges) {
    lines.push(wrap(`${valuesAbove ? "below" : "above"} ${at(x)}: ${reason}`, "  "));
  }
  return lines.join("\n");

  /** The machine on either side of a turn; beyond an edge the turn itself has said why there is none. */
  function sides(turn: BreakEvenTurn): string[] {
    return ([["below", turn.below], ["above", turn.above]] as const)
      .filter(([, looked]) => looked.reason === null)
      .map(([side, looked]) => wrap(`${side}, at ${at(looked.x)}: ${lookedText(looked, answer)}`, "    "));
  }
}

/** One break-even in one line: "T1.efficiency = 48.04321 %: met above, not below". */
export function turnText({ x, metAbove, kind, reason }: Turn, { variable }: Pick<BreakEven, "variable">): string {
  const place = `${variable.address} = ${withUnit(x.toPrecision(DIGITS), variable.unit)}`;
  const sides = metAbove ? "met above, not below" : "met below, not above";
  if (kind === "jump") return `${place}: ${sides}; the machine jumps there from one steady state to another`;
  if (kind === "edge") return `${place}: ${sides}: ${reason ?? ""}`;
  return `${place}: ${sides}`;
}

function lookedText({ value, met, coldEnd, wet, reason }: Looked, { condition: { quantity } }: BreakEven): string {
  if (value === null) return reason ?? "no such number";
  const cold = coldEnd === null || quantity.name === "cold-end.temperature" ? "" : `, cold end ${fixed(coldEnd, 2)} K`;
  return `${quantity.name} ${resultText(value, quantity.dimension)}, ${met ? "met" : "not met"}${cold}${wet ? ", liquefies" : ""}`;
}

/** The same for a program, SI units. */
export function breakEvenJson({ variable, condition, range, turns, edges, ends, given }: BreakEven): object {
  const place = (x: number): number => variable.toSI(x);
  const looked = ({ x, value, met, coldEnd, wet, reason }: Looked): object => ({ at: place(x), value, met, coldEndTemperature: coldEnd, liquefies: coldEnd === null ? null : wet, reason });
  return {
    vary: variable.address,
    until: condition.text,
    quantity: condition.quantity.name,
    limit: condition.limit,
    range: range.map(place),
    turns: turns.map(({ x, metAbove, kind, reason, below, above }) => ({ at: place(x), inUnit: x, unit: variable.unit ?? null, metAbove, kind, reason, below: looked(below), above: looked(above) })),
    noSteadyState: edges.map(({ x, valuesAbove, reason }) => ({ from: place(x), above: !valuesAbove, reason })),
    ends: ends.map(looked),
    given: given === null ? null : looked(given),
  };
}
