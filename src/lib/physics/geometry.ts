/**
 * Geometry of projection (PHYSICS 4): magnification, effective distance, blur and sampling in the plane of the sample.
 * Lengths in m, spatial frequencies in 1/m.
 */

/** FWHM of a Gaussian over its standard deviation, 2 √(2 ln 2). */
export const FWHM_PER_SIGMA = 2 * Math.sqrt(2 * Math.LN2);

/** What the geometry of a setup is made of. */
export interface Projection {
  /** Source to the middle of the sample; null for a parallel beam. */
  readonly sourceDistanceM: number | null;
  readonly sourceFwhmM: number;
  /** Blur of screen and optics, without the pixel. */
  readonly detectorFwhmM: number;
  readonly pixelM: number;
}

export interface Geometry {
  /** Middle of the sample to detector, R2. */
  readonly distanceM: number;
  /** M = (R1 + R2)/R1. */
  readonly magnification: number;
  /** R' = R2/M. */
  readonly effectiveDistanceM: number;
  /** The source's and the detector's parts of the blur, standard deviations in the plane of the sample. */
  readonly sourceSigmaM: number;
  readonly detectorSigmaM: number;
  readonly sigmaM: number;
  /** p = p_det/M. */
  readonly pixelM: number;
  /** u_N = 1/(2p). */
  readonly nyquistPerM: number;
  /** u_res: the smaller of u_N and the frequency at which the transfer falls to 0.1. */
  readonly resolutionPerM: number;
}

/** Transfer at which detail counts as lost. */
const RESOLVED_TRANSFER = 0.1;

/** Geometry at a distance R2 ≥ 0. At R2 = 0: M = 1, R' = 0, no blur by the source. */
export function geometryAt(projection: Projection, distanceM: number): Geometry {
  const { sourceDistanceM, sourceFwhmM, detectorFwhmM } = projection;
  const magnification = sourceDistanceM === null ? 1 : (sourceDistanceM + distanceM) / sourceDistanceM;
  // (M − 1)/M without the difference of near equals.
  const sourceShare = sourceDistanceM === null ? 0 : distanceM / (sourceDistanceM + distanceM);
  const sourceSigmaM = (sourceFwhmM / FWHM_PER_SIGMA) * sourceShare;
  const detectorSigmaM = detectorFwhmM / FWHM_PER_SIGMA / magnification;
  const sigmaM = Math.hypot(sourceSigmaM, detectorSigmaM);
  const pixelM = projection.pixelM / magnification;
  const nyquistPerM = 1 / (2 * pixelM);
  return {
    distanceM,
    magnification,
    effectiveDistanceM: distanceM / magnification,
    sourceSigmaM,
    detectorSigmaM,
    sigmaM,
    pixelM,
    nyquistPerM,
    resolutionPerM: resolutionLimit(sigmaM, pixelM, nyquistPerM),
  };
}

/** sin πx / πx; 1 at 0. */
export function sinc(x: number): number {
  const angle = Math.PI * x;
  return Math.abs(angle) < 1e-8 ? 1 : Math.sin(angle) / angle;
}

/**
 * MTF(u) = exp(−2π²σ²u²) |sinc(u p)|: source, screen and pixel. The radial form stands for the separable pixel; the signal
 * differs by 0.04 %. The source's part is transverse coherence; no further coherence factor is applied.
 */
export function systemTransfer(frequencyPerM: number, sigmaM: number, pixelM: number): number {
  const blur = sigmaM * frequencyPerM;
  return Math.exp(-2 * Math.PI * Math.PI * blur * blur) * Math.abs(sinc(frequencyPerM * pixelM));
}

function resolutionLimit(sigmaM: number, pixelM: number, nyquistPerM: number): number {
  if (systemTransfer(nyquistPerM, sigmaM, pixelM) >= RESOLVED_TRANSFER) return nyquistPerM;
  // The transfer falls from 1 throughout the band: one crossing.
  let low = 0;
  let high = nyquistPerM;
  for (let round = 0; round < 60; round++) {
    const middle = 0.5 * (low + high);
    if (systemTransfer(middle, sigmaM, pixelM) >= RESOLVED_TRANSFER) low = middle;
    else high = middle;
  }
  return 0.5 * (low + high);
}
