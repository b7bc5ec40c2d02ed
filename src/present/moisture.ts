import type { Amount, Deposit, Moisture, Removal } from "../cycle/moisture-result.js";
import { fixed, kelvin, percent, significant } from "./numbers.js";
import { textTable } from "./table.js";
import { wrap } from "./wrap.js";

/** Where the water and carbon dioxide of the air taken in go. */
export function moistureText(moisture: Moisture): string {
  const { removals, deposits, fillings } = moisture;
  return [
    wrap(`${brought(moisture)}${left(moisture)}`),
    whereTo(removals, deposits, moisture.source === "first fill"),
    ...fillings.map(({ after, filled, passageVolume, time }) =>
      wrap(
        `${after}: solid ice and frost without pores fill ${percent(filled)} of its ${significant(passageVolume * 1e3, 3)} L in ${significant(time / 3600, 3)} h; ` +
          "what collects is porous, and all in the stretch named, so that it closes sooner.",
      ),
    ),
    ...(deposits.length > 0 ? [wrap(ASSUMED)] : []),
  ]
    .filter((part) => part !== "")
    .join("\n");
}

const ASSUMED = "Ideal mixing; what freezes is taken to stay where it froze.";

const SOURCE: Readonly<Record<Moisture["source"], string>> = {
  intake: "The intake's air brings",
  "make-up": "The make-up air brings",
  "first fill": "Closed circuit: water comes once, with the first fill, and there is no rate. Filled with air of the surroundings, it brings",
};

function brought({ source, fresh }: Moisture): string {
  return `${SOURCE[source]} ${ppm(fresh.water)} of water and ${ppm(fresh.carbonDioxide)} of carbon dioxide (mol per mol of dry air).`;
}

function left({ left: behind }: Moisture): string {
  if (behind === null) return " There is no trap and no dryer.";
  const { after, water, pressureDewPoint, waterClass } = behind;
  if (pressureDewPoint === null) return ` Behind ${after} no water is left.`;
  const rating = waterClass === null ? "wetter than any class of ISO 8573-1" : `ISO 8573-1 water class ${waterClass}`;
  return ` Left behind ${after}: ${ppm(water)} of water, pressure dew point ${fixed(pressureDewPoint - 273.15, 1)} degC (${rating}).`;
}

function ppm(ratio: number): string {
  return `${significant(ratio * 1e6, 3)} ppm`;
}

function stretch({ begins, ends }: Deposit): string {
  if (begins.dutyFraction === null || ends.dutyFraction === null) return "";
  return `${fixed(begins.dutyFraction * 100, 0)}..${fixed(ends.dutyFraction * 100, 0)} %`;
}

const FORM = { water: "ice", carbonDioxide: "CO2 frost" };

function whereTo(removals: readonly Removal[], deposits: readonly Deposit[], once: boolean): string {
  const amount = ({ rate, perFreshAir }: Amount): string[] => [
    ...(once ? [] : [rate === null ? "" : significant(rate * 3.6e6, 3)]),
    significant(perFreshAir * 1e3, 3),
  ];
  const rows = [
    ...removals.map((removal) => [removal.by === "trap" ? "condensate" : "dried out", removal.at, ...amount(removal), kelvin(removal.temperature), "", ""]),
    ...deposits.map((deposit) => [
      FORM[deposit.substance],
      deposit.after,
      ...amount(deposit),
      kelvin(deposit.begins.temperature),
      kelvin(deposit.ends.temperature),
      stretch(deposit),
    ]),
  ];
  if (rows.length === 0) return "Nothing condenses in a trap or freezes.";
  return textTable(
    [
      { heading: "collects", align: "left" },
      { heading: "in", align: "left" },
      ...(once ? [] : [{ heading: "", unit: "g/h" }]),
      { heading: "g per kg", unit: "of fresh air" },
      { heading: "from", unit: "" },
      { heading: "99 % by", unit: "" },
      { heading: "duty from", unit: "warm end" },
    ],
    rows,
  );
}
