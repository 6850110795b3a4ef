/** What absorption needs in contact, one strip under the map on the same energy scale: a log distance axis has no zero. */
import { useId, useMemo } from "react";
import { EnergyTicks } from "./Axes.tsx";
import { bandAreas } from "./areas.ts";
import {
  AXIS_HEIGHT,
  type AxisLayout,
  energyAxis,
  NARROW,
  PLANE_LEFT,
  PLANE_RIGHT,
  type PlaneLayout,
  px,
} from "./layout.ts";
import { PlaneMark } from "./PlaneMarks.tsx";
import { layoutRuns, runsPath } from "./regions.ts";
import type { Better, PlaneData } from "./types.ts";

interface Props {
  readonly energiesKeV: readonly number[];
  /** Absorption's need at each energy, at the shortest distance. */
  readonly values: readonly (number | null)[];
  readonly bands: readonly number[];
  /** Where absorption needs least, with the id of its pick. */
  readonly best: { readonly id: string; readonly energyKeV: number; readonly chosen: boolean } | null;
  readonly width: number;
  readonly edges?: PlaneData["edges"];
  readonly better?: Better;
  /** Written into the strip where it fits. */
  readonly words?: string;
  /** False where the energy axis is drawn elsewhere. */
  readonly axis?: boolean;
  readonly onPick?: (id: string) => void;
}

const [TOP, BOTTOM] = [6, 34];
const NO_EDGES: PlaneData["edges"] = [];

export function ContactStrip(props: Props) {
  const { energiesKeV, values, bands, best, width, edges = NO_EDGES, better = "less", axis = true, onPick } = props;
  const { words = "in contact, absorption only" } = props;
  const id = useId();
  const height = axis ? BOTTOM + AXIS_HEIGHT : BOTTOM + 6;
  const layout = useMemo(() => stripLayout(energiesKeV, edges, width, height), [energiesKeV, edges, width, height]);
  const grid = useMemo(() => values.map((value) => [value]), [values]);
  const areas = useMemo(() => bandAreas(grid, bands, layout, better), [grid, bands, layout, better]);
  const cells = runsPath(
    layoutRuns(
      grid.map(([value]) => [value == null ? null : "value"]),
      layout,
    ),
    layout,
  );
  const at = best ? px(layout.x.place(best.energyKeV)) : null;
  const length = words.length * 6.6 + 16;
  const start = wordsStart(layout, at, length);
  return (
    <svg
      className="chart"
      width={width}
      height={height}
      viewBox={`0 0 ${width} ${height}`}
      role="img"
      aria-label={stripName(words, best?.energyKeV ?? null)}
    >
      <clipPath id={id}>
        <path d={cells} />
      </clipPath>
      <g clipPath={`url(#${id})`}>
        {areas.map(({ shade, area }, index) => (
          <path key={index} className={`seq-${shade}`} d={area} fillRule="evenodd" />
        ))}
        {areas.map(({ path }, index) => (path === "" ? null : <path key={index} className="band-line" d={path} />))}
      </g>
      <rect className="axis" x={layout.left} y={TOP} width={px(layout.right - layout.left)} height={BOTTOM - TOP} />
      <text className="t-num" x={PLANE_LEFT - 9} y={(TOP + BOTTOM) / 2 + 4} textAnchor="end">
        contact
      </text>
      {start === null ? null : (
        <g>
          <rect className="band-pill" x={px(start)} y={TOP + 4} width={px(length)} height={BOTTOM - TOP - 8} rx={2} />
          <text className="t-ink t-small" x={px(start + length / 2)} y={(TOP + BOTTOM) / 2 + 4.5} textAnchor="middle">
            {words}
          </text>
        </g>
      )}
      {axis ? <EnergyTicks axis={layout.x} left={layout.left} right={layout.right} y={BOTTOM} /> : null}
      {best && at !== null ? (
        <g className={onPick ? "plane-press" : undefined} onClick={onPick ? () => onPick(best.id) : undefined}>
          <PlaneMark technique="absorption" id={best.id} x={at} y={(TOP + BOTTOM) / 2} chosen={best.chosen} />
        </g>
      ) : null}
    </svg>
  );
}

const stripName = (words: string, energyKeV: number | null): string =>
  energyKeV === null ? words : `${words}; least at ${Number(energyKeV.toPrecision(4))} keV`;

/** On the side of the mark with more room; null where neither has enough. */
function wordsStart({ left, right }: PlaneLayout, at: number | null, length: number): number | null {
  const [from, to] = at === null ? [left, right] : at - left > right - at ? [left, at - 16] : [at + 16, right];
  return to - from < length + 12 ? null : Math.min(to - length - 6, (from + to - length) / 2);
}

function stripLayout(
  energiesKeV: readonly number[],
  edges: PlaneData["edges"],
  width: number,
  height: number,
): PlaneLayout {
  const [left, right] = [PLANE_LEFT, Math.max(width - PLANE_RIGHT, PLANE_LEFT + 40)];
  const middle = (TOP + BOTTOM) / 2;
  const y: AxisLayout = {
    at: [middle],
    cells: [[BOTTOM, TOP]],
    groups: [{ first: 0, last: 0, from: BOTTOM, to: TOP }],
    place: () => middle,
    ticks: [],
    label: "",
  };
  return {
    width,
    height,
    left,
    right,
    top: TOP,
    bottom: BOTTOM,
    kind: "map",
    x: energyAxis(energiesKeV, edges, left, right, width < NARROW),
    y,
  };
}
