/** Where the parts of the full drawing of the beam stand, wide or on a phone. Pure; px. */
import { type BeamProps, beamSpread, sampleText, type Slab, slabsAlong } from "./beam.ts";
import { textWidth, wrapWords } from "./text-width.ts";

export interface BeamLayout {
  readonly phone: boolean;
  readonly height: number;
  /** Of sample and detector. */
  readonly top: number;
  readonly bottom: number;
  /** Optical axis. */
  readonly y: number;
  readonly left: number;
  readonly right: number;
  readonly detector: number;
  readonly slabs: readonly Slab[];
  readonly host: Slab;
  /** Middle of the feature, and half its size along the beam, to scale. */
  readonly feature: { readonly x: number; readonly r: number };
  /** Null where the feature is large enough to be seen without. */
  readonly lens: { readonly x: number; readonly r: number; readonly inHost: boolean } | null;
  readonly spread: { readonly sample: number; readonly detector: number };
  /** Lines; the last stands at `captionAt`. */
  readonly caption: readonly string[];
  readonly captionAt: { readonly x: number; readonly y: number };
  /** Ends of the row of thicknesses. */
  readonly row: { readonly left: number; readonly right: number };
}

/** Narrower than this, px, the phone's drawing is taken. */
const PHONE = 560;
/** A feature this large needs no lens, px. */
const SEEN = 24;

export function layBeam(props: BeamProps): BeamLayout {
  const { width, feature, distanceM } = props;
  const phone = width < PHONE;
  const [top, bottom] = phone ? [10, 92] : [10, 102];
  const y = (top + bottom) / 2;
  const left = phone ? 34 : Math.round(width * 0.31);
  const right = left + Math.round(width * (phone ? 0.56 : 0.24));
  const contact = distanceM === 0;
  const slabs = slabsAlong(props, left, right);
  const host = slabs.find(({ kind }) => kind === "host")!;
  const pxPerUm = host.width / (host.thicknessMm * 1000);
  const size = Math.min(feature.sizeUm * pxPerUm, host.width, bottom - top - 8);
  const middle = host.x + host.width / 2;
  const r = phone ? 26 : 31;
  const inHost = host.width / 2 >= 2 * r + 11;
  const detector = contact ? right + 14 : phone ? width - 12 : width - 122;
  const lensX = inHost ? host.x + r + 1 : phone ? (contact ? detector + 16 : right + 8) + r : left - 14 - r;
  const captionX = phone ? 0 : right + 60;
  const caption = captionText(props, width - captionX, phone ? 1 : 2);
  return {
    phone,
    height: phone ? 176 : 140,
    top,
    bottom,
    y,
    left,
    right,
    detector,
    slabs,
    host,
    feature: { x: middle, r: size / 2 },
    lens: size >= SEEN ? null : { x: lensX, r, inHost },
    spread: beamSpread(props, (bottom - top) / 2 - 4),
    caption,
    captionAt: { x: captionX, y: phone ? 133 : 121 + 5 * caption.length },
    row: { left: 0, right: phone ? width : right + 48 },
  };
}

/** The layers by name where there are lines enough, else their number. */
function captionText(props: BeamProps, room: number, most: number): string[] {
  const named = wrapWords(`To scale: ${sampleText(props)}`, room, 13);
  if (named.length <= most && named.every((line) => textWidth(line, 13) <= room)) return named;
  const count = props.layers.length;
  return [`To scale: host and ${count} ${count === 1 ? "layer" : "layers"}`];
}
