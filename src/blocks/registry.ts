import { aftercooler } from "./aftercooler.js";
import { compressor } from "./compressor.js";
import { expander } from "./expander.js";
import type { BlockKind } from "./kind.js";
import { line } from "./line.js";
import { load } from "./load.js";
import { mixer } from "./mixer.js";
import { precooler } from "./precooler.js";
import { product } from "./product.js";
import { recuperator } from "./recuperator.js";
import { separator } from "./separator.js";
import { splitter } from "./splitter.js";
import { valve } from "./valve.js";

/** Every block kind, in the order in which help and docs list them. */
export const blockKinds: readonly BlockKind[] = [
  compressor,
  aftercooler,
  precooler,
  recuperator,
  expander,
  valve,
  load,
  line,
  splitter,
  mixer,
  separator,
  product,
];

const byName = new Map(blockKinds.map((kind) => [kind.kind, kind]));

/** The record of a kind, or undefined for a name that is none. */
export function blockKind(name: string): BlockKind | undefined {
  return byName.get(name);
}
