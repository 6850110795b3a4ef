/** The plane of a plan: 120 energies × 120 distances for each shape, beside the same loops in C and NumPy; whole rankings. */
import {
  bandSums,
  beamsOf,
  compositionOfFormula,
  computePlane,
  frequencyBand,
  geometryAt,
  type Grid,
  parseFormula,
  planEdges,
  type PlanTask,
  rankPlan,
  type ScatteringTables,
  type Shape,
  steps,
  withDensity,
  withEdgeEnergies,
} from "#src/lib/physics/index.ts";
import { runLoops } from "./plane-loops.ts";

type Say = (what: string, figure: string, aim?: string) => void;

const matter = (formula: string, densityKgPerM3: number) => ({
  material: withDensity(compositionOfFormula(parseFormula(formula)), densityKgPerM3),
  densityUncertainty: 0.01,
});
const SIZE = { sizeM: 20e-6, widthM: 20e-6, lengthM: 100e-6 };
const SHAPES: Readonly<Record<Shape["kind"], Shape>> = {
  sphere: { kind: "sphere", sizeM: SIZE.sizeM },
  fibre: { kind: "fibre", sizeM: SIZE.sizeM, lengthM: SIZE.lengthM },
  layer: { kind: "layer", ...SIZE },
};
const GEOMETRY = { sourceDistanceM: 30, sourceFwhmM: 50e-6, detectorFwhmM: 2e-6, pixelM: 1e-6 };

function planOf(shape: Shape, more: Partial<PlanTask> = {}): PlanTask {
  return {
    sample: { feature: matter("C5H8O2", 1190), shape, host: matter("H2O", 1000), hostThicknessM: 5e-3, layers: [] },
    setup: { ...GEOMETRY, efficiency: null, bandwidth: 0, fluxPerSM2: null },
    use: "direct",
    threshold: 5,
    minimumCounts: 100,
    nearFieldLimit: 0.8,
    projections: null,
    objective: "dose",
    limits: { doseGy: null, timeS: null, transmission: null },
    tabulation: "epdl97",
    ...more,
  };
}

const grid = (energies: number, distances: number): Grid => ({
  energiesEv: steps(8000, 60_000, energies, "log"),
  distancesM: steps(0.003, 3, distances, "log"),
  edges: [],
});

function median(times: number, work: () => unknown): number {
  const took = Array.from({ length: times }, () => {
    const begun = performance.now();
    work();
    return performance.now() - begun;
  });
  return took.sort((a, b) => a - b)[Math.floor(times / 2)]!;
}

const ms = (value: number): string => `${value.toFixed(value < 10 ? 2 : 1)} ms`;

export async function planes(tables: ScatteringTables, say: Say): Promise<void> {
  const square = grid(120, 120);
  const beams = beamsOf(planOf(SHAPES.sphere), square.energiesEv, tables, "epdl97").map((beam) => beam!);
  const loops = await runLoops({
    ...SIZE,
    geometry: GEOMETRY,
    wavelengthsM: beams.map(({ wavelengthM }) => wavelengthM),
    deltaDelta: beams.map(({ deltaDelta }) => deltaDelta),
    deltaBeta: beams.map(({ deltaBeta }) => deltaBeta),
    distancesM: square.distancesM,
    intervals: 400,
  });
  for (const [name, shape] of Object.entries(SHAPES) as [Shape["kind"], Shape][]) {
    // The signals alone, as the loops compute them; then the plane with doses and what forbids each point.
    const signals = (): Float64Array => {
      const values = new Float64Array(120 * 120);
      const sums = { first: 0, second: 0 };
      for (const [j, distanceM] of square.distancesM.entries()) {
        const geometry = geometryAt(GEOMETRY, distanceM);
        const band = frequencyBand("signal", shape, geometry)!;
        for (const [i, beam] of beams.entries())
          values[i * 120 + j] = bandSums(band, beam, geometry.effectiveDistanceM, 0, sums).first;
      }
      return values;
    };
    const own = median(9, signals);
    say(`Signals of 120 × 120 points, ${name}`, ms(own), "40 ms");
    for (const [language, result] of Object.entries(loops)) {
      if (!result) {
        say(`  the same loops in ${language}`, "not installed");
        continue;
      }
      const took = result.milliseconds[name];
      const values = result.values?.[name];
      const apart = values ? Math.max(...signals().map((value, place) => Math.abs(value / values[place]! - 1))) : null;
      say(
        `  the same loops in ${language === "c" ? "C, gcc -O3" : "NumPy"}`,
        ms(took),
        `half of it (${(took / own).toFixed(1)} × as long${apart === null ? "" : `, values within ${(apart * 100).toFixed(3)} %`})`,
      );
    }
    const plan = planOf(shape);
    say(`  the plane with doses and reasons`, ms(median(5, () => computePlane(plan, square, tables))));
    for (const use of ["retrieval", "tomography"] as const)
      say(`  the same for ${use}`, ms(median(5, () => computePlane(planOf(shape, { use }), square, tables))));
  }
  say(
    "Ranking of 120 × 120 points, all three tables, shortlist",
    ms(median(3, () => rankPlan(planOf(SHAPES.fibre), square, tables))),
  );
  const wide = planOf(SHAPES.layer, { use: "tomography" });
  const worst = { ...wide, setup: { ...wide.setup, bandwidth: 0.6 } };
  const rectangle = grid(200, 100);
  const edges = planEdges(worst, tables, [8000, 60_000]);
  const full: Grid = { ...rectangle, energiesEv: withEdgeEnergies(rectangle.energiesEv, edges, 0.6), edges };
  say(
    "Worst legal ranking: 20,000 points, layer in tomography, 60 % bandwidth",
    ms(median(1, () => rankPlan(worst, full, tables))),
    "2 s, in a worker",
  );
}
