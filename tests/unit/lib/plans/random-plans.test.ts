/** Random plans with a fixed seed: what must hold of every ranking, whatever is asked. */
import fc from "fast-check";
import { expect, it } from "vitest";
import { committedTables } from "#data/build/committed-tables.ts";
import { candidateSchema, rankAnswerSchema, type Candidate, type RankAnswer } from "#src/lib/schemas/plan-answer.ts";
import { type RankRequest, rankRequestSchema } from "#src/lib/schemas/plan.ts";
import { evaluatePlan, rankPlanRequest } from "#src/lib/services/plans.ts";

const tables = committedTables();
const lookup = (): null => null;

const material = fc.constantFrom(
  { formula: "H2O", densityGCm3: 1 },
  { formula: "C5H8O2", densityGCm3: 1.19, densityUncertaintyPercent: 3 },
  { formula: "Ca5(PO4)3OH", densityGCm3: 3.16 },
  { formula: "N2", densityGCm3: 0.0012 },
  { formula: "Al", densityGCm3: 2.7 },
  { formula: "KI", densityGCm3: 3.12 },
  { formula: "Au", densityGCm3: 19.3 },
  { formula: "C2H4", densityGCm3: 0.93 },
  { formula: "SiO2", densityGCm3: 2.2 },
);
/** Even in the logarithm; doubles themselves would crowd at the small end. */
const log = (low: number, high: number) =>
  fc.integer({ min: 0, max: 10_000 }).map((step) => Number((low * (high / low) ** (step / 10_000)).toPrecision(4)));
const seldom = <T>(arbitrary: fc.Arbitrary<T>): fc.Arbitrary<T | null> =>
  fc.tuple(fc.integer({ min: 0, max: 3 }), arbitrary).map(([draw, value]) => (draw === 0 ? value : null));

const light = fc.constantFrom(
  { formula: "H2O", densityGCm3: 1 },
  { formula: "N2", densityGCm3: 0.0012 },
  { formula: "C2H4", densityGCm3: 0.93 },
  { formula: "Al", densityGCm3: 2.7 },
  { formula: "SiO2", densityGCm3: 2.2 },
  { formula: "Au", densityGCm3: 19.3 },
);

const request: fc.Arbitrary<RankRequest> = fc
  .record({
    feature: material,
    host: light,
    shape: fc.constantFrom("sphere", "fibre", "layer"),
    sizeUm: log(0.3, 400),
    widthUm: log(0.3, 400),
    thicknessMm: log(0.5, 30),
    layers: fc.array(fc.record({ material, thicknessMm: log(0.01, 3), position: fc.constantFrom("before", "after") }), {
      maxLength: 3,
    }),
    sourceDistanceM: fc.option(log(0.12, 100)),
    sourceFwhmUm: log(0.5, 300),
    blurShare: log(0.3, 3),
    pixelShare: log(0.05, 0.5),
    efficiency: fc.option(log(0.05, 1)),
    bandwidth: fc.constantFrom(0, 0, 0.0002, 0.02, 0.3),
    flux: fc.option(log(1e4, 1e12)),
    low: log(5, 40),
    span: log(1.2, 6),
    far: log(0.05, 10),
    use: fc.constantFrom("absorption", "direct", "retrieval", "tomography"),
    objective: fc.constantFrom("dose", "dose", "fluence", "time"),
    doseGy: seldom(log(1e-1, 1e8)),
    timeS: seldom(log(1e-1, 1e6)),
    transmission: seldom(fc.constant([0.1, 0.9] as [number, number])),
    minimumCounts: fc.constantFrom(undefined, 0, 1000),
    tabulation: fc.constantFrom(undefined, undefined, "chantler95"),
  })
  .map((draw): unknown => ({
    feature: {
      material: draw.feature,
      shape: draw.shape,
      sizeUm: Math.min(draw.sizeUm, draw.thicknessMm * 1000),
      ...(draw.shape === "layer" ? { widthUm: draw.widthUm } : {}),
    },
    host: { material: draw.host, thicknessMm: draw.thicknessMm },
    layers: draw.layers,
    setup: {
      sourceDistanceM: draw.sourceDistanceM,
      sourceFwhmUm: draw.sourceFwhmUm,
      detectorFwhmUm: Number((draw.blurShare * draw.pixelShare * draw.sizeUm).toPrecision(4)),
      pixelUm: Number(
        (
          draw.pixelShare * (draw.shape === "layer" ? draw.widthUm : Math.min(draw.sizeUm, draw.thicknessMm * 1000))
        ).toPrecision(4),
      ),
      efficiency: draw.efficiency,
      bandwidth: draw.bandwidth,
      fluxPerSMm2: draw.objective === "time" ? (draw.flux ?? 1e8) : draw.flux,
      energiesKeV: { from: draw.low, to: Number((draw.low * draw.span).toPrecision(4)), count: 9 },
      distancesM: { from: 0.01, to: draw.far, count: 7 },
    },
    use: draw.use,
    objective: draw.objective,
    ...(draw.minimumCounts === undefined ? {} : { minimumCounts: draw.minimumCounts }),
    ...(draw.tabulation === undefined ? {} : { tabulation: draw.tabulation }),
    limits: {
      ...(draw.doseGy === null ? {} : { doseGy: draw.doseGy }),
      ...(draw.timeS === null ? {} : { timeS: draw.timeS }),
      ...(draw.transmission ? { transmission: draw.transmission } : {}),
    },
  }))
  .map((value) => rankRequestSchema.parse(value));

const plans = fc.sample(request, { numRuns: 300, seed: 20 });
const answers = plans.map((plan) => ({ plan, answer: rankPlanRequest(plan, tables, lookup) }));

const thinHost = ({ host }: RankRequest): boolean => (host.material as { densityGCm3: number }).densityGCm3 < 0.01;
const doseOf = (plan: RankRequest, { entranceDoseGy, featureDoseGy }: Candidate): number | null =>
  thinHost(plan) ? featureDoseGy : entranceDoseGy;
const objectiveOf = (plan: RankRequest, candidate: Candidate): number | null => {
  if (plan.objective === "time") return candidate.timeS;
  return plan.objective === "fluence" ? candidate.fluencePerUm2 : doseOf(plan, candidate);
};
const at = (plane: RankAnswer["plane"], { energyKeV, distanceM }: Candidate): readonly [number, number] => [
  plane.energiesKeV.indexOf(energyKeV),
  plane.distancesM.indexOf(distanceM),
];

it("answers fit their schema: no NaN, no value that JSON cannot hold", () => {
  for (const { answer } of answers) {
    expect(rankAnswerSchema.safeParse(JSON.parse(JSON.stringify(answer))).error?.issues ?? []).toEqual([]);
    expect(JSON.stringify(answer)).not.toMatch(/NaN|Infinity|undefined/);
  }
  // The sample is worth its name: every kind of verdict, every use.
  expect(new Set(answers.map(({ answer }) => answer.verdict.choice))).toEqual(
    new Set(["phase", "absorption", "either", "none"]),
  );
});

it("candidates are sorted by the objective, at most twelve, and at least 15 % apart", () => {
  for (const { plan, answer } of answers) {
    const values = answer.candidates.map((candidate) => objectiveOf(plan, candidate)!);
    expect(values).toEqual([...values].sort((a, b) => a - b));
    expect(values.length).toBeLessThanOrEqual(12);
    const near = (a: number, b: number): boolean => Math.max(a, b) / Math.min(a, b) <= 1.15;
    for (const [index, one] of answer.candidates.entries())
      for (const other of answer.candidates.slice(index + 1))
        expect(near(one.energyKeV, other.energyKeV) && near(one.distanceM, other.distanceM)).toBe(false);
  }
});

it("no forbidden point is listed, and the first candidate is the plane's least", () => {
  for (const { plan, answer } of answers) {
    const { plane, candidates } = answer;
    for (const candidate of candidates) {
      const [i, j] = at(plane, candidate);
      expect(candidate.allowed).toBe(true);
      expect(plane.allowed[i]![j]).toBe(true);
      expect(plane.forbiddenBy[i]![j]).toBeNull();
      expect(plane.objective[i]![j]!).toAgreeWithin(objectiveOf(plan, candidate)!, 1e-12);
    }
    const allowed = plane.objective.flatMap((row, i) => row.filter((_, j) => plane.allowed[i]![j])) as number[];
    if (candidates[0]) expect(objectiveOf(plan, candidates[0])!).toAgreeWithin(Math.min(...allowed), 1e-12);
    else expect(allowed).toEqual([]);
  }
});

it("the verdict agrees with the numbers", () => {
  for (const { plan, answer } of answers) {
    const { verdict, candidates, absorptionBest } = answer;
    const [first] = candidates;
    if (!first) {
      expect(verdict).toMatchObject({ choice: "none", doseAdvantage: null });
      continue;
    }
    if (plan.use === "absorption") {
      expect(verdict).toMatchObject({ choice: "absorption", doseAdvantage: null });
      continue;
    }
    if (!absorptionBest) {
      expect(verdict.choice).toBe("phase");
      continue;
    }
    const ratio = objectiveOf(plan, absorptionBest)! / objectiveOf(plan, first)!;
    expect(verdict.choice).toBe(ratio > 1.25 ? "phase" : ratio < 0.8 ? "absorption" : "either");
    const doses = [doseOf(plan, absorptionBest), doseOf(plan, first)];
    if (doses[0] && doses[1]) expect(verdict.doseAdvantage!).toAgreeWithin(doses[0] / doses[1], 1e-12);
    else expect(verdict.doseAdvantage).toBeNull();
    expect(verdict.summary).toContain(
      { phase: "Use phase contrast", absorption: "Use absorption", either: "Either works", none: "" }[verdict.choice],
    );
  }
});

it("evaluate gives each candidate's figures again", () => {
  let compared = 0;
  for (const { plan, answer } of answers) {
    for (const candidate of answer.candidates.slice(0, 2)) {
      const {
        energiesKeV: _,
        distancesM: __,
        ...setup
      } = plan.setup as Exclude<RankRequest["setup"], { setupId: string }>;
      const { candidate: again } = evaluatePlan(
        { ...plan, setup, energyKeV: candidate.energyKeV, distanceM: candidate.distanceM },
        tables,
        lookup,
      );
      expect(candidateSchema.parse(again)).toEqual({ ...candidate, why: [], plateau: null, agreesInAllTables: null });
      compared++;
    }
  }
  expect(compared).toBeGreaterThan(150);
});

it("absorption's best is never worse than absorption at any point that place allows", () => {
  let compared = 0;
  for (const { plan, answer } of answers) {
    const { absorptionBest, candidates } = answer;
    for (const candidate of candidates) {
      const alone = plan.use === "absorption" ? objectiveOf(plan, candidate) : absorptionObjective(plan, candidate);
      if (alone === null) continue;
      expect(objectiveOf(plan, absorptionBest!)!).toBeLessThanOrEqual(alone * (1 + 1e-12));
      compared++;
    }
  }
  expect(compared).toBeGreaterThan(500);
});

/** The objective of absorption at a candidate's point, from its own figures. */
function absorptionObjective(plan: RankRequest, candidate: Candidate): number | null {
  const { absorptionFluencePerUm2: fluence, fluencePerUm2 } = candidate;
  if (fluence === null || !fluencePerUm2) return null;
  const own = objectiveOf(plan, candidate);
  return own === null ? null : (own * fluence) / fluencePerUm2;
}

it("warnings and what forbids a point do not contradict each other", () => {
  for (const { answer } of answers) {
    for (const { warnings } of answer.candidates) {
      const codes = warnings.map(({ code }) => code);
      expect(new Set(codes).size).toBe(codes.length);
      for (const never of ["insideSample", "undersampled", "contrastReversal", "nearFieldLeft", "nearEdge"])
        expect(codes).not.toContain(never);
      for (const { message } of warnings) expect(message).toMatch(/^[A-Z0-9].*\.$/s);
    }
  }
});
