import type { CycleResult } from "../cycle/result.js";
import { fixed, kelvin, percent, significant, watts } from "./numbers.js";
import { wrap } from "./wrap.js";

/** What the machine does, in a few lines, most important first. */
export function summary(result: CycleResult): string {
  return [coldEnd(result), refrigeration(result), liquefaction(result), power(result), ...limits(result)]
    .map((line) => hanging(line))
    .join("\n");
}

type Line = readonly [label: string, text: string];

const LABEL = 18;

function hanging([label, text]: Line): string {
  return wrap(text, " ".repeat(LABEL)).replace(" ".repeat(LABEL), label.padEnd(LABEL));
}

function coldEnd({ coldEnd: { temperature, station }, stations }: CycleResult): Line {
  const after = stations.find((each) => each.station === station)?.after ?? "";
  return ["Cold end", `settles at ${kelvin(temperature)} (${fixed(temperature - 273.15, 1)} degC) behind ${after}, station ${station}`];
}

function refrigeration({ refrigeration: { capacity, loads }, performance }: CycleResult): Line {
  if (loads.length === 0) return ["Refrigeration", "no load in the loop"];
  const each = loads.map(({ name, heat, inletTemperature, outletTemperature }) => `${watts(heat)} at ${name}, gas from ${kelvin(inletTemperature)} to ${kelvin(outletTemperature)}`);
  const { carnotCop } = performance;
  const share = capacity > 0 && carnotCop !== null ? `; a reversible refrigerator would take ${watts(capacity / carnotCop)} for it` : "";
  return ["Refrigeration", `lifts ${each.join("; ")}${share}`];
}

function liquefaction({ liquefaction: found, liquid }: CycleResult): Line {
  return ["Liquefaction", `${condition(found, liquid)}; ${threshold(found)}`];
}

function condition({ reached, margin, where }: CycleResult["liquefaction"], liquid: CycleResult["liquid"]): string {
  if (margin === null) return "no: no station lies below the critical pressure";
  if (!reached) return `no: behind ${where}, where it is nearest, the gas stays ${fixed(margin / 1e3, 2)} kJ/kg above its dew point`;
  if (liquid === null) return `yes: liquid forms behind ${where}`;
  const { massFlow, fractionOfFlow, oxygenMoleFraction } = liquid;
  const oxygen = oxygenMoleFraction === null ? "" : `; the liquid holds ${percent(oxygenMoleFraction, 0)} oxygen`;
  const amount = `${significant(massFlow * 1e3, 3)} g/s (${percent(fractionOfFlow)} of the flow)`;
  return `yes: ${liquid.where === "product" ? `${amount} is drawn` : `liquid forms, most of it behind ${liquid.where}: ${amount}`}${oxygen}`;
}

function threshold({ required, given, reason, parameter }: CycleResult["liquefaction"]): string {
  if (required === null) return `no expander efficiency decides it: ${reason}`;
  const begins = `it begins with ${parameter} at ${percent(required, 2)}`;
  if (given === null) return begins;
  const apart = `${fixed(Math.abs(given - required) * 100, 1)} points`;
  return `${begins}, and the file gives ${percent(given)}: ${given >= required ? `${apart} to spare` : `${apart} short`}`;
}

function power({ power: bought, performance: { cop, secondLawEfficiency }, massFlow }: CycleResult): Line {
  const figures = [
    `${watts(bought.net)} bought for ${significant(massFlow * 1e3, 4)} g/s`,
    `${watts(bought.compression)} into the gas${bought.expansion > 0 ? `, ${watts(bought.expansion)} out of it` : ""}`,
    ...(cop === null ? [] : [`COP ${significant(cop, 3)}`]),
    ...(secondLawEfficiency === null ? [] : [`second-law efficiency ${percent(secondLawEfficiency, 2)}`]),
  ];
  return ["Power", figures.join("; ")];
}

/** Smaller losses limit nothing. */
const LEAST_SHARE = 0.005;

/** The largest destroyers of what is bought, and the tightest place in each exchanger. */
function limits({ exergy, blocks }: CycleResult): Line[] {
  const kinds = new Map(blocks.map(({ name, kind }) => [name, kind === name ? name : `${kind} ${name}`]));
  const worst = exergy.filter(({ share }) => share >= LEAST_SHARE).toSorted((a, b) => b.destroyed - a.destroyed).slice(0, 3);
  const losses = worst.map(({ block, share }) => `${kinds.get(block) ?? block} ${percent(share, 0)}`).join(", ");
  const pinches = blocks.flatMap(({ name, smallestDifference, smallestDifferenceAt }) =>
    typeof smallestDifference === "number" && typeof smallestDifferenceAt === "number" ? [`${name} ${kelvin(smallestDifference)} ${place(smallestDifferenceAt)}`] : [],
  );
  const lines: Line[] = worst.length === 0 ? [] : [["Most is lost in", `${losses} of all losses`]];
  if (pinches.length > 0) lines.push(["Pinch", pinches.join("; ")]);
  return lines;
}

function place(share: number): string {
  if (share < 0.005) return "at its warm end";
  if (share > 0.995) return "at its cold end";
  return `inside, ${percent(share, 0)} of the duty from its warm end`;
}
