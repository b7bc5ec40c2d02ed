import type { CautionRecord } from "./caution.js";

/** What no computation replaces. */
export const licensedPractice: CautionRecord = {
  code: "licensed-practice",
  title: "Codes and licensed practice come first",
  trigger: "always",
  assess: () => ({
    text:
      "These figures are for deciding and discussing. Pressure vessels and piping, relief devices, oxygen service, rotating machinery and electrical work follow the codes of the place and the people licensed for them, whatever is printed here.",
    figures: {},
  }),
};
