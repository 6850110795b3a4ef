/** What each warning of a plan says: what was found, the limit, what to do. */
import { FWHM_PER_SIGMA, type Check } from "#src/lib/physics/index.ts";
import { distanceText, energyText, lengthText, percentText, rounded } from "#src/lib/format/plan-quantities.ts";

/** One or two sentences. `host` and `feature` are the materials' short names. */
export function warningText({ code, value, limit, edge }: Check, names: { feature: string; host: string }): string {
  switch (code) {
    case "transmissionLow":
      return `The sample lets ${percentText(value)} through; below 10 % scatter and harmonics begin to count. Take a harder energy or a thinner sample.`;
    case "transmissionHigh":
      return `The sample lets ${percentText(value)} through; above 90 % the host itself hardly shows. A softer energy may need less dose.`;
    case "nearEdge":
      return `${rounded(value)} eV from ${edge ? `${edge.element} ${edge.shell} (${energyText(edge.energyEv / 1000)})` : "an edge"}: free-atom tables do not hold there. Move further away, or measure the material.`;
    case "belowOneKeV":
      return "Below 1 keV bonding and structure change what free-atom tables say. Measure the materials.";
    case "nearFieldLeft":
      return `Near-field measure ${rounded(value)}; quantitative retrieval needs ${limit} or less. Go closer or harder, or look at the images directly.`;
    case "contrastReversal":
      return `Contrast turns over within the resolved band (phase ${rounded(value)} rad, first zero at ${rounded(limit)}). Go closer or harder for images that are looked at.`;
    case "linearTheoryLeft":
      return `The largest contrast is ${percentText(value)}; linear theory holds up to ${percentText(limit)}. Expect a stronger image than planned, or take a shorter distance.`;
    case "thickSample":
      return `Waves spread by ${lengthText(value)} within the host, more than half the resolution (${lengthText(limit)}). The thin-sample picture is doubtful: test a thinner one.`;
    case "refractionShift":
      return `Refraction moves edges by ${lengthText(value)}, more than the blur of ${lengthText(limit)}. Fringes sit beside the true edges: take a shorter distance to measure sizes.`;
    case "nearlyMatched":
      return `Nearly matched: the stated densities move the phase contrast by ${value < 10 ? percentText(value) : "more than ten times itself"}. Measure the density of ${names.host} and ${names.feature}, or change the host.`;
    case "opposedPair":
      return `Opposed pair (γ ${rounded(value)}): where ${names.feature} shifts phase more it absorbs less. Single-material retrieval has a pole for this pair: use δ/β of ${names.host} and expect residual fringes.`;
    case "phaseWrap":
      return `The feature shifts the phase by ${rounded(value)} rad, more than half a turn. Single-material retrieval takes that; methods that read the phase within one turn do not.`;
    case "sourceBlur":
      return `The source blurs more (${lengthText(value * FWHM_PER_SIGMA)}) than the detector (${lengthText(limit * FWHM_PER_SIGMA)}). A shorter distance behind the sample, or a smaller source, sharpens the image.`;
    case "undersampled":
      return `Pixels of ${lengthText(value)} in the sample are too large: ${limit > 0 ? `three must fit across the feature, ${lengthText(limit)} at most` : "three must fit across the feature"}. Take smaller pixels or more magnification.`;
    case "countFloor":
      return `The floor of ${rounded(limit)} counts in a pixel decides the exposure, not the visibility of the feature. The least-dose energy may therefore be one of a poor detector.`;
    case "fewCountsPerProjection":
      return `${rounded(value)} counts in a pixel of one projection; below ${limit} read noise and offsets begin to count. Take fewer projections at the same dose.`;
    case "insideSample":
      return `At ${distanceText(value)} from the middle of the sample the detector would stand inside it or its layers.`;
  }
}
