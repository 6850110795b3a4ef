/** From a plan as stated (schemas/plan.ts) to one that the physics core ranks. Pure: server, worker and browser resolve alike. */
import {
  DEFAULT_MINIMUM_COUNTS,
  DEFAULT_NEAR_FIELD_LIMIT,
  DEFAULT_TABULATION,
  evFromKev,
  type Grid,
  kevFromEv,
  leastSourceDistanceM,
  type PlanTask,
  planEdges,
  ROSE_THRESHOLD,
  type ScatteringTables,
  type Setup,
  type Shape,
  sorted,
  steps,
  type TabulationKey,
  withEdgeEnergies,
} from "#src/lib/physics/index.ts";
import {
  type MaterialLookup,
  resolveMaterial,
  type ResolvedMaterial,
  StatementError,
} from "#src/lib/materials/resolve.ts";
import {
  type EvaluateRequest,
  type FeatureStatement,
  type RankRequest,
  type StatedSetup,
} from "#src/lib/schemas/plan.ts";
import { PLAN_LIMITS } from "#src/lib/schemas/plan-choices.ts";
import type { MaterialStatement } from "#src/lib/schemas/material.ts";
import { exampleSetup } from "./examples.ts";

export interface ResolvedPlan {
  readonly task: PlanTask;
  readonly feature: ResolvedMaterial;
  readonly host: ResolvedMaterial;
  readonly layers: readonly ResolvedMaterial[];
  /** The setup's figures, whether stated or an example's. */
  readonly setup: Omit<StatedSetup, "energiesKeV" | "distancesM">;
}

// 20 µm are 0.00002 m: the product's last bit is cut.
const metres = (value: number, unit: number): number => Number((value * unit).toPrecision(14));
const UM = 1e-6;
const MM = 1e-3;
// As in constants: 33.1694 keV is 33169.4 eV, and must not cross an edge by its last bit.
const tidyEv = (energyKeV: number): number => Number(evFromKev(energyKeV).toPrecision(14));

/** A fault with its place in the request. */
const fault = (path: string, code: string, message: string): StatementError =>
  new StatementError({ path, code, message });

function materialAt(statement: MaterialStatement, lookup: MaterialLookup, path: string): ResolvedMaterial {
  try {
    return resolveMaterial(statement, lookup);
  } catch (error) {
    if (!(error instanceof StatementError)) throw error;
    const { code, message, position, suggestions } = error;
    throw new StatementError({
      path: path + error.path,
      code,
      message,
      suggestions,
      ...(position === null ? {} : { position }),
    });
  }
}

/** The setup a request means. @throws StatementError setupNotFound */
export function statedSetup(setup: RankRequest["setup"]): StatedSetup;
export function statedSetup(setup: EvaluateRequest["setup"]): ResolvedPlan["setup"];
export function statedSetup(setup: RankRequest["setup"] | EvaluateRequest["setup"]): ResolvedPlan["setup"] {
  if (!("setupId" in setup)) return setup;
  const example = exampleSetup(setup.setupId);
  if (!example)
    throw fault(
      "/setup/setupId",
      "setupNotFound",
      "There is no setup of that id. See /api/v1/setups/examples for those there are.",
    );
  return example.setup;
}

/** Everything but the grid. @throws StatementError with a JSON pointer from the request's root */
export function resolvePlan(request: RankRequest | EvaluateRequest, lookup: MaterialLookup): ResolvedPlan {
  const feature = materialAt(request.feature.material, lookup, "/feature/material");
  const host = materialAt(request.host.material, lookup, "/host/material");
  const layers = (request.layers ?? []).map((layer, index) =>
    materialAt(layer.material, lookup, `/layers/${index}/material`),
  );
  const setup = statedSetup(request.setup as EvaluateRequest["setup"]);
  const task: PlanTask = {
    sample: {
      feature: density(feature),
      shape: shapeOf(request.feature),
      host: density(host),
      hostThicknessM: metres(request.host.thicknessMm, MM),
      layers: (request.layers ?? []).map((layer, index) => ({
        material: layers[index]!.material,
        thicknessM: metres(layer.thicknessMm, MM),
        position: layer.position,
      })),
    },
    setup: instrumentOf(setup, lookup),
    use: request.use as PlanTask["use"],
    threshold: request.threshold ?? ROSE_THRESHOLD,
    minimumCounts: request.minimumCounts ?? DEFAULT_MINIMUM_COUNTS,
    nearFieldLimit: request.nearFieldLimit ?? DEFAULT_NEAR_FIELD_LIMIT,
    projections: request.projections ?? null,
    objective: request.objective ?? "dose",
    limits: {
      doseGy: request.limits?.doseGy ?? null,
      timeS: request.limits?.timeS ?? null,
      transmission: request.limits?.transmission ?? null,
    },
    tabulation: request.tabulation ?? DEFAULT_TABULATION,
  };
  refuseImpossible(task);
  return { task, feature, host, layers, setup };
}

const density = ({ material, densityUncertaintyPercent }: ResolvedMaterial) => ({
  material,
  densityUncertainty: densityUncertaintyPercent / 100,
});

function shapeOf({ shape, sizeUm, lengthUm, widthUm }: FeatureStatement): Shape {
  const sizeM = metres(sizeUm, UM);
  if (shape === "sphere") return { kind: "sphere", sizeM };
  const lengthM = metres(lengthUm ?? 5 * sizeUm, UM);
  return shape === "fibre"
    ? { kind: "fibre", sizeM, lengthM }
    : { kind: "layer", sizeM, lengthM, widthM: metres(widthUm as number, UM) };
}

function instrumentOf(setup: ResolvedPlan["setup"], lookup: MaterialLookup): Setup {
  const { efficiency, fluxPerSMm2: flux } = setup;
  return {
    sourceDistanceM: setup.sourceDistanceM,
    sourceFwhmM: metres(setup.sourceFwhmUm, UM),
    detectorFwhmM: metres(setup.detectorFwhmUm, UM),
    pixelM: metres(setup.pixelUm, UM),
    efficiency:
      efficiency === undefined || efficiency === null
        ? null
        : typeof efficiency === "number"
          ? { kind: "number", value: efficiency }
          : {
              kind: "screen",
              material: materialAt(efficiency.scintillator, lookup, "/setup/efficiency/scintillator").material,
              thicknessM: metres(efficiency.thicknessUm, UM),
            },
    bandwidth: setup.bandwidth ?? 0,
    fluxPerSM2:
      flux === undefined || flux === null
        ? null
        : typeof flux === "number"
          ? flux * 1e6
          : flux.map(([energyKeV, value]) => [tidyEv(energyKeV), value * 1e6] as const),
  };
}

function refuseImpossible(task: PlanTask): void {
  const { sample, setup } = task;
  if (sample.shape.sizeM > sample.hostThicknessM * (1 + 1e-12)) {
    throw fault(
      "/feature/sizeUm",
      "featureTooLarge",
      `The feature is ${sample.shape.sizeM / UM} µm along the beam and does not fit into ${sample.hostThicknessM / MM} mm of host. Make it smaller or the host thicker.`,
    );
  }
  const least = leastSourceDistanceM(task);
  if (setup.sourceDistanceM !== null && setup.sourceDistanceM < least * (1 - 1e-12)) {
    throw fault(
      "/setup/sourceDistanceM",
      "sourceInsideSample",
      `A source ${setup.sourceDistanceM} m from the middle of the sample stands inside it. Half the host and the layers before it reach ${Number(least.toPrecision(4))} m: give at least that.`,
    );
  }
  if (task.objective === "time" && setup.fluxPerSM2 === null)
    throw fault("/objective", "fluxMissing", "Times need the flux. Give fluxPerSMm2, or rank by dose or fluence.");
}

/** Energies and distances of a ranking, edges included. @throws StatementError */
export function resolveGrid(request: RankRequest, task: PlanTask, tables: ScatteringTables): Grid {
  const { energiesKeV, distancesM } = statedSetup(request.setup);
  const energies = Array.isArray(energiesKeV)
    ? sorted(energiesKeV.map(tidyEv))
    : sorted(rangeSteps({ ...energiesKeV, from: tidyEv(energiesKeV.from), to: tidyEv(energiesKeV.to) }));
  refuseOutside(
    energies,
    task.tabulation,
    tables,
    Array.isArray(energiesKeV) ? "/setup/energiesKeV" : "/setup/energiesKeV/from",
  );
  const distances = sorted(Array.isArray(distancesM) ? distancesM : rangeSteps(distancesM));
  if (energies.length * distances.length > PLAN_LIMITS.points) {
    throw fault(
      "/setup/distancesM",
      "planeTooLarge",
      `${energies.length} energies × ${distances.length} distances are ${energies.length * distances.length} points; at most ${PLAN_LIMITS.points} are ranked. Take fewer of either.`,
    );
  }
  const edges = planEdges(task, tables, [energies[0]! / 1.5, energies.at(-1)! * 1.5]);
  return {
    energiesEv: Array.isArray(energiesKeV) ? energies : withEdgeEnergies(energies, edges, task.setup.bandwidth),
    distancesM: distances,
    edges,
  };
}

/** @throws StatementError outsideTable */
export function refuseOutside(
  energiesEv: readonly number[],
  tabulation: TabulationKey,
  tables: ScatteringTables,
  path: string,
): void {
  const [low, high] = tables.tabulations[tabulation].rangeEv;
  const outside = energiesEv.find((energyEv) => energyEv < low || energyEv > high);
  if (outside === undefined) return;
  throw fault(
    path,
    "outsideTable",
    `${kevFromEv(outside)} keV is outside ${tabulation}, which covers ${kevFromEv(low)} to ${kevFromEv(high)} keV; nothing is extrapolated.`,
  );
}

function rangeSteps({
  from,
  to,
  count,
  spacing,
}: {
  from: number;
  to: number;
  count: number;
  spacing?: "log" | "linear" | undefined;
}): number[] {
  return steps(from, to, count, spacing ?? (from > 0 ? "log" : "linear"));
}
