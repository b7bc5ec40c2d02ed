import type { Alternative, Key, NumberKey } from "../../src/blocks/keys.js";
import type { BlockKind } from "../../src/blocks/kind.js";
import { blockKinds } from "../../src/blocks/registry.js";
import { accepted } from "../../src/cyclefile/quantity.js";
import { surroundingsKeys } from "../../src/cyclefile/surroundings.js";
import { unitNames, units, type UnitKind } from "../../src/cyclefile/units.js";
import { rangeText } from "../../src/cyclefile/values.js";
import { fluidNames } from "../../src/fluids/registry.js";

/** The parts of docs/cycle-file.md that follow from the records, by the name of their place in it. */
export const generated: Readonly<Record<string, () => string>> = {
  fluids: () => `${fluidNames.map((name) => `\`${name}\``).join(", ")}.`,
  surroundings: () => table(["key", "value", "left out", "what it is"], surroundingsKeys.map((key) => [`\`${key.name}\``, valueText({ type: "number", ...key }), shown(key.default, key.dimension), key.help])),
  blocks: () => blockKinds.map(blockText).join("\n\n"),
  units: () => table(["what", "units"], kindsOfUnits().map(([kind, names]) => [kind, names.map((name) => `\`${name}\``).join(", ")])),
};

function kindsOfUnits(): [UnitKind, string[]][] {
  const kinds = [...new Set(Object.values(units).map(({ kind }) => kind))];
  return kinds.map((kind) => [kind, unitNames([kind])]);
}

function blockText({ kind, summary, sides, keys, alternatives }: BlockKind): string {
  const lines = [`### ${kind}`, "", summary];
  if (sides !== undefined) lines[2] += ` It stands in the loop twice under one name, ${sides.map((side) => `\`side: ${side}\``).join(" and ")}.`;
  if (keys.length > 0) lines.push("", table(["key", "value", "left out", "what it is"], keys.map((key) => [keyText(key), valueText(key), leftOut(key, keys, alternatives), key.help])));
  return lines.join("\n");
}

function keyText({ name, side }: Key): string {
  return side === undefined ? `\`${name}\`` : `\`${name}\` (${side} side)`;
}

function valueText(key: Key): string {
  if (key.type === "flag") return "true or false";
  if (key.type === "block") return `the name of ${article(key.kind)}`;
  if (key.type === "branch") return [...key.words, "the name of a branch"].join(" or ");
  const measure = key.dimension === "fraction" ? "number or %" : key.dimension === "count" ? "whole number" : key.dimension;
  const { lowest, highest } = key.range;
  // That temperatures and pressures are more than nothing goes without saying.
  const implied = lowest === 0 && highest === undefined;
  return implied ? measure : `${measure}, ${rangeText(key.range, key.dimension, undefined, 0)}`;
}

function leftOut(key: Key, keys: readonly Key[], alternatives: readonly Alternative[]): string {
  if (key.type === "flag") return String(key.default);
  if (key.type === "branch") return "must be given";
  if (key.type === "block") return "none";
  const alternative = alternatives.find(({ name }) => name === key.alternative);
  if (alternative !== undefined) {
    const others = keys.filter((each) => each !== key && each.type === "number" && each.alternative === alternative.name).map(({ name }) => `\`${name}\``);
    return alternative.optional === true ? `none; not with ${others.join(" or ")}` : `give this or ${others.join(" or ")}`;
  }
  if (key.required === true) return "must be given";
  return key.default === undefined ? "none" : shown(key.default, key.dimension);
}

function shown(value: number, dimension: NumberKey["dimension"]): string {
  if (dimension === "temperature") return `${value - 273.15} degC`;
  if (dimension === "fraction") return value > 0 && value < 1 ? `${value * 100} %` : String(value);
  if (dimension === "pressure") return value === 101325 ? "1 atm" : `${value / 1e5} bar`;
  return value === 0 || dimension === "count" ? String(value) : `${value} ${accepted(dimension).split(": ")[1]?.split(", ")[0] ?? ""}`;
}

function article(word: string): string {
  return `${/^[aeiou]/.test(word) ? "an" : "a"} ${word}`;
}

function table(headings: readonly string[], rows: readonly (readonly string[])[]): string {
  const line = (cells: readonly string[]): string => `| ${cells.join(" | ")} |`;
  return [line(headings), `|${"---|".repeat(headings.length)}`, ...rows.map(line)].join("\n");
}

/** The text with the generated parts in their places, each between a pair of comments. */
export function withGenerated(text: string): string {
  return text.replaceAll(/(<!-- (\w+): generated -->\n)(?:[^]*?\n)??(<!-- end -->)/g, (_all, start: string, name: string, end: string) => {
    const make = generated[name];
    if (make === undefined) throw new Error(`nothing generates ${name}`);
    return `${start}${make()}\n${end}`;
  });
}
