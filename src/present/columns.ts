import type { Stop } from "./machine-stops.js";

/** Two stops above each other: of the gas on its way out, and of the gas on its way back. */
export interface StopColumn {
  readonly out?: Stop;
  readonly back?: Stop;
}

/**
 * A line folded where the gas turns back: at the first cold side whose warm side it has passed. Each cold side stands beneath
 * its warm side where the order in which the gas meets them allows it.
 */
export function folded(stops: readonly Stop[]): StopColumn[] {
  const partner = (stop: Stop): number => (stop.back === true ? stops.findIndex(({ sideOf, back }) => sideOf === stop.sideOf && back !== true) : -1);
  const fold = stops.findIndex((stop, i) => partner(stop) >= 0 && partner(stop) < i);
  if (fold < 0) return stops.map((out) => ({ out }));
  const out = stops.slice(0, fold);
  const back = stops.slice(fold);
  const columns: StopColumn[] = [];
  let outTaken = 0;
  let backLeft = back.length;
  for (const [outAt, backAt] of pairsOf(back, partner).toReversed()) {
    columns.push(...sideBySide(out.slice(outTaken, outAt), back.slice(backAt + 1, backLeft).toReversed()), { out: out[outAt], back: back[backAt] });
    outTaken = outAt + 1;
    backLeft = backAt;
  }
  return [...columns, ...sideBySide(out.slice(outTaken), [])];
}

/** Places of the two sides that can stand in one column, in the order of the way back. */
function pairsOf(back: readonly Stop[], partner: (stop: Stop) => number): [out: number, back: number][] {
  const pairs: [number, number][] = [];
  let limit = Infinity;
  back.forEach((stop, i) => {
    const at = partner(stop);
    if (at < 0 || at >= limit) return;
    pairs.push([at, i]);
    limit = at;
  });
  return pairs;
}

function sideBySide(out: readonly Stop[], back: readonly Stop[]): StopColumn[] {
  return Array.from({ length: Math.max(out.length, back.length) }, (_, i) => ({ out: out[i], back: back[i] }));
}
