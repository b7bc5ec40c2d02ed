import type { CycleDefinition } from "../cycle/definition.js";
import { buildNetwork } from "../cycle/network.js";
import type { Station } from "../cycle/result.js";
import type { ResultQuantity } from "./quantities.js";

/** What can be asked of a station, as "station-3.temperature". */
const OF_A_STATION: readonly (Pick<ResultQuantity, "name" | "dimension" | "help" | "needs"> & { get(station: Station): number | null })[] = [
  { name: "temperature", dimension: "temperature", help: "temperature", get: ({ temperature }) => temperature },
  { name: "pressure", dimension: "pressure", help: "pressure", get: ({ pressure }) => pressure },
  { name: "enthalpy", dimension: "specific enthalpy", help: "enthalpy", get: ({ enthalpy }) => enthalpy },
  { name: "exergy", dimension: "specific enthalpy", help: "exergy", get: ({ exergy }) => exergy },
  { name: "vapour-fraction", dimension: "fraction", help: "vapour over the whole, by mass", get: ({ vapourFraction }) => vapourFraction },
  { name: "mass-flow", dimension: "mass flow", help: "flow", get: ({ massFlow }) => massFlow },
  { name: "liquid-oxygen", dimension: "fraction", help: "oxygen in the liquid of wet air, by mole", needs: { composition: true }, get: ({ liquidOxygen }) => liquidOxygen },
];

/** The numbers of every station of a machine, numbered as in its state-point table. */
export function stationQuantities(definition: CycleDefinition): ResultQuantity[] {
  const first = definition.circuit === "open" ? 0 : 1;
  const last = buildNetwork(definition).labelled.length;
  return Array.from({ length: last - first + 1 }, (_, i) => first + i).flatMap((number) =>
    OF_A_STATION.map(
      ({ get, name, help, ...rest }): ResultQuantity => ({
        ...rest,
        name: `station-${number}.${name}`,
        help: `${help} at station ${number}`,
        get: ({ stations }) => {
          const station = stations.find((each) => each.station === number);
          return station === undefined ? null : get(station);
        },
      }),
    ),
  );
}
