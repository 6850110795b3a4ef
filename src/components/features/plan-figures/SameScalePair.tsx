/** The reason at a glance: fringe and shadow of one feature, side by side at one vertical and one horizontal scale. */
import { formatPercent } from "#src/lib/format/numbers.ts";
import { ChartLine } from "../chart/ChartLine.tsx";
import { curvePath, linearScale, type Scale } from "../chart/scales.ts";
import { lengthText, tenth } from "./drawing.ts";
import { wrapWords } from "./text-width.ts";

export interface Profile {
  /** Across the feature, 0 at its middle. */
  readonly positionsUm: readonly number[];
  /** I/I_B − 1. */
  readonly contrast: readonly number[];
}

export interface PairProps {
  readonly fringe: Profile | null;
  readonly shadow: Profile | null;
  /** "fringe 5.9 % at 24.0 keV" */
  readonly fringeWords: string;
  readonly shadowWords: string;
  readonly sizeUm: number;
  readonly width: number;
}

const GAP = 32;
const PLOT = 76;
const LINE = 17;

export function SameScalePair({ fringe, shadow, fringeWords, shadowWords, sizeUm, width }: PairProps) {
  const panel = tenth((width - GAP) / 2);
  const lines = [fringeWords, shadowWords].map((words) => wrapWords(words, panel, 13, "bold"));
  const top = Math.max(...lines.map(({ length }) => length)) * LINE + 12;
  const bottom = top + PLOT;
  const height = bottom + 34;
  const scales = pairScales([fringe, shadow], panel, top, bottom);
  return (
    <figure className="fig-pair">
      <svg
        className="chart fig"
        width={width}
        height={height}
        viewBox={`0 0 ${width} ${height}`}
        role="img"
        aria-label={pairWords({ fringe, shadow, fringeWords, shadowWords, sizeUm })}
      >
        {[fringe, shadow].map((profile, index) => (
          <g key={index} transform={index === 0 ? undefined : `translate(${tenth(panel + GAP)} 0)`}>
            {(lines[index] ?? []).map((text, line) => (
              <text key={line} className={index === 0 ? "t-phase" : "t-absorption"} x={0} y={13 + line * LINE}>
                {text}
              </text>
            ))}
            {profile ? (
              <>
                <path className="grid-line" d={`M0 ${tenth(scales.toY(0))}H${panel}`} />
                <ChartLine
                  technique={index === 0 ? "phase" : "absorption"}
                  path={curvePath(profile.positionsUm.map(scales.toX), values(profile).map(drawn(scales.toY)))}
                  dash={undefined}
                />
                <SizeBar sizeUm={sizeUm} pxPerUm={scales.pxPerUm} panel={panel} y={bottom + 12} />
              </>
            ) : (
              <text x={0} y={(top + bottom) / 2 + 4}>
                not computed
              </text>
            )}
          </g>
        ))}
      </svg>
      <figcaption>Both at one vertical scale, without noise.</figcaption>
    </figure>
  );
}

/** Contrast by position; null where it has no value. */
function values({ positionsUm, contrast }: Profile): (number | null)[] {
  return positionsUm.map((_, index) => {
    const value = contrast[index];
    return value !== undefined && Number.isFinite(value) ? value : null;
  });
}

const drawn =
  (toY: Scale) =>
  (value: number | null): number | null =>
    value === null ? null : toY(value);

/** One scale up, with zero inside, and one across, for both profiles. A flat pair lies in the middle. */
function pairScales(
  profiles: readonly (Profile | null)[],
  panel: number,
  top: number,
  bottom: number,
): { toX: Scale; toY: Scale; pxPerUm: number } {
  const held = profiles.filter((profile) => profile !== null);
  const contrasts = held.flatMap(values).filter((value) => value !== null);
  const low = contrasts.reduce((least, value) => Math.min(least, value), 0);
  const high = contrasts.reduce((most, value) => Math.max(most, value), 0);
  const flat = high - low > 0 ? 0 : 1;
  const reach =
    held.flatMap(({ positionsUm }) => positionsUm).reduce((most, at) => Math.max(most, Math.abs(at)), 0) || 1;
  // The double line is 5.4 px wide: its crests stay inside.
  return {
    toX: linearScale([-reach, reach], 0, panel),
    toY: linearScale([low - flat, high + flat], bottom - 3, top + 3),
    pxPerUm: panel / (2 * reach),
  };
}

/** As long as the feature; where that is longer than the panel, a round length that is not. */
function SizeBar({ sizeUm, pxPerUm, panel, y }: { sizeUm: number; pxPerUm: number; panel: number; y: number }) {
  const longestUm = (0.95 * panel) / pxPerUm;
  const shownUm = sizeUm <= longestUm ? sizeUm : 10 ** Math.floor(Math.log10(longestUm));
  const half = (shownUm * pxPerUm) / 2;
  const [from, to] = [tenth(panel / 2 - half), tenth(panel / 2 + half)];
  return (
    <g>
      <path className="fig-bar" d={`M${from} ${y}H${to}M${from} ${y - 4}V${y + 4}M${to} ${y - 4}V${y + 4}`} />
      <text className="t-num" x={tenth(panel / 2)} y={y + 20} textAnchor="middle">
        {lengthText(shownUm / 1000)}
      </text>
    </g>
  );
}

/** The figure in words: both names and the largest and least contrast of each. */
function pairWords({ fringe, shadow, fringeWords, shadowWords, sizeUm }: Omit<PairProps, "width">): string {
  const one = (words: string, profile: Profile | null): string => {
    if (!profile) return `${words}: not computed`;
    const held = values(profile).filter((value) => value !== null);
    const low = held.reduce((least, value) => Math.min(least, value), 0);
    const high = held.reduce((most, value) => Math.max(most, value), 0);
    return `${words}: from ${formatPercent(low)} to ${formatPercent(high)}`;
  };
  const size = lengthText(sizeUm / 1000);
  return `Profiles across the feature of ${size} at one vertical scale, without noise. ${one(fringeWords, fringe)}. ${one(shadowWords, shadow)}.`;
}
