/** What the ruler is given, and where its fixed parts stand, px. */

export interface RulerMark {
  /** Rank or letter of the pick. */
  readonly id: string;
  readonly value: number;
  /** Said beside the mark. */
  readonly words?: string;
}

export interface RulerProps {
  /** Quantity and unit: "Dose, Gy". */
  readonly label: string;
  readonly unit: string;
  /** In order of rank; the bracket starts at the first. */
  readonly phase: readonly RulerMark[];
  /** The bracket ends at the least. */
  readonly absorption: readonly RulerMark[];
  readonly limit: { readonly value: number; readonly words: string } | null;
  /** On the bracket: "132 × less dose"; null draws none. */
  readonly ratioWords: string | null;
  /** Uncertainty of the first phase mark, or of absorption's best where `intervalOf` says so. */
  readonly interval?: readonly [number, number] | undefined;
  readonly intervalOf?: "phase" | "absorption";
  readonly width: number;
}

export const RULER = {
  height: 146,
  axis: 80,
  ring: { y: 52, r: 13.8 },
  smallRing: { y: 68.5, r: 4.8 },
  disc: { y: 105, r: 12 },
  smallDisc: { y: 92, r: 4.6 },
  bracket: { y: 26, text: 31, size: 15 },
  limit: { top: 18, topUnderWords: 39, bottom: 118, text: 13 },
  hatch: { top: 46, bottom: 114 },
  /** Of a phase mark; absorption's lies as far below the axis. */
  interval: 69,
  ticks: 138,
} as const;

/** Size of the figures' small words, px. */
export const SIZE = 13;
