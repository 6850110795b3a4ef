/** Text that `place` has laid out along a row: what found no room is not drawn, the figure's label still says it. */
import { place, type Row, type Wish } from "./place.ts";
import { tenth } from "./drawing.ts";

export interface PlacedText extends Wish {
  readonly text: string;
  /** In place of the row's. */
  readonly className?: string;
}

interface Props {
  readonly texts: readonly PlacedText[];
  readonly row: Row;
  /** Baseline. */
  readonly y: number;
  readonly className: string;
  /** Foot and head of lines that lead from what is named to the text; without it none are drawn. */
  readonly leader?: { readonly from: number; readonly to: number };
}

export function ScalePlace({ texts, row, y, className, leader }: Props) {
  const middles = place(texts, row);
  return (
    <g>
      {texts.map(({ text, at, className: own }, index) => {
        const middle = middles[index] ?? null;
        if (middle === null) return null;
        return (
          <g key={index}>
            {leader ? (
              <path className="tick fig-open" d={`M${tenth(at)} ${leader.from}L${tenth(middle)} ${leader.to}`} />
            ) : null}
            <text className={own ?? className} x={tenth(middle)} y={y} textAnchor="middle">
              {text}
            </text>
          </g>
        );
      })}
    </g>
  );
}
