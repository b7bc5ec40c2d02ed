import type { CautionRecord } from "./caution.js";

/** Ice and carbon dioxide frost close passages from inside. */
export const frost: CautionRecord = {
  code: "frost",
  title: "Ice and carbon dioxide frost in the passages",
  trigger: "water or carbon dioxide of the air taken in freezes out in a block",
  assess({ moisture }) {
    if (moisture === null || moisture === undefined || moisture.deposits.length === 0) return null;
    const { deposits, fillings } = moisture;
    const perFreshAir = (substance: string): number =>
      deposits.filter((deposit) => deposit.substance === substance).reduce((sum, deposit) => sum + deposit.perFreshAir, 0);
    const figures = { icePerFreshAir: perFreshAir("water"), carbonDioxideFrostPerFreshAir: perFreshAir("carbonDioxide") };
    const where = [...new Set(deposits.map(({ after }) => after))].join(", ");
    const soonest = Math.min(...fillings.map(({ time }) => time));
    return {
      text:
        `Freezes out in ${where}: of each kg of fresh air ${grams(figures.icePerFreshAir)} of ice and ${grams(figures.carbonDioxideFrostPerFreshAir)} of carbon dioxide frost. It closes passages and ` +
        "nozzles, hits a wheel as grains, and can block the way to a relief valve. Dry the air and take out its carbon dioxide, or thaw in time; a blocked cold section that warms up " +
        "is a closed vessel.",
      figures: Number.isFinite(soonest) ? { ...figures, fillingTime: soonest } : figures,
    };
  },
};

function grams(kilograms: number): string {
  return `${Number((kilograms * 1e3).toPrecision(2))} g`;
}
