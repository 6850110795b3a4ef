/** The plane in a layout, with its cross: moved by pointer, touch and keys to the nearest point of the grid. */
import { type KeyboardEvent, type MouseEvent, type PointerEvent, useId, useMemo } from "react";
import { bandAreas, rimPaths } from "./areas.ts";
import type { Point } from "./contours.ts";
import { pointAt, stepBy } from "./keys.ts";
import { type PlaneLayout, px } from "./layout.ts";
import { PlaneGround } from "./PlaneGround.tsx";
import { PlaneLabels } from "./PlaneLabels.tsx";
import { markPlace, pickAt, PlaneMarks } from "./PlaneMarks.tsx";
import type { GridPoint, PlaneData, PlaneHandlers } from "./types.ts";
import { crossOf, planeName } from "./words.ts";

interface Props extends PlaneHandlers {
  readonly data: PlaneData;
  readonly layout: PlaneLayout;
  readonly axis?: boolean;
}

export function PlaneDrawing({ data, layout, axis = true, onCross, onKeep, onPick }: Props) {
  const described = useId();
  const { picks, values, bands, equal } = data;
  const better = data.quantity.better ?? "less";
  const areas = useMemo(() => bandAreas(values, bands, layout, better), [values, bands, layout, better]);
  const rim = useMemo(() => (equal ? rimPaths(equal, layout) : null), [equal, layout]);
  const marks = useMemo(() => picks.map((pick): Point => markPlace(layout, pick)), [picks, layout]);
  const cross = crossOf(data);
  const size = [data.energiesKeV.length, data.distancesM.length] as const;
  const empty = size[0] === 0 || size[1] === 0;

  const moveTo = (point: GridPoint): void => {
    if (!empty && (point.i !== cross.i || point.j !== cross.j)) onCross?.(point.i, point.j);
  };
  /** In the drawing's own px, also where the page is zoomed. */
  const placeOf = (event: MouseEvent): readonly [number, number] => {
    const box = event.currentTarget.getBoundingClientRect();
    return [
      ((event.clientX - box.left) / box.width) * layout.width,
      ((event.clientY - box.top) / box.height) * layout.height,
    ];
  };
  const inPlane = (left: number, top: number): boolean =>
    left >= layout.left - 8 && left <= layout.right + 8 && top >= layout.top - 8 && top <= layout.bottom + 8;
  const follow = (event: PointerEvent): void => {
    const [left, top] = placeOf(event);
    if (inPlane(left, top)) moveTo(pointAt(layout, left, top));
  };
  const onPointerDown = (event: PointerEvent): void => {
    const [left, top] = placeOf(event);
    if (!onPick || !pickAt(data, layout, left, top)) follow(event);
  };
  // A click and not a press: a finger that goes on to scroll the page has chosen nothing.
  const onClick = (event: MouseEvent): void => {
    const pick = pickAt(data, layout, ...placeOf(event));
    if (pick) onPick?.(pick.id);
  };
  const onKeyDown = (event: KeyboardEvent): void => {
    if (empty || event.ctrlKey || event.metaKey || event.altKey) return;
    if (event.key === "Enter") {
      event.preventDefault();
      onKeep?.(cross.i, cross.j);
      return;
    }
    const next = stepBy(event.key, event.shiftKey, cross, size);
    if (!next) return;
    event.preventDefault();
    moveTo(next);
  };

  return (
    <div
      className="plane"
      role="application"
      tabIndex={0}
      aria-label={planeName(data)}
      aria-describedby={picks.length > 0 ? described : undefined}
      onKeyDown={onKeyDown}
      onPointerDown={onPointerDown}
      onPointerMove={follow}
      onClick={onClick}
    >
      <svg
        className="chart"
        width={layout.width}
        height={layout.height}
        viewBox={`0 0 ${layout.width} ${layout.height}`}
        aria-hidden="true"
        data-export="plane"
      >
        <PlaneGround
          layout={layout}
          areas={areas}
          rim={rim}
          values={values}
          forbidden={data.forbidden}
          edges={data.edges}
          axis={axis}
        />
        {empty ? null : <Cross layout={layout} at={cross} />}
        <PlaneLabels layout={layout} areas={areas} rim={rim} equal={equal} forbidden={data.forbidden} marks={marks} />
        <PlaneMarks data={data} layout={layout} />
      </svg>
      {picks.length > 0 ? (
        <p className="sr-only" id={described}>
          {picks.map(({ id, words }) => `Pick ${id}: ${words}.`).join(" ")}
        </p>
      ) : null}
    </div>
  );
}

/** A dark line and a bright one beside it, so that one of them shows on every band. */
function Cross({ layout, at: { i, j } }: { layout: PlaneLayout; at: GridPoint }) {
  const { left, right, top, bottom, x, y } = layout;
  const [across, up] = [px(x.at[i]!), px(y.at[j]!)];
  return (
    <g>
      <rect className="cross-bright" x={px(across + 0.8)} y={top} width={1.5} height={bottom - top} />
      <rect className="cross-bright" x={left} y={px(up + 0.8)} width={px(right - left)} height={1.5} />
      <rect className="cross-dark" x={px(across - 0.7)} y={top} width={1.5} height={bottom - top} />
      <rect className="cross-dark" x={left} y={px(up - 0.7)} width={px(right - left)} height={1.5} />
      <rect className="cross-dark" x={px(across - 4)} y={px(up - 4)} width={8} height={8} />
    </g>
  );
}
