/** Places looked at between the ends, evenly spread. */
const SAMPLES = 16;
/** Width at which a smooth least place is known well enough: its value is then known to the square of this. */
const WIDTH = 1e-7;
/** How far beside an end or a corner f is tried, as a share of the way to the next sample. */
const BESIDE = 1e-3;
const GOLDEN = (3 - Math.sqrt(5)) / 2;

/**
 * The least value of f between two arguments and where it stands: the least of evenly spread samples and of the corners
 * given, refined by golden sections between its neighbours. A corner is known exactly and needs refining only where f
 * falls on from it; so does an end.
 */
export function leastOf(
  f: (x: number) => number,
  from: number,
  to: number,
  corners: readonly number[] = [],
): { value: number; place: number } {
  const places = [...corners];
  for (let sample = 0; sample <= SAMPLES; sample++) places.push(from + ((to - from) * sample) / SAMPLES);
  places.sort((a, b) => a - b);
  let best = 0;
  let least = Infinity;
  for (const [index, place] of places.entries()) {
    const value = f(place);
    if (value < least) {
      least = value;
      best = index;
    }
  }
  const place = places[best];
  let found = { value: least, place };
  const below = places[best - 1] ?? place;
  const above = places[best + 1] ?? place;
  const refine = (low: number, high: number): void => {
    const refined = goldenSections(f, low, high);
    if (refined.value < found.value) found = refined;
  };
  if (below < place && above > place && !corners.includes(place)) {
    refine(below, above);
    return found;
  }
  if (below < place && f(place - BESIDE * (place - below)) < least) refine(below, place);
  if (above > place && f(place + BESIDE * (above - place)) < least) refine(place, above);
  return found;
}

function goldenSections(f: (x: number) => number, low: number, high: number): { value: number; place: number } {
  let left = low + GOLDEN * (high - low);
  let right = high - GOLDEN * (high - low);
  let atLeft = f(left);
  let atRight = f(right);
  while (high - low > WIDTH) {
    if (atLeft < atRight) {
      high = right;
      right = left;
      atRight = atLeft;
      left = low + GOLDEN * (high - low);
      atLeft = f(left);
    } else {
      low = left;
      left = right;
      atLeft = atRight;
      right = high - GOLDEN * (high - low);
      atRight = f(right);
    }
  }
  return atLeft < atRight ? { value: atLeft, place: left } : { value: atRight, place: right };
}
