import type { Figure } from "../blocks/keys.js";
import { blockKind } from "../blocks/registry.js";
import type { BlockResult } from "../cycle/result.js";
import { bars, fixed, kelvin, percent, significant, watts } from "./numbers.js";
import { WIDTH } from "./wrap.js";

const WRITE: Readonly<Record<string, (value: number) => string>> = {
  fraction: (value) => percent(value),
  count: (value) => String(value),
  none: (value) => significant(value, 4),
  temperature: kelvin,
  "temperature difference": kelvin,
  pressure: bars,
  "pressure difference": (value) => `${significant(value / 1e5, 3)} bar`,
  power: watts,
  conductance: (value) => `${significant(value, 4)} W/K`,
  volume: (value) => `${significant(value * 1e3, 4)} L`,
  "specific enthalpy": (value) => `${fixed(value / 1e3, 2)} kJ/kg`,
};

/** A figure in its unit; undefined for one that is no number and no list of numbers. */
export function figureText(value: unknown, { dimension }: Figure): string | undefined {
  const write = WRITE[dimension.replace(" list", "")];
  if (value === null) return "none";
  if (dimension === "text") return String(value);
  if (write === undefined) return undefined;
  if (Array.isArray(value)) return value.map((each) => write(each as number)).join(", ");
  return typeof value === "number" ? write(value) : undefined;
}

/** Every block with the figures that its kind reports, wrapped between figures. */
export function blockFigures(blocks: readonly BlockResult[]): string {
  return blocks.map((block) => oneBlock(block)).join("\n");
}

function oneBlock(block: BlockResult): string {
  const figures = blockKind(block.kind)?.figures ?? [];
  const parts = figures.flatMap((figure) => {
    const text = figureText(block[figure.name], figure);
    return text === undefined || isIdle(block[figure.name], figure) ? [] : [`${figure.label} ${text}`];
  });
  const heading = `${block.name} (${block.kind})  `;
  const lines: string[] = [];
  let line = heading;
  parts.forEach((part, i) => {
    const piece = i < parts.length - 1 ? `${part}; ` : part;
    if (line.length > 4 && (line + piece.trimEnd()).length > WIDTH) {
      lines.push(line.trimEnd());
      line = "    ";
    }
    line += piece;
  });
  return [...lines, line.trimEnd()].join("\n");
}

/** A leak or a drop that was left at zero says nothing. */
function isIdle(value: unknown, { dimension }: Figure): boolean {
  return value === 0 && (dimension === "power" || dimension === "pressure difference");
}
