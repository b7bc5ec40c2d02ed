import type { Station } from "../cycle/result.js";
import { percent } from "./numbers.js";
import { wrap } from "./wrap.js";

/** A line for each station at which air is wet: what its liquid and vapour are made of; "" where none is. */
export function wetStations(stations: readonly Station[]): string {
  const lines = stations.flatMap(({ station, after, liquidOxygen, vapourOxygen }) =>
    liquidOxygen === null || vapourOxygen === null
      ? []
      : [wrap(`Wet at station ${station}, ${after}: the liquid holds ${percent(liquidOxygen)} oxygen, the vapour ${percent(vapourOxygen)}`)],
  );
  return lines.join("\n");
}
