/** Axes of the plane: ticks and labels of energy below, of distance at the left, and the absorption edges as dotted lines. */
import { type AxisLayout, NARROW, type PlaneLayout, px } from "./layout.ts";
import type { PlaneData } from "./types.ts";

/** The energy axis below y; its label starts at the axis' left end. */
export function EnergyTicks({ axis, left, right, y }: { axis: AxisLayout; left: number; right: number; y: number }) {
  return (
    <g>
      <line className="axis" x1={px(left)} x2={px(right)} y1={y} y2={y} />
      {axis.ticks.map(({ at, label }) => (
        <g key={at}>
          <line className="tick" x1={px(at)} x2={px(at)} y1={y} y2={label ? y + 6 : y + 3} />
          {label ? (
            <text className="t-num" x={px(at)} y={y + 20} textAnchor="middle">
              {label}
            </text>
          ) : null}
        </g>
      ))}
      <text x={px(left)} y={y + 40}>
        {axis.label}
      </text>
    </g>
  );
}

export function DistanceTicks({ layout }: { layout: PlaneLayout }) {
  const { y, left, top, bottom, kind } = layout;
  const middle = px((top + bottom) / 2);
  return (
    <g>
      {kind === "rows" ? null : <line className="axis" x1={left} x2={left} y1={top} y2={bottom} />}
      {y.ticks.map(({ at, label }) => (
        <g key={at}>
          {kind === "rows" ? null : (
            <line className="tick" x1={label ? left - 6 : left - 3} x2={left} y1={px(at)} y2={px(at)} />
          )}
          {label ? (
            <text className="t-num" x={left - 9} y={px(at + 4)} textAnchor="end">
              {label}
            </text>
          ) : null}
        </g>
      ))}
      {kind === "rows" ? (
        <text x={0} y={top - 12}>
          {y.label}
        </text>
      ) : (
        <text x={12} y={middle} textAnchor="middle" transform={`rotate(-90 12 ${middle})`}>
          {y.label}
        </text>
      )}
    </g>
  );
}

/** Dotted lines, named on top; a name that would run into the one before it is left out. */
export function EdgeLines({ layout, edges }: { layout: PlaneLayout; edges: PlaneData["edges"] }) {
  if (layout.kind === "columns") return null;
  let taken = -Infinity;
  return (
    <g>
      {edges.map(({ name, energyKeV }) => {
        const x = layout.x.place(energyKeV);
        const words = layout.width < NARROW ? name : `${name} ${Number(energyKeV.toPrecision(4))}`;
        const length = words.length * 7 + 8;
        const start = Math.min(x + 3, layout.width - length);
        const named = start > taken && start + length > x;
        if (named) taken = start + length;
        return (
          <g key={`${name} ${energyKeV}`}>
            <line className="edge-line" x1={px(x)} x2={px(x)} y1={layout.top - 6} y2={layout.bottom} />
            {named ? (
              <text className="t-ink t-small" x={px(start)} y={layout.top - 10}>
                {words}
              </text>
            ) : null}
          </g>
        );
      })}
    </g>
  );
}
