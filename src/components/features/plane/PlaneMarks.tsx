/** Marks of picks: phase a double ring, absorption a solid disc, the chosen one larger and on top. */
import type { Technique } from "#src/lib/format/quantities.ts";
import { type PlaneLayout, px } from "./layout.ts";
import type { PlaneData, PlanePick } from "./types.ts";

export function PlaneMark(props: { technique: Technique; id: string; x: number; y: number; chosen: boolean }) {
  const { technique, id, chosen } = props;
  const [x, y] = [px(props.x), px(props.y)];
  const r = chosen ? 12 : 9.5;
  return (
    <g className="plane-mark">
      {technique === "phase" ? (
        <>
          <circle className="mark-ground" cx={x} cy={y} r={r + 5} />
          <circle className="mark-ring" cx={x} cy={y} r={r + 3.6} strokeWidth={1} />
          <circle className="mark-ring" cx={x} cy={y} r={r} strokeWidth={chosen ? 2.6 : 2} />
        </>
      ) : (
        <>
          <circle className="mark-ground" cx={x} cy={y} r={r + 4} />
          <circle className="mark-disc" cx={x} cy={y} r={r + 2.5} />
        </>
      )}
      <text
        className={technique === "phase" ? "mark-id" : "mark-id mark-id-disc"}
        x={x}
        y={px(y + 4.5)}
        textAnchor="middle"
      >
        {id}
      </text>
    </g>
  );
}

export const markPlace = ({ x, y }: PlaneLayout, pick: PlanePick): readonly [number, number] => [
  px(x.place(pick.energyKeV)),
  px(y.place(pick.distanceM)),
];

export function PlaneMarks({ data, layout }: { data: PlaneData; layout: PlaneLayout }) {
  const { picks, chosen } = data;
  const inOrder = [...picks.filter(({ id }) => id !== chosen).reverse(), ...picks.filter(({ id }) => id === chosen)];
  return (
    <g>
      {inOrder.map((pick) => {
        const [x, y] = markPlace(layout, pick);
        return (
          <PlaneMark key={pick.id} technique={pick.technique} id={pick.id} x={x} y={y} chosen={pick.id === chosen} />
        );
      })}
    </g>
  );
}

/** The pick under a pointer, the nearest within reach; null where there is none. */
export function pickAt(data: PlaneData, layout: PlaneLayout, left: number, top: number): PlanePick | null {
  let best: { pick: PlanePick; off: number } | null = null;
  for (const pick of data.picks) {
    const [x, y] = markPlace(layout, pick);
    const off = Math.hypot(x - left, y - top) - (pick.id === data.chosen ? 3 : 0);
    if (off <= 14 && (best === null || off < best.off)) best = { pick, off };
  }
  return best?.pick ?? null;
}
