import type { Figure } from "../blocks/keys.js";
import { blockKind } from "../blocks/registry.js";
import type { BlockResult } from "../cycle/result.js";
import { bars, fixed, kelvin, percent, significant, watts } from "./numbers.js";
import { wrapItems } from "./wrap.js";

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
  "mass flow": (value) => `${significant(value * 1e3, 4)} g/s`,
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

/** Columns before a block's figures: its name and kind. */
const HEADING = 20;

/** Every block that has something to say, with the figures that its kind reports, wrapped between figures. */
export function blockFigures(blocks: readonly BlockResult[]): string {
  return blocks
    .map(oneBlock)
    .filter((text) => text !== "")
    .join("\n");
}

function oneBlock(block: BlockResult): string {
  const figures = (blockKind(block.kind)?.figures ?? []).filter((figure) => !isIdle(block[figure.name], figure));
  const parts = figures.flatMap((figure, i) => {
    const text = figureText(block[figure.name], figure);
    return text === undefined || isSaidBefore(figure, figures.slice(0, i), block) ? [] : [`${figure.label} ${text}`];
  });
  if (parts.length === 0) return "";
  const heading = `${`${block.name} (${block.kind})`.padEnd(HEADING - 1)} `;
  return wrapItems(parts, { separator: ";", heading, indent: " ".repeat(HEADING) });
}

/** A leak or a drop that was left at zero says nothing. */
function isIdle(value: unknown, { dimension }: Figure): boolean {
  return value === 0 && (dimension === "power" || dimension === "pressure difference");
}

/** Figures that are often another's under a second name: the one stage's is the whole machine's, the pinch is at an end. */
const OFTEN_THE_SAME: ReadonlySet<Figure["dimension"]> = new Set(["none", "none list", "temperature list", "temperature difference"]);

function isSaidBefore(figure: Figure, before: readonly Figure[], block: BlockResult): boolean {
  if (!OFTEN_THE_SAME.has(figure.dimension)) return false;
  const single = (name: string): unknown => (Array.isArray(block[name]) && block[name].length === 1 ? (block[name][0] as unknown) : block[name]);
  const value = single(figure.name);
  return typeof value === "number" && before.some(({ name }) => single(name) === value);
}
