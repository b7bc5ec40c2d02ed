import type { Stream } from "../blocks/stream.js";
import { drawnLiquidWarnings, drawnOxygen, separatedLiquid, wetAir } from "./composition.js";
import { NoSteadyState } from "./failure.js";
import type { Network } from "./network.js";
import { audit, type Audit } from "./audit.js";
import type { LoadResult, Station, SteadyState } from "./result.js";
import type { Settled } from "./settle.js";

/** Largest imbalance of a block over the largest energy flow in a converged state. */
const RESIDUAL_LIMIT = 1e-9;
/** Largest first- and second-law imbalance of the whole machine. */
const AUDIT_LIMIT = 1e-8;

/** Everything about a settled machine but what would make it liquefy. */
export type Assembled = Omit<SteadyState, "liquefaction">;

/**
 * Reads a settled network into a result.
 * @param composition whether to find the oxygen in liquid and vapour of wet air
 * @throws NoSteadyState when the accounts do not close or a block's state is impossible
 */
export function assemble(network: Network, settled: Settled, composition: boolean): Assembled {
  const { definition, blocks, inlet } = network;
  for (const { unit } of blocks) {
    const impossible = unit.impossible?.() ?? null;
    if (impossible !== null) throw new NoSteadyState(unit.name, impossible.quantity, impossible.reason, impossible.advice);
  }
  const accounts = audit(network);
  refuseOpenAccounts(accounts);
  const ofAir = composition && definition.fluid === "air";
  const stations = stationsOf(network, accounts, ofAir);
  const coldest = stations.filter(({ massFlow }) => massFlow > 0).reduce((cold, station) => (station.temperature < cold.temperature ? station : cold));
  const loads: LoadResult[] = blocks.flatMap(({ unit }) =>
    unit.refrigeration === undefined ? [] : [{ name: unit.name, ...unit.refrigeration() }],
  );
  const power = powerOf(accounts);
  const capacity = loads.reduce((sum, { heat }) => sum + heat, 0);
  return {
    title: definition.title,
    fluid: definition.fluid,
    circuit: definition.circuit,
    converged: true,
    solver: {
      iterations: settled.iterations,
      residual: accounts.residual,
      otherSteadyStates: settled.otherSteadyStates,
    },
    surroundings: definition.surroundings,
    massFlow: inlet.massFlow,
    coldEnd: { temperature: coldest.temperature, station: coldest.station },
    refrigeration: { capacity, loads },
    power,
    performance: performanceOf(network, accounts, capacity, power.net),
    liquid: network.products.length > 0 ? productOf(network, ofAir) : liquidOf(stations),
    stations,
    blocks: blocks.map(({ unit }) => ({ name: unit.name, kind: unit.kind, ...unit.figures() })),
    audit: { energy: accounts.energy, exergy: accounts.exergy },
    exergy: accounts.destroyed,
    warnings: [...blocks.flatMap(({ unit }) => unit.warnings?.() ?? []), ...drawnLiquidWarnings(network)],
  };
}

function refuseOpenAccounts({ residual, energy, exergy, worstBlock }: Audit): void {
  const advice = "Change a pressure or an efficiency a little and run again; please report the cycle file.";
  if (residual > RESIDUAL_LIMIT) {
    throw new NoSteadyState(worstBlock, "balance", `its energy balance does not close: ${residual.toExponential(1)} of the largest flow.`, advice);
  }
  if (energy > AUDIT_LIMIT || exergy > AUDIT_LIMIT) {
    throw new NoSteadyState(
      null,
      "balance",
      `the audit does not close: first law ${energy.toExponential(1)}, second law ${exergy.toExponential(1)}.`,
      advice,
    );
  }
}

/** State points in the order in which the gas passes them. */
function stationsOf(network: Network, accounts: Audit, ofAir: boolean): Station[] {
  const { definition, labelled, inlet, setting } = network;
  const separated = ofAir ? separatedLiquid(network) : new Set<Stream>();
  const at = (stream: Stream, station: number, after: string): Station => {
    const state = setting.fluid.pressureEnthalpy(stream.pressure, stream.enthalpy, stream.state);
    const wet = ofAir && !separated.has(stream) ? wetAir(stream.pressure, state.vapourFraction) : null;
    return {
      station,
      after,
      temperature: state.temperature,
      pressure: stream.pressure,
      enthalpy: stream.enthalpy,
      entropy: state.entropy,
      density: state.density,
      vapourFraction: Number.isNaN(state.vapourFraction) ? null : state.vapourFraction,
      phase: state.phase,
      liquidOxygen: wet?.liquid.oxygen ?? null,
      vapourOxygen: wet?.vapour.oxygen ?? null,
      massFlow: stream.massFlow,
      exergy: accounts.exergyOf(stream),
    };
  };
  const stations = labelled.map(({ after, stream }, index) => at(stream, index + 1, after));
  return definition.circuit === "open" ? [at(inlet, 0, "intake"), ...stations] : stations;
}

function powerOf({ flows }: Audit): SteadyState["power"] {
  let compression = 0;
  let drive = 0;
  let expansion = 0;
  let recovered = 0;
  for (const flow of flows.values()) {
    if (flow.work > 0) compression += flow.work;
    else expansion -= flow.work;
    drive += flow.drive;
    recovered += flow.recovered ?? 0;
  }
  return { compression, drive, expansion, recovered, net: drive };
}

/** Against a reversible refrigerator that lifts each load's heat from the mean temperature at which the gas takes it up. */
function performanceOf({ blocks, setting }: Network, accounts: Audit, capacity: number, net: number): SteadyState["performance"] {
  const ambient = setting.surroundings.temperature;
  let reversible = 0;
  for (const { unit } of blocks) {
    if (unit.refrigeration === undefined) continue;
    for (const { heat, temperature } of accounts.flows.get(unit.name)?.heat ?? []) reversible += heat * (ambient / temperature - 1);
  }
  const useful = reversible + accounts.productExergy;
  if (net <= 0) return { cop: null, carnotCop: null, secondLawEfficiency: null };
  return {
    cop: capacity > 0 ? capacity / net : null,
    // Loads no colder than the surroundings need no refrigerator: there is no ideal to compare with.
    carnotCop: capacity > 0 && reversible > 0 ? capacity / reversible : null,
    secondLawEfficiency: useful > 0 ? useful / net : null,
  };
}

/** What is drawn as product. */
function productOf(network: Network, ofAir: boolean): SteadyState["liquid"] {
  const { products, inlet } = network;
  const massFlow = products.reduce((sum, stream) => sum + stream.massFlow, 0);
  return massFlow > 0 ? { where: "product", massFlow, fractionOfFlow: massFlow / inlet.massFlow, oxygenMoleFraction: ofAir ? drawnOxygen(network) : null } : null;
}

/** The liquid carried by the wettest station. */
function liquidOf(stations: readonly Station[]): SteadyState["liquid"] {
  let wettest: SteadyState["liquid"] = null;
  for (const { after, vapourFraction, massFlow, liquidOxygen } of stations) {
    const fractionOfFlow = 1 - (vapourFraction ?? 1);
    if (fractionOfFlow > (wettest?.fractionOfFlow ?? 0)) {
      wettest = { where: after, massFlow: massFlow * fractionOfFlow, fractionOfFlow, oxygenMoleFraction: liquidOxygen };
    }
  }
  return wettest;
}
