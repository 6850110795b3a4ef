/** Words on the plane, over the cross: thresholds on the lines between bands, and where absorption needs less. */
import { memo, useMemo } from "react";
import type { BandArea, RimPaths } from "./areas.ts";
import type { Point } from "./contours.ts";
import { LABEL_HEIGHT, placeLabels, placeSide } from "./labels.ts";
import { type PlaneLayout, px } from "./layout.ts";
import type { PlaneData } from "./types.ts";

interface Props {
  readonly layout: PlaneLayout;
  readonly areas: readonly BandArea[];
  readonly rim: RimPaths | null;
  readonly equal: PlaneData["equal"];
  readonly forbidden: PlaneData["forbidden"];
  /** Places of the marks, which labels keep clear of. */
  readonly marks: readonly Point[];
}

const SIDE_BOX = [92, 36] as const;

function Labels({ layout, areas, rim, equal, forbidden, marks }: Props) {
  const labels = useMemo(
    () =>
      placeLabels(
        areas.filter(({ text }) => text !== ""),
        layout,
        marks,
        forbidden,
      ),
    [areas, layout, marks, forbidden],
  );
  const side = useMemo(
    () => (equal && rim ? placeSide(equal, layout, SIDE_BOX, marks, labels) : null),
    [equal, rim, layout, marks, labels],
  );
  return (
    <g>
      {labels.map(({ x, y, text, width }) => (
        <g key={text}>
          <rect
            className="band-pill"
            x={px(x - width / 2)}
            y={px(y - LABEL_HEIGHT / 2)}
            width={width}
            height={LABEL_HEIGHT}
            rx={9}
          />
          <text className="t-num t-ink" x={x} y={px(y + 4.5)} textAnchor="middle">
            {text}
          </text>
        </g>
      ))}
      {side ? (
        <g>
          <rect
            className="band-pill"
            x={px(side[0] - SIDE_BOX[0] / 2)}
            y={px(side[1] - SIDE_BOX[1] / 2)}
            width={SIDE_BOX[0]}
            height={SIDE_BOX[1]}
          />
          <text className="t-ink t-small" textAnchor="middle" y={px(side[1] - 4)}>
            <tspan x={side[0]}>absorption</tspan>
            <tspan x={side[0]} dy={15}>
              needs less
            </tspan>
          </text>
        </g>
      ) : null}
    </g>
  );
}

export const PlaneLabels = memo(Labels);
