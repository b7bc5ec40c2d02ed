import asciichart from "asciichart";
import type { ProfilePoint } from "../cycle/result.js";
import { fixed } from "./numbers.js";

const HEIGHT = 11;
/** Points across; with the labels the chart stays within a terminal's width. */
const ACROSS = 85;
/** Columns before the first point: the label and the axis. */
const MARGIN = 10;

/** The two temperatures of an exchanger over the share of its duty, from the warm end to the cold end. */
export function profileChart(profile: readonly ProfilePoint[], colour: boolean): string {
  const warm = spread(profile, ({ warmTemperature }) => warmTemperature);
  const cold = spread(profile, ({ coldTemperature }) => coldTemperature);
  const chart = asciichart.plot([cold, warm], {
    height: HEIGHT,
    format: label,
    ...(colour ? { colors: [asciichart.blue, asciichart.red] } : {}),
  });
  const left = "0 % warm end";
  const right = "cold end 100 %";
  const between = "share of the duty";
  const room = ACROSS - left.length - right.length;
  const axis = left + between.padStart(Math.floor((room + between.length) / 2)).padEnd(room) + right;
  const key = "K; upper line: warm side, being cooled; lower line: cold side, being warmed";
  return [...chart.split("\n").map((line) => line.trimEnd()), " ".repeat(MARGIN) + axis, " ".repeat(MARGIN) + key].join("\n");
}

function label(temperature: number): string {
  return fixed(temperature, 1).padStart(MARGIN - 2);
}

/** Values at evenly spread shares of the duty. */
function spread(profile: readonly ProfilePoint[], value: (point: ProfilePoint) => number): number[] {
  return Array.from({ length: ACROSS }, (_, i) => {
    const share = i / (ACROSS - 1);
    const found = profile.findIndex(({ dutyFraction }) => dutyFraction >= share - 1e-12);
    const next = Math.max(1, found === -1 ? profile.length - 1 : found);
    const [left, right] = [profile[next - 1], profile[next]];
    const between = (share - left.dutyFraction) / (right.dutyFraction - left.dutyFraction);
    return value(left) + between * (value(right) - value(left));
  });
}
