import asciichart from "asciichart";
import type { ProfilePoint } from "../cycle/result.js";
import { fixed } from "./numbers.js";

const HEIGHT = 11;
/** Points across; with the labels the chart stays within 100 columns. */
const ACROSS = 61;

/** The two temperatures of an exchanger over the share of its duty, from the warm end to the cold end. */
export function profileChart(profile: readonly ProfilePoint[], colour: boolean): string {
  const warm = spread(profile, ({ warmTemperature }) => warmTemperature);
  const cold = spread(profile, ({ coldTemperature }) => coldTemperature);
  const label = (value: number): string => fixed(value, 1).padStart(8);
  const chart = asciichart.plot([cold, warm], {
    height: HEIGHT,
    format: label,
    ...(colour ? { colors: [asciichart.blue, asciichart.red] } : {}),
  });
  const axis = `${" ".repeat(10)}0 %${"share of the duty passed, from the warm end".padStart(44).padEnd(ACROSS - 9)}100 %`;
  const legend = `${" ".repeat(10)}K; upper line: gas on its way in, lower line: gas on its way back`;
  return `${chart}\n${axis}\n${legend}`;
}

/** Values at evenly spread shares of the duty. */
function spread(profile: readonly ProfilePoint[], value: (point: ProfilePoint) => number): number[] {
  return Array.from({ length: ACROSS }, (_, i) => {
    const share = i / (ACROSS - 1);
    const next = Math.max(1, profile.findIndex(({ dutyFraction }) => dutyFraction >= share - 1e-12));
    const [left, right] = [profile[next - 1], profile[next]];
    const between = (share - left.dutyFraction) / (right.dutyFraction - left.dutyFraction);
    return value(left) + between * (value(right) - value(left));
  });
}
