/** Places looked at between the ends, evenly spread. */
const SAMPLES = 16;
/** Width at which a smooth least place is known well enough: its value is then known to the square of this. */
const WIDTH = 1e-7;
const GOLDEN = (3 - Math.sqrt(5)) / 2;

/**
 * The least value of f between two arguments and where it stands: the least of evenly spread samples and of the corners
 * given, refined by golden sections between its neighbours (a corner is known exactly and is not refined).
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
  places.forEach((place, index) => {
    const value = f(place);
    if (value < least) {
      least = value;
      best = index;
    }
  });
  const place = places[best] ?? from;
  const found = { value: least, place };
  const below = places[best - 1];
  const above = places[best + 1];
  for (const [low, high] of corners.includes(place) ? [[below, place], [place, above]] : [[below ?? place, above ?? place]]) {
    if (low === undefined || high === undefined) continue;
    const refined = goldenSections(f, low, high);
    if (refined.value < found.value) Object.assign(found, refined);
  }
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
