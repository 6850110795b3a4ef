/** What each warning of a plan means, from which figure on it is given, and what to do. */
import {
  DEFAULT_NEAR_FIELD_LIMIT,
  EARLY_ZERO_BELOW,
  FREE_ATOM_LIMIT_EV,
  type PlanWarningCode,
  WARNING_LIMITS,
} from "#src/lib/physics/index.ts";

export interface PlanWarning {
  readonly name: string;
  /** The figure from which it is given. */
  readonly from: string;
  readonly means: string;
  readonly remedy: string;
}

const percent = (share: number): string => `${share * 100}\u00a0%`;

export const PLAN_WARNINGS: Readonly<Record<PlanWarningCode, PlanWarning>> = {
  transmissionLow: {
    name: "Little let through",
    from: `T below ${percent(WARNING_LIMITS.transmissionLow)}`,
    means: "Scatter and harmonics, which no plan counts, make up a growing part of what arrives.",
    remedy: "Take a harder energy or a thinner sample.",
  },
  transmissionHigh: {
    name: "Nearly all let through",
    from: `T above ${percent(WARNING_LIMITS.transmissionHigh)}`,
    means: "The host itself hardly shows in the image.",
    remedy: "See whether a softer energy needs less dose.",
  },
  nearEdge: {
    name: "Near an edge",
    from: "closer than 50\u00a0eV, 0.5\u00a0% or one bandwidth",
    means: "Bonds shape the absorption there and free-atom tables do not hold. Never ranked.",
    remedy: "Move further away, or measure the material.",
  },
  belowOneKeV: {
    name: "Low energy",
    from: `E below ${FREE_ATOM_LIMIT_EV / 1000}\u00a0keV`,
    means: "Outer electrons in solids and liquids are not those of free atoms.",
    remedy: "Measure the materials before you rely on the figures.",
  },
  nearFieldLeft: {
    name: "Near field left",
    from: `near-field measure above ${DEFAULT_NEAR_FIELD_LIMIT}; retrieval and tomography`,
    means: "The filter no longer gives a true thickness at fine detail. Ranked only up to the limit that is set.",
    remedy: "Go closer or harder, or look at the images directly.",
  },
  contrastReversal: {
    name: "Contrast turns over",
    from: "near-field measure at χ₁ or above; looking directly",
    means: "Some resolved detail appears bright where coarser detail of the same kind is dark. Not ranked.",
    remedy: "Go closer or harder.",
  },
  linearTheoryLeft: {
    name: "Linear theory left",
    from: `largest contrast of linear theory above ${WARNING_LIMITS.linearContrast}`,
    means: "Contrast is no longer in proportion to the feature’s thickness; signal and dose become estimates.",
    remedy: "Expect another image than planned, or take a shorter distance.",
  },
  thickSample: {
    name: "Thick sample",
    from: "√(λL) above half the blur’s FWHM, or half the pixel where that is larger",
    means: "Waves spread inside the host by as much as the image resolves: it cannot be taken as one thin plane.",
    remedy: "Test a thinner sample, or take the fine detail with caution.",
  },
  refractionShift: {
    name: "Refraction moves edges",
    from: "R′|Δδ| above σ of the blur, or above p/2.355 where that is larger",
    means: "Fringes stand beside the true edges, and linear theory misjudges them.",
    remedy: "Take a shorter distance to measure sizes.",
  },
  nearlyMatched: {
    name: "Nearly matched",
    from: `stated densities move Δδ by more than ${percent(WARNING_LIMITS.nearlyMatched)}`,
    means: "Feature and host delay the wave almost alike: their densities decide what is seen.",
    remedy: "Measure both densities, or change the host.",
  },
  opposedPair: {
    name: "Opposed pair",
    from: `γ < 0 in retrieval and tomography; looking directly, γ between −${EARLY_ZERO_BELOW} and 0`,
    means: "What delays the wave more attenuates it less. The filter of the pair would divide by zero.",
    remedy: "Use the host’s δ/β and expect fringes that stay.",
  },
  phaseWrap: {
    name: "More than half a turn",
    from: "2π|Δδ|d/λ above π; retrieval and tomography",
    means: "Single-material retrieval takes that. Methods that read the phase within one turn do not.",
    remedy: "Keep to single-material retrieval, or take a harder energy.",
  },
  sourceBlur: {
    name: "Source blur",
    from: "the source’s part of σ above the detector’s",
    means: "The source, not the detector, limits the resolution.",
    remedy: "Shorten the distance behind the sample, or take a smaller source.",
  },
  undersampled: {
    name: "Too few pixels",
    from: "p above d/3; of a layer w/3, in a tomography also d/3",
    means: "The feature’s shape is lost between pixels. Never ranked.",
    remedy: "Take smaller pixels or more magnification.",
  },
  countFloor: {
    name: "Count floor",
    from: "the floor asks for more photons than the threshold",
    means: "The least counts in a pixel set the exposure, not the visibility of the feature.",
    remedy: "Do not read the optimum as one of visibility; lower the floor if your detector allows.",
  },
  fewCountsPerProjection: {
    name: "Few counts in a projection",
    from: `below ${WARNING_LIMITS.countsPerProjection} counts in a pixel; tomography`,
    means: "Read noise and offsets of the detector begin to count. Never a limit: the dose is shared out.",
    remedy: "Take fewer projections at the same dose.",
  },
  insideSample: {
    name: "Detector inside the sample",
    from: "R₂ below half the host and the layers behind it",
    means: "The distance is counted from the middle of the sample. Never ranked.",
    remedy: "Take a longer distance.",
  },
};
