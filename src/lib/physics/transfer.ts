/**
 * Sums over the band of what a point's contrast passes on (contrast transfer theory: Pogany, Gao, Wilkins, Rev. Sci. Instrum. 68,
 * 2774 (1997)): |Ĉ|² = [Δμ cos χ + (4π/λ)Δδ sin χ]² |t̂|² MTF², χ = πλR'u², with the filter H = 1/(1 + γχ) of single-material
 * retrieval (Paganin et al., J. Microsc. 206, 33 (2002)) where one is used.
 */
import type { Band, Foot, Piece } from "./band.ts";
import { acrossM } from "./shapes.ts";
import { filonFactors } from "./numerics/filon.ts";
import { retrievalFilter } from "./retrieval.ts";

/** One photon energy of a beam: its share of the detected photons, and the contrast it carries. */
export interface BeamTerm {
  readonly wavelengthM: number;
  /** Share × Δμ, 1/m. */
  readonly absorption: number;
  /** Share × (4π/λ)Δδ, 1/m. */
  readonly phase: number;
}

export interface BeamContrast {
  /** Of the nominal energy. */
  readonly wavelengthM: number;
  /** Standard deviation of the photon energies over the nominal one; 0 for a beam of one energy. */
  readonly relativeSigma: number;
  /** One for a beam of one energy; more for a band, in steps of one standard deviation. */
  readonly terms: readonly BeamTerm[];
  /** The same in half steps, for fringes that fade. */
  readonly fineTerms: readonly BeamTerm[];
}

export interface BandSums {
  /** ∫ |ĈH|² with the first measure. */
  first: number;
  /** ∫ |ĈH|² H² with the second; ∫ |Ĉ|² again without a filter. */
  second: number;
}

/** Steps of χ up to which Simpson's rule takes the square as it stands; Filon's rule above. */
const DIRECT_STEP = 0.1;
/** Below a cut: χ and γχ at most, and at most a quarter of a period of the shape. */
const FOOT_PHASE = 0.5;
/** Up to this χ the parts of an energy band act as one. */
const TOGETHER = 0.05;
const FOOT_FILTER = 1;
const MOST_PIECES = 60;
/** Fringes fade as exp(−χ²s²/2), s the relative deviation of the energies: full steps of s hold up to here, half steps … */
const COARSE_UP_TO = 2;
/** … up to here, where nothing is left. */
const FADED = 8;

const factors = { alpha: 0, beta: 0, gamma: 0 };

/**
 * Both sums, in m² (signal, neighbourhood) or the volume's own units, for an effective distance R' ≥ 0 and a filter's γ ≥ 0 (0: no
 * filter). Exact to some 1e-4 of each sum. At R' = 0 only absorption is left, and the filter is 1.
 */
export function bandSums(
  band: Band,
  beam: BeamContrast,
  effectiveDistanceM: number,
  gammaFilter: number,
  out: BandSums,
): BandSums {
  // χ = phaseRate × v; the filter's x = γχ.
  const phaseRate = Math.PI * beam.wavelengthM * effectiveDistanceM;
  const filterRate = gammaFilter * phaseRate;
  out.first = 0;
  out.second = 0;
  const nyquist = band.geometry.nyquistPerM;
  const terms = phaseRate * nyquist * nyquist * beam.relativeSigma < COARSE_UP_TO ? beam.terms : beam.fineTerms;
  // Where χ is small the parts act as one: Σ a cos χ_k + p sin χ_k is a cos χ + p' sin χ with p' = Σ p λ_k/λ, to χ²s².
  let absorption = 0;
  let phase = 0;
  for (let t = 0; t < terms.length; t++) {
    const term = terms[t]!;
    absorption += term.absorption;
    phase += term.phase * (term.wavelengthM / beam.wavelengthM);
  }
  let pieces = band.pieces;
  if (pieces === null) {
    const longest = band.shape.kind === "layer" ? Math.max(band.shape.sizeM, band.shape.widthM) : acrossM(band.shape);
    const footPerM = Math.min(
      1 / (4 * longest),
      phaseRate > 0 ? Math.sqrt((terms.length === 1 ? FOOT_PHASE : TOGETHER) / phaseRate) : Infinity,
      filterRate > 0 ? Math.sqrt(FOOT_FILTER / filterRate) : Infinity,
    );
    pieces = Math.min(MOST_PIECES, Math.max(1, Math.ceil(Math.log2(nyquist / footPerM))));
    addFoot(band.foot(pieces - 1), absorption, phase, phaseRate, filterRate, out);
  }
  const single = terms.length === 1;
  for (let index = 0; index < pieces; index++) {
    const piece = band.piece(index);
    const topPhase = phaseRate * (piece.startPerM2 + piece.intervals * piece.stepPerM2);
    if (!single && topPhase > TOGETHER) {
      if (phaseRate * piece.startPerM2 * beam.relativeSigma <= FADED)
        addEnsemble(piece, beam, terms, phaseRate, filterRate, out);
    } else if (phaseRate * piece.stepPerM2 <= DIRECT_STEP)
      addDirect(piece, absorption, phase, phaseRate, filterRate, out);
    else addFilon(piece, absorption, phase, phaseRate, filterRate, out);
  }
  return out;
}

/** ∫|t̂|²MTF² with both measures, times nothing: what absorption alone is summed over (Δδ = 0, χ = 0, H = 1). */
export function absorptionSums(band: Band): BandSums {
  const out = { first: 0, second: 0 };
  const terms = [{ wavelengthM: 1, absorption: 1, phase: 0 }];
  bandSums(band, { wavelengthM: 1, relativeSigma: 0, terms, fineTerms: terms }, 0, 0, out);
  return out;
}

function addFoot(
  { squaresPerM2, first, second }: Foot,
  absorption: number,
  phase: number,
  phaseRate: number,
  filterRate: number,
  out: BandSums,
): void {
  for (let k = 0; k < squaresPerM2.length; k++) {
    const v = squaresPerM2[k]!;
    const chi = phaseRate * v;
    const square = chi * chi;
    // Series of cosine and sine: χ is at most FOOT_PHASE, the first term left out 3e-9.
    const amplitude =
      absorption * (1 - (square / 2) * (1 - (square / 12) * (1 - square / 30))) +
      phase * chi * (1 - (square / 6) * (1 - (square / 20) * (1 - square / 42)));
    const filter = retrievalFilter(filterRate, v);
    const filtered = filter * filter * amplitude * amplitude;
    out.first += first[k]! * filtered;
    out.second += second[k]! * filtered * filter * filter;
  }
}

/** Small steps of χ: Simpson's rule on the square. g = a cos χ + p sin χ follows g(k + 2) = 2 cos(2Δχ) g(k) − g(k − 2). */
function addDirect(
  piece: Piece,
  absorption: number,
  phase: number,
  phaseRate: number,
  filterRate: number,
  out: BandSums,
): void {
  const { startPerM2, stepPerM2, intervals, first, second } = piece;
  const step = phaseRate * stepPerM2;
  const [c, s] = [Math.cos(phaseRate * startPerM2), Math.sin(phaseRate * startPerM2)];
  const [turnC, turnS] = [Math.cos(step), Math.sin(step)];
  const cosine2 = 1 - 2 * turnS * turnS;
  const twice = 2 * cosine2;
  // Even nodes 0, 2, … and odd nodes 1, 3, … as two chains that do not wait for each other: g(k) = g cos kΔχ + q sin kΔχ.
  const quarter = phase * c - absorption * s;
  let even = absorption * c + phase * s;
  let evenBefore = even * cosine2 - quarter * 2 * turnS * turnC;
  let odd = even * turnC + quarter * turnS;
  let oddBefore = even * turnC - quarter * turnS;
  let evens = 0;
  let odds = 0;
  let evensFiltered = 0;
  let oddsFiltered = 0;
  let ends = 0;
  let endsFiltered = 0;
  if (filterRate === 0 && first === second) {
    ends = -first[0]! * even * even;
    for (let k = 0; k < intervals; k += 2) {
      evens += first[k]! * even * even;
      odds += first[k + 1]! * odd * odd;
      const nextEven = twice * even - evenBefore;
      evenBefore = even;
      even = nextEven;
      const nextOdd = twice * odd - oddBefore;
      oddBefore = odd;
      odd = nextOdd;
    }
    ends += first[intervals]! * even * even;
    out.first += (stepPerM2 / 3) * (2 * evens + ends + 4 * odds);
    out.second = out.first;
    return;
  }
  let x = 1 + filterRate * startPerM2;
  const xStep = filterRate * stepPerM2;
  for (let k = 0; k < intervals; k += 2) {
    const filter = 1 / (x * x);
    const value = filter * even * even;
    const filtered = second[k]! * value * filter;
    evens += first[k]! * value;
    evensFiltered += filtered;
    if (k === 0) {
      ends -= first[0]! * value;
      endsFiltered -= filtered;
    }
    x += xStep;
    const oddFilter = 1 / (x * x);
    const oddValue = oddFilter * odd * odd;
    odds += first[k + 1]! * oddValue;
    oddsFiltered += second[k + 1]! * oddValue * oddFilter;
    x += xStep;
    const nextEven = twice * even - evenBefore;
    evenBefore = even;
    even = nextEven;
    const nextOdd = twice * odd - oddBefore;
    oddBefore = odd;
    odd = nextOdd;
  }
  const filter = 1 / (x * x);
  const value = filter * even * even;
  ends += first[intervals]! * value;
  endsFiltered += second[intervals]! * value * filter;
  out.first += (stepPerM2 / 3) * (2 * evens + ends + 4 * odds);
  out.second += (stepPerM2 / 3) * (2 * evensFiltered + endsFiltered + 4 * oddsFiltered);
}

/** Large steps of χ: the square is a mean and a wave of 2χ, (a² + p²)/2 + (a² − p²)/2 cos 2χ + a p sin 2χ; Filon's rule for the wave. */
function addFilon(
  piece: Piece,
  absorption: number,
  phase: number,
  phaseRate: number,
  filterRate: number,
  out: BandSums,
): void {
  const { startPerM2, stepPerM2, intervals, first, second } = piece;
  const mean = 0.5 * (absorption * absorption + phase * phase);
  const cosine = 0.5 * (absorption * absorption - phase * phase);
  const sine = absorption * phase;
  const start = 2 * phaseRate * startPerM2;
  const theta = 2 * phaseRate * stepPerM2;
  const [c, s] = [Math.cos(start), Math.sin(start)];
  const [turnC, turnS] = [Math.cos(theta), Math.sin(theta)];
  const cosine2 = 1 - 2 * turnS * turnS;
  const twice = 2 * cosine2;
  // w(k) = w cos kθ + q sin kθ; the end terms are those of −q.
  const quarter = sine * c - cosine * s;
  let even = cosine * c + sine * s;
  let evenBefore = even * cosine2 - quarter * 2 * turnS * turnC;
  let odd = even * turnC + quarter * turnS;
  let oddBefore = even * turnC - quarter * turnS;
  const quarterEnd = (): number => {
    const end = start + intervals * theta;
    return cosine * Math.sin(end) - sine * Math.cos(end);
  };
  let evens = 0;
  let odds = 0;
  filonFactors(theta, factors);
  const { alpha, beta, gamma } = factors;
  if (filterRate === 0 && first === second) {
    const half = 0.5 * first[0]! * even;
    for (let k = 0; k < intervals; k += 2) {
      evens += first[k]! * even;
      odds += first[k + 1]! * odd;
      const nextEven = twice * even - evenBefore;
      evenBefore = even;
      even = nextEven;
      const nextOdd = twice * odd - oddBefore;
      oddBefore = odd;
      odd = nextOdd;
    }
    evens += 0.5 * first[intervals]! * even - half;
    const ends = first[intervals]! * quarterEnd() + first[0]! * quarter;
    out.first += mean * piece.firstSum + stepPerM2 * (alpha * ends + beta * evens + gamma * odds);
    out.second = out.first;
    return;
  }
  let evensFiltered = 0;
  let oddsFiltered = 0;
  let plain = 0;
  let plainFiltered = 0;
  let x = 1 + filterRate * startPerM2;
  const xStep = filterRate * stepPerM2;
  const firstEnd = { amount: 0, filtered: 0 };
  for (let k = 0; k < intervals; k += 2) {
    const filter = 1 / (x * x);
    const amount = first[k]! * filter;
    const filtered = second[k]! * filter * filter;
    evens += amount * even;
    evensFiltered += filtered * even;
    plain += 2 * amount;
    plainFiltered += 2 * filtered;
    if (k === 0) {
      firstEnd.amount = amount;
      firstEnd.filtered = filtered;
      evens *= 0.5;
      evensFiltered *= 0.5;
      plain *= 0.5;
      plainFiltered *= 0.5;
    }
    x += xStep;
    const oddFilter = 1 / (x * x);
    const oddAmount = first[k + 1]! * oddFilter;
    const oddFilteredAmount = second[k + 1]! * oddFilter * oddFilter;
    odds += oddAmount * odd;
    oddsFiltered += oddFilteredAmount * odd;
    plain += 4 * oddAmount;
    plainFiltered += 4 * oddFilteredAmount;
    x += xStep;
    const nextEven = twice * even - evenBefore;
    evenBefore = even;
    even = nextEven;
    const nextOdd = twice * odd - oddBefore;
    oddBefore = odd;
    odd = nextOdd;
  }
  const filter = 1 / (x * x);
  const amount = first[intervals]! * filter;
  const filtered = second[intervals]! * filter * filter;
  evens += 0.5 * amount * even;
  evensFiltered += 0.5 * filtered * even;
  plain += amount;
  plainFiltered += filtered;
  const [last, begin] = [quarterEnd(), -quarter];
  out.first +=
    (stepPerM2 / 3) * mean * plain +
    stepPerM2 * (alpha * (amount * last - firstEnd.amount * begin) + beta * evens + gamma * odds);
  out.second +=
    (stepPerM2 / 3) * mean * plainFiltered +
    stepPerM2 * (alpha * (filtered * last - firstEnd.filtered * begin) + beta * evensFiltered + gamma * oddsFiltered);
}

/**
 * Many energies: Ĉ = Re[Z e^{iχ}] with Z = Σ (a − ip) e^{i(χ_k − χ)}, which changes slowly; |Ĉ|² = |Z|²/2 + Re[Z² e^{2iχ}]/2, and
 * Filon's rule for the wave. Fringes of the parts run apart and Z fades with χ.
 */
function addEnsemble(
  piece: Piece,
  { wavelengthM, relativeSigma }: BeamContrast,
  terms: readonly BeamTerm[],
  phaseRate: number,
  filterRate: number,
  out: BandSums,
): void {
  const { startPerM2, stepPerM2, intervals, first, second } = piece;
  const count = terms.length;
  const theta = 2 * phaseRate * stepPerM2;
  const direct = 0.5 * theta <= DIRECT_STEP;
  filonFactors(theta, factors);
  const { alpha, beta, gamma } = factors;
  // Each part turns by the same angle from node to node.
  const [reals, imaginaries, cosines, sines] = [ensemble.real, ensemble.imaginary, ensemble.cosine, ensemble.sine];
  for (let t = 0; t < count; t++) {
    const term = terms[t]!;
    const rate = phaseRate * (term.wavelengthM / wavelengthM - (direct ? 0 : 1));
    const c = Math.cos(rate * startPerM2);
    const s = Math.sin(rate * startPerM2);
    reals[t] = term.absorption * c + term.phase * s;
    imaginaries[t] = term.absorption * s - term.phase * c;
    cosines[t] = Math.cos(rate * stepPerM2);
    sines[t] = Math.sin(rate * stepPerM2);
  }
  let sum = 0;
  let sumFiltered = 0;
  let c2 = Math.cos(2 * phaseRate * startPerM2);
  let s2 = Math.sin(2 * phaseRate * startPerM2);
  const [turnC, turnS] = [Math.cos(theta), Math.sin(theta)];
  for (let k = 0; k <= intervals; k++) {
    let real = 0;
    let imaginary = 0;
    for (let t = 0; t < count; t++) {
      const [r, i, c, s] = [reals[t]!, imaginaries[t]!, cosines[t]!, sines[t]!];
      real += r;
      imaginary += i;
      reals[t] = r * c - i * s;
      imaginaries[t] = r * s + i * c;
    }
    const v = startPerM2 + k * stepPerM2;
    if (phaseRate * v * relativeSigma > FADED) break;
    const pass = 1 / (1 + filterRate * v);
    const filter = pass * pass;
    const end = k === 0 || k === intervals;
    const odd = k % 2 === 1;
    const simpsonWeight = end ? 1 / 3 : odd ? 4 / 3 : 2 / 3;
    let value: number;
    if (direct) value = simpsonWeight * real * real;
    else {
      const p = real * real - imaginary * imaginary;
      const q = 2 * real * imaginary;
      const filonWeight = end ? 0.5 * beta : odd ? gamma : beta;
      value = 0.5 * simpsonWeight * (real * real + imaginary * imaginary) + 0.5 * filonWeight * (p * c2 - q * s2);
      if (end) value += (k === 0 ? -0.5 : 0.5) * alpha * (p * s2 + q * c2);
      const next = c2 * turnC - s2 * turnS;
      s2 = c2 * turnS + s2 * turnC;
      c2 = next;
    }
    sum += first[k]! * filter * value;
    sumFiltered += second[k]! * filter * filter * value;
  }
  out.first += stepPerM2 * sum;
  out.second += stepPerM2 * sumFiltered;
}

/** Most parts of an energy band (plan/beam.ts). */
export const MOST_TERMS = 32;
const ensemble = {
  real: new Float64Array(MOST_TERMS),
  imaginary: new Float64Array(MOST_TERMS),
  cosine: new Float64Array(MOST_TERMS),
  sine: new Float64Array(MOST_TERMS),
};
