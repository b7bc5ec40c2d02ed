import { fluid as fluidNamed } from "../fluids/registry.js";
import type { CautionRecord } from "./caution.js";

/** Oxygen fractions: of air, and the one below which a room counts as deficient (29 CFR 1910.146(b)). */
const AIR = 0.2096;
const DEFICIENT = 0.195;

/** A working gas that displaces air. */
export const asphyxiation: CautionRecord = {
  code: "asphyxiation",
  title: "Asphyxiation",
  trigger: "the working fluid is none that can be breathed",
  assess({ fluid, surroundings }) {
    if (fluid === "air" || fluid === "oxygen") return null;
    const share = 1 - DEFICIENT / AIR;
    const perKilogram = 1 / fluidNamed(fluid).at({ temperature: surroundings.temperature, pressure: surroundings.pressure }).density;
    return {
      text:
        `${fluid.charAt(0).toUpperCase()}${fluid.slice(1)} cannot be breathed and gives no warning. One kilogram let out makes ${perKilogram.toFixed(2)} m3; where it replaces ${(share * 100).toFixed(0)} % of a room's air, ` +
        `oxygen falls below ${DEFICIENT * 100} % (29 CFR 1910.146(b)). Ventilate, lead relief and vent lines outdoors, and keep an oxygen alarm where people work.`,
      figures: { gasVolumePerKilogram: perKilogram, deficientLimit: DEFICIENT, shareOfRoom: share },
    };
  },
};
