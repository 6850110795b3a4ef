/**
 * Example setups: invented instruments with figures such as beamlines and laboratories have. Energies, distances and blur are
 * ranges of common practice; no real facility is meant.
 */
import type { StatedSetup } from "#src/lib/schemas/plan.ts";

export interface ExampleSetup {
  readonly id: string;
  readonly name: string;
  /** One line on what it stands for. */
  readonly about: string;
  readonly setup: StatedSetup;
}

export const EXAMPLE_SETUPS: readonly ExampleSetup[] = [
  {
    id: "fine-parallel",
    name: "Fine parallel beam",
    about: "High resolution: 1 µm pixels on a thin screen, 30 m from a 50 µm source, crystal monochromator.",
    setup: {
      sourceDistanceM: 30,
      sourceFwhmUm: 50,
      detectorFwhmUm: 2,
      pixelUm: 1,
      bandwidth: 0.00014,
      fluxPerSMm2: 1e11,
      energiesKeV: { from: 8, to: 40, count: 72 },
      distancesM: { from: 0.003, to: 3, count: 64 },
    },
  },
  {
    id: "long-beamline",
    name: "Long beamline",
    about: "Large objects at medium energies: 10 µm pixels, up to 12 m behind the sample, multilayer monochromator.",
    setup: {
      sourceDistanceM: 120,
      sourceFwhmUm: 150,
      detectorFwhmUm: 18,
      pixelUm: 10,
      bandwidth: 0.01,
      fluxPerSMm2: 2e10,
      energiesKeV: { from: 18, to: 90, count: 64 },
      distancesM: { from: 0.05, to: 12, count: 56 },
    },
  },
  {
    id: "microfocus-cabinet",
    name: "Microfocus cabinet",
    about: "Laboratory cone beam: 5 µm source, sample 5 cm from it, flat detector with 100 µm pixels, broad spectrum.",
    setup: {
      sourceDistanceM: 0.05,
      sourceFwhmUm: 5,
      detectorFwhmUm: 200,
      pixelUm: 100,
      bandwidth: 0.3,
      energiesKeV: { from: 25, to: 100, count: 56 },
      distancesM: { from: 0.05, to: 1, count: 48 },
    },
  },
];

export const exampleSetup = (id: string): ExampleSetup | null =>
  EXAMPLE_SETUPS.find((setup) => setup.id === id) ?? null;
