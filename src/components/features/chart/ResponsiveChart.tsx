/** Draws a chart at its container's width. Until that is known (no scripts, first paint) a wide and a narrow drawing are served. */
import type { ReactNode } from "react";
import { useWidth } from "./useWidth.ts";

interface Props {
  readonly draw: (width: number) => ReactNode;
  readonly stale?: boolean;
  /** Widths in px of the two served drawings. */
  readonly served?: { readonly wide: number; readonly narrow: number };
}

export function ResponsiveChart({ draw, stale = false, served = { wide: 1000, narrow: 358 } }: Props) {
  const { ref, width } = useWidth<HTMLDivElement>();
  return (
    <div ref={ref} className={stale ? "chart-stale" : undefined}>
      {width === null ? (
        <>
          <div className="wide-only">{draw(served.wide)}</div>
          <div className="phone-only">{draw(served.narrow)}</div>
        </>
      ) : (
        draw(Math.max(width, 280))
      )}
    </div>
  );
}
