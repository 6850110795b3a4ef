/** What stands on the ruler: marks, the limit's zone, the bracket, the interval. */
import { hatchPath, tenth } from "./drawing.ts";
import type { RulerLayout } from "./ruler-layout.ts";
import { RULER, type RulerMark, type RulerProps } from "./ruler.ts";
import { textWidth } from "./text-width.ts";

/** Names of up to two letters fit the mark. */
export function MarkName({ mark, x, y, className }: { mark: RulerMark; x: number; y: number; className: string }) {
  if (mark.id.length > 2) return null;
  return (
    <text className={className} x={tenth(x)} y={y + 4.6} textAnchor="middle">
      {mark.id}
    </text>
  );
}

export function SmallRing({ x }: { x: number }) {
  const { y, r } = RULER.smallRing;
  return (
    <g>
      <path className="tick" d={`M${x} ${y + r}V${RULER.axis}`} />
      <circle className="fig-ring" cx={x} cy={y} r={r} strokeWidth={1} />
      <circle className="fig-ring" cx={x} cy={y} r={2.3} strokeWidth={1.4} />
    </g>
  );
}

export function SmallDisc({ x }: { x: number }) {
  const { y, r } = RULER.smallDisc;
  return (
    <g>
      <path className="tick" d={`M${x} ${RULER.axis}V${y}`} />
      <circle className="dot-absorption" cx={x} cy={y} r={r} />
    </g>
  );
}

/** Hatch from the limit on, and its rim line where the limit lies on the axis. */
export function LimitZone({ layout }: { layout: RulerLayout }) {
  const { limitSide, limitX, limitTop, right, limitWords } = layout;
  if (limitSide === null) return null;
  const { hatch } = RULER;
  const zone = { x: tenth(limitX), y: hatch.top, width: tenth(right - limitX), height: hatch.bottom - hatch.top };
  const { bottom } = RULER.limit;
  return (
    <g>
      {zone.width > 0 ? (
        <>
          <path className="fig-hatch" d={hatchPath(zone)} />
          <path className="fig-hatch-bright" d={hatchPath(zone, 1.4)} />
          <rect className="fig-hatch-edge" {...zone} />
        </>
      ) : null}
      {limitSide === "on" ? (
        <>
          <path className="rim-dark" d={`M${tenth(limitX)} ${limitTop}V${bottom}`} />
          <path className="rim-bright" d={`M${tenth(limitX + 2)} ${limitTop}V${bottom}`} />
        </>
      ) : null}
      {limitWords ? (
        <text className="t-ink" x={tenth(limitWords.x)} y={limitWords.y}>
          {limitWords.text}
        </text>
      ) : null}
    </g>
  );
}

export function Bracket({ layout: { bracket } }: { layout: RulerLayout }) {
  if (!bracket) return null;
  const { from, to, words, gap } = bracket;
  const { y } = RULER.bracket;
  const { ring, disc } = RULER;
  const [low, high] = [Math.min(from, to), Math.max(from, to)];
  const half = words && gap ? textWidth(words.text, RULER.bracket.size, "bold") / 2 + 8 : 0;
  const bar =
    words && gap
      ? `M${tenth(low)} ${y}H${tenth(words.x - half)}M${tenth(words.x + half)} ${y}H`
      : `M${tenth(low)} ${y}H`;
  // Where the legs would run through the other mark, the two stand one above the other and need no bracket.
  const apart = high - low > ring.r + 2;
  return (
    <g>
      {apart ? (
        <path
          className="axis"
          d={`M${tenth(from)} ${tenth(ring.y - ring.r - 2)}V${y}M${tenth(to)} ${disc.y - disc.r}V${y}${bar}${tenth(high)}`}
        />
      ) : null}
      {words ? (
        <text className="t-strong fig-bracket" x={tenth(words.x)} y={words.y} textAnchor="middle">
          {words.text}
        </text>
      ) : null}
    </g>
  );
}

/** A double bar (phase) or a solid one, with end ticks; an arrow where an end lies off the axis. */
export function Interval({ props, layout }: { props: RulerProps; layout: RulerLayout }) {
  const { interval, intervalOf = layout.first ? "phase" : "absorption" } = props;
  const { range, toX } = layout;
  if (!interval || !(intervalOf === "phase" ? layout.first : layout.best)) return null;
  const [from, to] = [tenth(toX(Math.min(...interval))), tenth(toX(Math.max(...interval)))];
  const y = intervalOf === "phase" ? RULER.interval : 2 * RULER.axis - RULER.interval;
  // The arrow stands beyond the axis, where the bar would go on.
  const end = (x: number, off: boolean, turn: 1 | -1): string =>
    off
      ? `M${tenth(x + 2 * turn)} ${y - 6}L${tenth(x + 9 * turn)} ${y}L${tenth(x + 2 * turn)} ${y + 6}`
      : `M${x} ${y - 6}V${y + 6}`;
  return (
    <g>
      {intervalOf === "phase" ? (
        <path className="fig-bar-phase" d={`M${from} ${y - 2.6}H${to}M${from} ${y + 2.6}H${to}`} />
      ) : (
        <path className="fig-bar-absorption" d={`M${from} ${y}H${to}`} />
      )}
      <path
        className="axis"
        d={end(from, Math.min(...interval) < range[0], -1) + end(to, Math.max(...interval) > range[1], 1)}
      />
    </g>
  );
}
