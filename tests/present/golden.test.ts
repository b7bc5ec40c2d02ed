import { describe, expect, it } from "vitest";
import { jsonText } from "../../src/present/json.js";
import { report } from "../../src/present/report.js";
import { stationTable } from "../../src/present/stations.js";
import { fixture, fixtureDefinition } from "./fixture.js";

/** Text as it was looked at and found good; `npx vitest run tests/present -u` renews it, to be looked at again. */
describe("the text of a made-up result", () => {
  it.each([
    ["report.txt", report(fixtureDefinition, fixture, false)],
    ["points.txt", stationTable(fixture.stations)],
    ["points.csv", stationTable(fixture.stations, "csv")],
    ["points.md", stationTable(fixture.stations, "md")],
  ])("%s", async (file, text) => {
    await expect(`${text}\n`).toMatchFileSnapshot(`golden/${file}`);
  });
});

describe("the JSON of a result", () => {
  it("is the result, every digit of it", () => {
    expect(JSON.parse(jsonText(fixture))).toEqual(fixture);
  });

  it.each([NaN, Infinity, -Infinity])("is refused where a number in it is %s", (value) => {
    expect(() => jsonText({ ...fixture, blocks: [{ name: "X", kind: "valve", list: [1, value] }] })).toThrow(/NaN|Infinity/);
  });
});
