import { blockKind } from "../blocks/registry.js";
import type { BlockDefinition } from "../blocks/definition.js";
import type { CycleDefinition, Flow } from "../cycle/definition.js";
import { linesOf } from "../cycle/lines.js";
import { planPressures } from "../cycle/plan.js";
import { figureText } from "./figures.js";
import { bars, fixed, significant } from "./numbers.js";
import { GAP, textTable } from "./table.js";
import { WIDTH, wrap, wrapItems } from "./wrap.js";

/** Columns that a pressure takes. */
const PRESSURE = 5;

/** What a checked file says, for its writer to compare with what was meant. */
export function understood(definition: CycleDefinition): string {
  const { title, fluid, circuit, surroundings, flow } = definition;
  const entries = linesOf(definition).flatMap((line) => line.entries);
  const { before, behind } = planPressures(definition);
  const names = entries.map(({ name, side }) => (side === undefined ? name : `${name} ${side}`));
  const left = longest(names) + longest(entries.map(({ kind }) => kind)) + 2 * PRESSURE + 4 * GAP.length;
  const rows = entries.map((entry, i) => [
    names[i],
    entry.kind,
    significant((before.get(entry) ?? NaN) / 1e5, 4),
    significant((behind.get(entry) ?? NaN) / 1e5, 4),
    wrapItems(keyTexts(entry), { separator: ",", width: WIDTH - left }),
  ]);
  return [
    wrap(title),
    wrap(`${fluid}, ${circuit} circuit, ${flowText(flow)}; surroundings ${fixed(surroundings.temperature - 273.15, 1)} degC, ${bars(surroundings.pressure)}`),
    "",
    textTable(
      [
        { heading: "block", align: "left" },
        { heading: "kind", align: "left" },
        { heading: "p in", unit: "bar" },
        { heading: "p out", unit: "bar" },
        { heading: "keys", align: "left" },
      ],
      rows,
    ),
    "",
    "No fault found.",
  ].join("\n");
}

function longest(texts: readonly string[]): number {
  return Math.max(...texts.map(({ length }) => length));
}

/** The keys that say something: all but those at their default, and the pressures in the columns beside. */
function keyTexts({ kind, values }: BlockDefinition): string[] {
  return (blockKind(kind)?.keys ?? []).flatMap((key) => {
    const value = values[key.name];
    if (value === undefined || ("default" in key && value === key.default) || key.name === "outlet-pressure") return [];
    const text = key.type === "number" ? figureText(value, { name: key.name, label: "", dimension: key.dimension }) : String(value);
    return [`${key.name} ${text}`];
  });
}

function flowText(flow: Flow): string {
  switch (flow.kind) {
    case "mass":
      return `${significant(flow.value * 1e3, 4)} g/s`;
    case "molar":
      return `${significant(flow.value, 4)} mol/s`;
    case "reference volume":
      return `${significant(flow.value * 3600, 4)} m3/h at ${fixed(flow.temperature - 273.15, 1)} degC and ${bars(flow.pressure)}`;
    case "inlet volume":
      return `${significant(flow.value * 6e4, 4)} L/min at the compressor's inlet`;
  }
}
