/**
 * The start page's picture: a PMMA fibre of 100 µm in air at 20 keV, seen at distances from contact to 3 m. Exact for a thin
 * object: ψ = exp(−(Δμ/2 + i k Δδ) t), Fresnel propagation by its transfer function exp(−iπλRu²), intensity, Gaussian blur.
 *
 * Run with `npx tsx data/build/fibre-strip.ts` when the tables change; the picture is committed.
 */
import FFT from "fft.js";
import sharp from "sharp";
import { fileURLToPath } from "node:url";
import { compositionOfFormula, opticalConstants, parseFormula, withDensity } from "#src/lib/physics/index.ts";
import { committedTables } from "./committed-tables.ts";

const ENERGY_EV = 20_000;
const DIAMETER_M = 100e-6;
const LONGEST_M = 3;
const COLUMNS = 1440;
const ROWS = 168;
/** Height of the picture in the sample. */
const FIELD_M = 210e-6;
/** Detector blur, full width at half maximum. */
const BLUR_FWHM_M = 2e-6;
// Sampling guard of the transfer function: λR ≤ N dx², 1.9e-10 m² at 3 m against 2.6e-10 m².
const SAMPLES = 4096;
const STEP_M = 0.25e-6;
/** Grey covers this much above and below the open beam. */
const WINDOW = 0.35;

const pmma = withDensity(compositionOfFormula(parseFormula("C5H8O2")), 1190);
const constants = opticalConstants(pmma, ENERGY_EV, committedTables());
if (!constants) throw new Error("The tables hold no carbon, hydrogen or oxygen.");
const { delta, muTotalPerM, wavelengthM } = constants;

const fft = new FFT(SAMPLES);
const spectrum = fft.createComplexArray() as number[];
const wave = fft.createComplexArray() as number[];
for (let i = 0; i < SAMPLES; i++) {
  const y = (i - SAMPLES / 2) * STEP_M;
  const thicknessM = 2 * Math.sqrt(Math.max(0, (DIAMETER_M / 2) ** 2 - y * y));
  const amplitude = Math.exp((-muTotalPerM * thicknessM) / 2);
  const phase = (-2 * Math.PI * delta * thicknessM) / wavelengthM;
  wave[2 * i] = amplitude * Math.cos(phase);
  wave[2 * i + 1] = amplitude * Math.sin(phase);
}
fft.transform(spectrum, wave);

const frequency = (i: number): number => (i < SAMPLES / 2 ? i : i - SAMPLES) / (SAMPLES * STEP_M);

function intensityAt(distanceM: number): Float64Array {
  const moved = fft.createComplexArray() as number[];
  for (let i = 0; i < SAMPLES; i++) {
    const angle = -Math.PI * wavelengthM * distanceM * frequency(i) ** 2;
    const [re = 0, im = 0] = [spectrum[2 * i], spectrum[2 * i + 1]];
    moved[2 * i] = re * Math.cos(angle) - im * Math.sin(angle);
    moved[2 * i + 1] = re * Math.sin(angle) + im * Math.cos(angle);
  }
  const field = fft.createComplexArray() as number[];
  fft.inverseTransform(field, moved);
  const intensity = fft.createComplexArray() as number[];
  for (let i = 0; i < SAMPLES; i++) intensity[2 * i] = (field[2 * i] ?? 0) ** 2 + (field[2 * i + 1] ?? 0) ** 2;
  const blurred = fft.createComplexArray() as number[];
  fft.transform(blurred, intensity);
  const sigmaM = BLUR_FWHM_M / 2.3548;
  for (let i = 0; i < SAMPLES; i++) {
    const mtf = Math.exp(-2 * (Math.PI * sigmaM * frequency(i)) ** 2);
    blurred[2 * i] = (blurred[2 * i] ?? 0) * mtf;
    blurred[2 * i + 1] = (blurred[2 * i + 1] ?? 0) * mtf;
  }
  const image = fft.createComplexArray() as number[];
  fft.inverseTransform(image, blurred);
  return Float64Array.from({ length: SAMPLES }, (_, i) => image[2 * i] ?? 0);
}

const pixels = Buffer.alloc(COLUMNS * ROWS);
const perRow = FIELD_M / ROWS / STEP_M;
for (let column = 0; column < COLUMNS; column++) {
  const intensity = intensityAt((column / (COLUMNS - 1)) * LONGEST_M);
  for (let row = 0; row < ROWS; row++) {
    const first = Math.round(SAMPLES / 2 + (row - ROWS / 2) * perRow);
    const last = Math.round(SAMPLES / 2 + (row + 1 - ROWS / 2) * perRow);
    let sum = 0;
    for (let i = first; i < last; i++) sum += intensity[i] ?? 1;
    const grey = 0.5 + (sum / (last - first) - 1) / (2 * WINDOW);
    pixels[row * COLUMNS + column] = Math.round(255 * Math.min(1, Math.max(0, grey)));
  }
}
const file = fileURLToPath(new URL("../../src/assets/fibre-strip.webp", import.meta.url));
await sharp(pixels, { raw: { width: COLUMNS, height: ROWS, channels: 1 } })
  .webp({ quality: 82 })
  .toFile(file);
