/**
 * What a pick needs, on one log axis: phase above as double rings, absorption below as solid discs, the limit with what lies
 * beyond it hatched, and a bracket from the first phase pick to the best of absorption.
 */
import { formatGiven } from "#src/lib/format/numbers.ts";
import { tenth, withUnit } from "./drawing.ts";
import { layRuler, type RulerLayout } from "./ruler-layout.ts";
import { RULER, type RulerMark, type RulerProps } from "./ruler.ts";
import { Bracket, Interval, LimitZone, MarkName, SmallDisc, SmallRing } from "./RulerParts.tsx";
import { ScalePlace } from "./ScalePlace.tsx";
import { textWidth } from "./text-width.ts";

export type { RulerMark, RulerProps };

export function DoseRuler(props: RulerProps) {
  const { width, label, phase, absorption } = props;
  const layout = layRuler(props);
  const { toX, left, right, first, best } = layout;
  const { axis, height, ring, disc } = RULER;
  const labels = layout.ticks.flatMap(({ value, label: text, decade }) => {
    if (text === null) return [];
    const end = layout.range.includes(value);
    // The mono has no raised figures.
    const raised = /[⁰¹²³⁴⁵⁶⁷⁸⁹]/.test(text) ? { className: "" } : {};
    const weight = decade ? 2 : end ? 1 : 0;
    return [{ text, at: toX(value), width: textWidth(text, 12.5, "figures"), weight, ...raised }];
  });
  return (
    <svg
      className="chart fig"
      width={width}
      height={height}
      viewBox={`0 0 ${width} ${height}`}
      role="img"
      aria-label={rulerWords(props, layout)}
    >
      <LimitZone layout={layout} />
      <path className="axis" d={`M${left} ${axis}H${right}`} />
      {layout.ticks.map(({ value, label: text, decade }) => {
        const reach = decade ? 6 : 4;
        const x = tenth(toX(value));
        return (
          <path key={value} className={text === null ? "tick" : "axis"} d={`M${x} ${axis - reach}V${axis + reach}`} />
        );
      })}
      <ScalePlace
        texts={labels}
        row={{ left: left - 22, right: width, gap: 9, slack: 3 }}
        y={RULER.ticks}
        className="t-num"
      />
      <text x={0} y={RULER.ticks}>
        {label}
      </text>
      {phase.length > 0 ? (
        <text className="t-phase" x={0} y={60}>
          Phase
        </text>
      ) : null}
      {absorption.length > 0 ? (
        <text className="t-absorption" x={0} y={107}>
          Absorption
        </text>
      ) : null}
      <Bracket layout={layout} />
      <Interval props={props} layout={layout} />
      {absorption.map((mark, index) => (mark === best ? null : <SmallDisc key={index} x={tenth(toX(mark.value))} />))}
      {phase.map((mark, index) => (mark === first ? null : <SmallRing key={index} x={tenth(toX(mark.value))} />))}
      {layout.words.map(({ text, x, y }, index) => (
        <text key={index} className="fig-halo" x={tenth(x)} y={y}>
          {text}
        </text>
      ))}
      {first ? (
        <g>
          <path className="axis" d={`M${tenth(toX(first.value))} ${ring.y + ring.r}V${axis}`} />
          <circle className="fig-ring" cx={tenth(toX(first.value))} cy={ring.y} r={ring.r} strokeWidth={1} />
          <circle className="fig-ring" cx={tenth(toX(first.value))} cy={ring.y} r={10} strokeWidth={2} />
          <MarkName mark={first} x={toX(first.value)} y={ring.y} className="t-strong" />
        </g>
      ) : null}
      {best ? (
        <g>
          <path className="axis" d={`M${tenth(toX(best.value))} ${axis}V${disc.y - disc.r}`} />
          <circle className="dot-absorption" cx={tenth(toX(best.value))} cy={disc.y} r={disc.r} />
          <MarkName mark={best} x={toX(best.value)} y={disc.y} className="fig-on-disc" />
        </g>
      ) : null}
    </svg>
  );
}

/** The whole figure in words. */
function rulerWords(props: RulerProps, { range, limitSide }: RulerLayout): string {
  const { label, unit, phase, absorption, limit, ratioWords, interval } = props;
  const say = (value: number): string => withUnit(formatGiven(value, 3), unit);
  const side = (name: string, marks: readonly RulerMark[]): string[] =>
    marks.length === 0 ? [] : [`${name}: ${marks.map(({ id, value }) => `pick ${id} ${say(value)}`).join(", ")}`];
  const off = limitSide === "above" ? ", above the axis" : limitSide === "below" ? ", below the axis" : "";
  return [
    `${label.split(",")[0] ?? label} ruler, ${formatGiven(range[0], 3)} to ${say(range[1])}, log scale`,
    ...side("Phase", phase),
    ...side("Absorption", absorption),
    ...(interval
      ? [`Uncertainty ${formatGiven(interval[0], 3)} to ${Number.isFinite(interval[1]) ? say(interval[1]) : "no end"}`]
      : []),
    ...(limit ? [`Limit: ${limit.words}${off}`] : []),
    ...(ratioWords === null ? [] : [ratioWords]),
  ]
    .join(". ")
    .concat(".");
}
