/**
 * The contrast of a feature as it stands in the image, I/I_B − 1 by linear theory, along a line across it (PHYSICS 5): the
 * transform back of Ĉ(u). Positions are in the plane of the sample.
 */
import { type Geometry, systemTransfer } from "../geometry.ts";
import { besselJ0 } from "../numerics/bessel.ts";
import { acrossM, type Shape, transform } from "../shapes.ts";
import type { Beam } from "./beam.ts";

/** What a profile needs of a beam. */
export type ProfileBeam = Pick<Beam, "wavelengthM" | "fineTerms" | "absorptionPerM">;

/** Nodes for each period of whatever is quickest: shape, position or fringe. */
const NODES_PER_PERIOD = 12;
const LEAST_NODES = 240;
const MOST_NODES = 8192;
/** A sphere that spans so many resolved periods has the profile of a fibre as thick: its edge is straight on their scale. */
const STRAIGHT_EDGE = 24;

/**
 * C at each position (m, from the middle, ≥ 0), with phase, or of absorption alone (`phase: false`: Δδ = 0 and χ = 0).
 * Negative where the image is darker than the host beside it.
 */
export function contrastProfile(
  given: Shape,
  geometry: Geometry,
  beam: ProfileBeam,
  positionsM: readonly number[],
  { phase }: { phase: boolean },
): number[] {
  const { nyquistPerM, sigmaM, pixelM, effectiveDistanceM } = geometry;
  const spanned = acrossM(given) * nyquistPerM;
  const shape: Shape =
    given.kind === "sphere" && spanned > STRAIGHT_EDGE ? { kind: "fibre", sizeM: given.sizeM, lengthM: 1 } : given;
  const furthestM = Math.max(0, ...positionsM);
  const fringes = phase ? beam.wavelengthM * effectiveDistanceM * nyquistPerM ** 2 : 0;
  const periods = spanned + 2 * furthestM * nyquistPerM + fringes;
  const count = 2 * Math.ceil(Math.min(MOST_NODES, Math.max(LEAST_NODES, NODES_PER_PERIOD * periods)) / 2);
  const step = nyquistPerM / count;
  const round = shape.kind === "sphere";
  const amplitudes = new Float64Array(count + 1);
  for (let k = 0; k <= count; k++) {
    const u = k * step;
    const rule = ((k === 0 || k === count ? 1 : k % 2 === 1 ? 4 : 2) * step) / 3;
    const measure = round ? 2 * Math.PI * u : 2;
    amplitudes[k] =
      -rule *
      measure *
      passed(beam, effectiveDistanceM, u, phase) *
      transform(shape, u) *
      systemTransfer(u, sigmaM, pixelM);
  }
  return positionsM.map((positionM) => {
    let sum = 0;
    const angle = 2 * Math.PI * step * positionM;
    if (round) for (let k = 0; k <= count; k++) sum += amplitudes[k]! * besselJ0(k * angle);
    else {
      // cos(kα) by its recurrence.
      let [before, now] = [Math.cos(angle), 1];
      const twice = 2 * before;
      for (let k = 0; k <= count; k++) {
        sum += amplitudes[k]! * now;
        [before, now] = [now, twice * now - before];
      }
    }
    return sum;
  });
}

/** Δμ cos χ + (4π/λ)Δδ sin χ of the detected photons. */
function passed(beam: ProfileBeam, effectiveDistanceM: number, frequencyPerM: number, phase: boolean): number {
  if (!phase) return beam.absorptionPerM;
  let sum = 0;
  for (const term of beam.fineTerms) {
    const chi = Math.PI * term.wavelengthM * effectiveDistanceM * frequencyPerM * frequencyPerM;
    sum += term.absorption * Math.cos(chi) + term.phase * Math.sin(chi);
  }
  return sum;
}

/** Largest |C| of the image: in the middle and around the edge, where fringes stand. */
export function largestContrast(shape: Shape, geometry: Geometry, beam: ProfileBeam): number {
  const edgeM = acrossM(shape) / 2;
  const fringeM = Math.max(
    geometry.sigmaM,
    geometry.pixelM,
    0.5 * Math.sqrt(beam.wavelengthM * geometry.effectiveDistanceM),
  );
  const positions = [0, edgeM / 2];
  for (let k = -8; k <= 8; k++) positions.push(Math.max(0, edgeM + 0.35 * k * fringeM));
  return Math.max(...contrastProfile(shape, geometry, beam, positions, { phase: true }).map(Math.abs));
}
