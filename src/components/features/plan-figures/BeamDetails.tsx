/**
 * The beam on one line, which opens to the full drawing. Plain `details`, so it works without scripts; with them both are
 * redrawn at the width there is.
 */
import { useWidth } from "../chart/useWidth.ts";
import type { BeamProps } from "./beam.ts";
import { BeamDrawing } from "./BeamDrawing.tsx";
import { BeamLine } from "./BeamLine.tsx";

export interface BeamDetailsProps extends Omit<BeamProps, "width"> {
  /** Whether it is served open; whoever reads may change it. */
  readonly open?: boolean;
}

/** Widths in px of the two drawings that are served before the true width is known. */
const SERVED = { wide: 1168, narrow: 358 };
/** What the words at the end of the line take, px. */
const WORDS = 150;
/** A longer line is no clearer. */
const LONGEST_LINE = 1000;
const SHORTEST = 280;

export function BeamDetails({ open = false, ...beam }: BeamDetailsProps) {
  const { ref, width } = useWidth<HTMLDetailsElement>();
  const lineWidth = Math.min(Math.max((width ?? SERVED.wide) - WORDS, SHORTEST), LONGEST_LINE);
  return (
    <details ref={ref} className="draw" open={open}>
      <summary data-shortcut="d">
        <span className="draw-line">
          <BeamLine {...beam} width={lineWidth} />
        </span>
        <span className="draw-say draw-more">Draw it larger</span>
        <span className="draw-say draw-less">Close the drawing</span>
      </summary>
      {width === null ? (
        <>
          <div className="wide-only">
            <BeamDrawing {...beam} width={SERVED.wide} />
          </div>
          <div className="phone-only">
            <BeamDrawing {...beam} width={SERVED.narrow} />
          </div>
        </>
      ) : (
        <BeamDrawing {...beam} width={Math.max(width, SHORTEST)} />
      )}
    </details>
  );
}
