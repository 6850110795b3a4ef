/** The beam of a plan for its two drawings: what stands along it, to scale inside the sample, and all of it in words. */
import { formatGiven } from "#src/lib/format/numbers.ts";
import { lengthText } from "./drawing.ts";

export interface BeamLayer {
  /** In front of the host or behind it; layers stand in the order the beam meets them. */
  readonly position: "before" | "after";
  readonly thicknessMm: number;
  /** Name of the material. */
  readonly label: string;
}

export interface BeamProps {
  /** Null for a parallel beam. */
  readonly sourceDistanceM: number | null;
  readonly sourceFwhmUm: number;
  readonly layers: readonly BeamLayer[];
  readonly host: { readonly thicknessMm: number; readonly label: string };
  readonly feature: {
    readonly shape: "sphere" | "fibre" | "layer";
    /** Diameter, or depth of a layer along the beam. */
    readonly sizeUm: number;
    /** Of a layer across the beam. */
    readonly widthUm: number | null;
    readonly label: string;
  };
  /** Of the chosen pick; 0 in contact, null while there is none. */
  readonly distanceM: number | null;
  readonly distanceWords: string;
  readonly technique: "phase" | "absorption";
  readonly pixelUm: number;
  readonly blurUm: number;
  readonly width: number;
}

export interface Slab {
  readonly kind: "layer" | "host";
  readonly label: string;
  readonly thicknessMm: number;
  /** px, to scale. */
  readonly x: number;
  readonly width: number;
  /** Under three pixels: a leader line points at it. */
  readonly thin: boolean;
}

/** Thinner than this, px, a layer needs a line that leads to it. */
const THIN = 3;
/** What is drawn of a layer however thin, px. */
export const LEAST_DRAWN = 1.5;

/** Layers and host in beam order, to scale between two places; whatever their number and however unlike. */
export function slabsAlong({ layers, host }: Pick<BeamProps, "layers" | "host">, left: number, right: number): Slab[] {
  const inOrder = [
    ...layers.filter(({ position }) => position === "before"),
    host,
    ...layers.filter(({ position }) => position === "after"),
  ];
  const totalMm = inOrder.reduce((sum, { thicknessMm }) => sum + thicknessMm, 0);
  const pxPerMm = totalMm > 0 ? (right - left) / totalMm : 0;
  let x = left;
  return inOrder.map((part) => {
    const { thicknessMm, label } = part;
    const width = thicknessMm * pxPerMm;
    const slab: Slab = { kind: part === host ? "host" : "layer", label, thicknessMm, x, width, thin: width < THIN };
    x += width;
    return slab;
  });
}

/** Half the height of the beam at sample and detector, px: it diverges as the true one does, and fills `most` at the detector. */
export function beamSpread(
  { sourceDistanceM, distanceM }: BeamProps,
  most: number,
): { sample: number; detector: number } {
  if (sourceDistanceM === null) return { sample: most / 2, detector: most / 2 };
  const magnification = (sourceDistanceM + (distanceM ?? 0)) / sourceDistanceM;
  const sample = Math.max(2, Math.min(most / 2, most / magnification));
  return { sample, detector: Math.min(most, sample * magnification) };
}

/** "41 m", or "parallel". */
export function sourceText({ sourceDistanceM }: BeamProps): string {
  return sourceDistanceM === null ? "parallel" : lengthText(sourceDistanceM * 1000);
}

export function micrometres(lengthUm: number): string {
  return lengthUm === 0 ? "0\u00a0µm" : `${formatGiven(lengthUm, 3)}\u00a0µm`;
}

/** "2 × 1 mm polypropylene, 5 mm water": equal layers together, in the order of the first of each. */
export function sampleText({ layers, host }: Pick<BeamProps, "layers" | "host">): string {
  const counts = new Map<string, number>();
  for (const { label, thicknessMm } of slabsAlong({ layers, host }, 0, 1)) {
    const text = `${lengthText(thicknessMm)} ${label}`;
    counts.set(text, (counts.get(text) ?? 0) + 1);
  }
  return [...counts].map(([text, count]) => (count > 1 ? `${count} × ${text}` : text)).join(", ");
}

/** The whole drawing in words, in the order of the beam. */
export function beamWords(props: BeamProps): string {
  const { sourceDistanceM, sourceFwhmUm, feature, distanceM, distanceWords, technique, pixelUm, blurUm } = props;
  const source =
    sourceDistanceM === null
      ? "a parallel beam"
      : `source ${micrometres(sourceFwhmUm)} wide at ${lengthText(sourceDistanceM * 1000)}`;
  const slabs = slabsAlong(props, 0, 1).map(({ label, thicknessMm }) => `${lengthText(thicknessMm)} ${label}`);
  const across = feature.widthUm === null ? "" : `, ${micrometres(feature.widthUm)} across`;
  const how = distanceM === null ? "" : technique === "phase" ? ", phase contrast" : ", absorption";
  return [
    `The beam, sample to scale along it: ${source}`,
    `sample of ${slabs.join(", ")}`,
    `in it ${feature.label}, ${micrometres(feature.sizeUm)}${across}`,
    `detector: ${distanceWords}${how}, ${micrometres(pixelUm)} pixels, ${micrometres(blurUm)} blur.`,
  ].join("; ");
}
