/** What of the plane stays while the cross moves: bands, hatching, the rim line and axes. Redrawn only when these change. */
import { memo, useId, useMemo } from "react";
import { DistanceTicks, EdgeLines, EnergyTicks } from "./Axes.tsx";
import type { BandArea, RimPaths } from "./areas.ts";
import { type PlaneLayout, px } from "./layout.ts";
import { borderPath, layoutRuns, runsPath } from "./regions.ts";
import type { PlaneData } from "./types.ts";

interface Props {
  readonly layout: PlaneLayout;
  readonly areas: readonly BandArea[];
  readonly rim: RimPaths | null;
  readonly values: PlaneData["values"];
  readonly forbidden: PlaneData["forbidden"];
  readonly edges: PlaneData["edges"];
  /** False: a strip below has the energy axis. */
  readonly axis: boolean;
}

function Ground({ layout, areas, rim, values, forbidden, edges, axis }: Props) {
  const id = useId();
  const { left, right, top, bottom } = layout;
  const cells = useMemo(() => runsPath(layoutRuns(codesOfValues(values), layout), layout), [values, layout]);
  const hatch = useMemo(
    () => ({ path: runsPath(layoutRuns(forbidden, layout), layout), borders: borderPath(forbidden, layout) }),
    [forbidden, layout],
  );
  return (
    <g>
      <defs>
        <pattern id={`${id}h`} width={7} height={7} patternTransform="rotate(45)" patternUnits="userSpaceOnUse">
          <line className="hatch-dark" x1={0.6} x2={0.6} y1={0} y2={7} />
          <line className="hatch-bright" x1={2} x2={2} y1={0} y2={7} />
        </pattern>
        <clipPath id={`${id}c`}>
          <path d={cells} />
        </clipPath>
        {rim ? (
          <clipPath id={`${id}r`}>
            <path d={rim.dark} clipRule="evenodd" />
          </clipPath>
        ) : null}
      </defs>
      <g clipPath={`url(#${id}c)`}>
        {areas.map(({ shade, area }, index) => (
          <path key={index} className={`seq-${shade}`} d={area} fillRule="evenodd" />
        ))}
        {areas.map(({ path }, index) => (path === "" ? null : <path key={index} className="band-line" d={path} />))}
      </g>
      <path className="plane-hatch" d={hatch.path} fill={`url(#${id}h)`} />
      <path className="plane-border" d={hatch.borders} />
      {rim ? (
        <g clipPath={`url(#${id}c)`}>
          <path className="plane-rim-bright" d={rim.line} />
          <path className="plane-rim-dark" d={rim.line} clipPath={`url(#${id}r)`} />
        </g>
      ) : null}
      {cells === "" ? (
        <text x={px((left + right) / 2)} y={px((top + bottom) / 2)} textAnchor="middle">
          No values in this quantity.
        </text>
      ) : null}
      {layout.kind === "map" ? (
        <rect className="axis" x={left} y={top} width={px(right - left)} height={bottom - top} />
      ) : (
        <path className="axis" d={framePath(layout)} />
      )}
      <EdgeLines layout={layout} edges={edges} />
      <DistanceTicks layout={layout} />
      {axis ? <EnergyTicks axis={layout.x} left={left} right={right} y={bottom} /> : null}
    </g>
  );
}

export const PlaneGround = memo(Ground);

/** Where values are known, as one code. */
const codesOfValues = (values: PlaneData["values"]) =>
  values.map((row) => row.map((value) => (value === null ? null : "value")));

/** A frame round each strip. */
function framePath({ x, y }: PlaneLayout): string {
  return x.groups
    .flatMap((column) =>
      y.groups.map((row) => `M${px(column.from)} ${px(row.from)}H${px(column.to)}V${px(row.to)}H${px(column.from)}Z`),
    )
    .join("");
}
