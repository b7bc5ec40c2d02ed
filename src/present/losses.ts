import type { CycleResult } from "../cycle/result.js";
import { fixed } from "./numbers.js";
import { textTable } from "./table.js";

/** Longest bar, of a block that destroys everything. */
const BAR = 40;
/** Below this share a loss decides nothing. */
const LEAST_SHARE = 5e-4;
/** Significant digits of the largest loss; the others have its decimals, so that sizes are seen at a glance. */
const DIGITS = 4;
/** W, the largest loss from which the table is in kW. */
const KILOWATTS = 1e4;

/** Where the power goes, the largest loss first, all in one unit. */
export function lossTable(exergy: CycleResult["exergy"]): string {
  const losses = exergy.filter(({ share }) => share >= LEAST_SHARE).toSorted((a, b) => b.destroyed - a.destroyed);
  if (losses.length === 0) return "nothing is lost: every block is reversible";
  const inKilowatts = losses[0].destroyed >= KILOWATTS;
  const scale = inKilowatts ? 1e-3 : 1;
  const decimals = Math.max(0, DIGITS - 1 - Math.floor(Math.log10(losses[0].destroyed * scale)));
  return textTable(
    [
      { heading: "exergy lost in", align: "left" },
      { heading: "loss", unit: inKilowatts ? "kW" : "W" },
      { heading: "share", unit: "%" },
      { heading: "", align: "left" },
    ],
    losses.map(({ block, destroyed, share }) => [block, fixed(destroyed * scale, decimals), fixed(share * 100, 1), "#".repeat(Math.round(share * BAR))]),
  );
}
