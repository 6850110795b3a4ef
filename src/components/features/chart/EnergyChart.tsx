/**
 * Curves over photon energy. Absorption is one solid line, phase a double one; names stand at the lines' ends, never in a
 * legend. The movable energy line is a slider for pointer and keyboard. Drawn the same on the server and in the browser.
 */
import { useId } from "react";
import type { EdgeView } from "#src/lib/lookup/view.ts";
import { ChartLine, type Technique } from "./ChartLine.tsx";
import { EnergyCursor } from "./EnergyCursor.tsx";
import {
  curvePath,
  decadeTicks,
  energyScale,
  energyTicks,
  type Frame,
  linearScale,
  logDomain,
  logScale,
  spreadLabels,
} from "./scales.ts";

export interface ChartCurve {
  readonly key: string;
  /** Symbol or short name, and a word after it. */
  readonly name: string;
  readonly word: string;
  readonly technique: Technique;
  readonly energiesKeV: readonly number[];
  /** Drawn by absolute value; negative stretches are dashed. */
  readonly values: readonly (number | null)[];
  /** Exactly at the cursor. */
  readonly atEnergy: number | null;
  /** Tells curves of one technique apart when several materials are shown. */
  readonly dash?: string;
}

export interface SpreadStrip {
  readonly energiesKeV: readonly number[];
  /** As shares of the value. */
  readonly delta: readonly (number | null)[];
  readonly beta: readonly (number | null)[];
}

interface Props {
  readonly width: number;
  readonly rangeKeV: readonly [number, number];
  readonly curves: readonly ChartCurve[];
  readonly edges: readonly EdgeView[];
  readonly strip: SpreadStrip | null;
  readonly cursorKeV: number | null;
  /** Said of the cursor's place by a screen reader. */
  readonly cursorText: string;
  readonly title: string;
  readonly emptyText?: string;
  readonly onMove?: (energyKeV: number) => void;
}

const STRIP_HEIGHT = 58;
const STRIP_GAP = 22;
/** Widest spread drawn; beyond it the strip's line runs along its top, and the table has the number. */
const STRIP_MAX = 0.2;

export function EnergyChart(props: Props) {
  const { width, rangeKeV, curves, edges, strip, cursorKeV } = props;
  const clip = useId();
  const narrow = width < 560;
  const height = (narrow ? 300 : 380) + (strip ? STRIP_HEIGHT + STRIP_GAP : 0);
  const frame: Frame = { width, height, left: 56, right: narrow ? 14 : 118, top: 26, bottom: 48 };
  const plotBottom = height - frame.bottom - (strip ? STRIP_HEIGHT + STRIP_GAP : 0);
  const { toX, toKeV } = energyScale(frame, rangeKeV);
  const domain = logDomain(curves.map((curve) => curve.values));
  const toY = domain ? logScale(domain, plotBottom, frame.top) : null;
  const plotRight = width - frame.right;

  return (
    <svg
      className="chart"
      width={width}
      height={height}
      viewBox={`0 0 ${width} ${height}`}
      role="group"
      aria-label={props.title}
      data-export="curves"
    >
      <clipPath id={clip}>
        <rect x={frame.left} y={0} width={plotRight - frame.left} height={height} />
      </clipPath>
      {domain && toY ? (
        <DecadeAxis domain={domain} toY={toY} left={frame.left} right={plotRight} top={frame.top} bottom={plotBottom} />
      ) : null}
      <EdgeMarks
        edges={edges}
        toX={toX}
        top={frame.top}
        bottom={height - frame.bottom}
        narrow={narrow}
        right={plotRight}
      />
      {toY ? (
        <g clipPath={`url(#${clip})`}>
          {curves.map((curve) => (
            <CurveLine key={curve.key} curve={curve} toX={toX} toY={toY} />
          ))}
        </g>
      ) : (
        <text x={(frame.left + plotRight) / 2} y={(frame.top + plotBottom) / 2} textAnchor="middle">
          {props.emptyText ?? "Nothing to draw in this range."}
        </text>
      )}
      {toY ? <EndNames curves={curves} toX={toX} toY={toY} frame={frame} bottom={plotBottom} narrow={narrow} /> : null}
      {strip ? (
        <Strip
          strip={strip}
          toX={toX}
          frame={frame}
          top={plotBottom + STRIP_GAP}
          bottom={height - frame.bottom}
          clip={clip}
          narrow={narrow}
        />
      ) : null}
      <EnergyAxis
        frame={frame}
        rangeKeV={rangeKeV}
        y={height - frame.bottom}
        hideNear={cursorKeV === null ? null : toX(cursorKeV)}
      />
      {cursorKeV !== null && toY ? (
        <EnergyCursor
          energyKeV={cursorKeV}
          rangeKeV={rangeKeV}
          x={toX(cursorKeV)}
          top={frame.top}
          bottom={height - frame.bottom}
          left={frame.left}
          right={plotRight}
          toKeV={toKeV}
          text={props.cursorText}
          points={curves.flatMap((curve) => {
            const value = curve.atEnergy;
            return value === null || value === 0
              ? []
              : [{ key: curve.key, technique: curve.technique, y: toY(Math.abs(value)) }];
          })}
          {...(props.onMove ? { onMove: props.onMove } : {})}
        />
      ) : null}
    </svg>
  );
}

/** The curve's value at an energy, log-log between its points; null outside them. */
export function valueAt(curve: Pick<ChartCurve, "energiesKeV" | "values">, energyKeV: number): number | null {
  const { energiesKeV, values } = curve;
  let after = energiesKeV.findIndex((energy) => energy > energyKeV);
  if (after === -1) after = energiesKeV.at(-1) === energyKeV ? energiesKeV.length - 1 : -1;
  if (after <= 0) return energiesKeV[0] === energyKeV ? (values[0] ?? null) : null;
  // On a point its own value stands: no rounding of logarithms may come between.
  if (energiesKeV[after - 1] === energyKeV) return values[after - 1] ?? null;
  const [x0, x1] = [energiesKeV[after - 1] as number, energiesKeV[after] as number];
  const [y0, y1] = [values[after - 1], values[after]];
  if (y0 == null || y1 == null) return null;
  const share = Math.log(energyKeV / x0) / Math.log(x1 / x0);
  return y0 * y1 > 0
    ? Math.sign(y0) * Math.exp(Math.log(Math.abs(y0)) + share * Math.log(y1 / y0))
    : y0 + share * (y1 - y0);
}

function CurveLine({
  curve,
  toX,
  toY,
}: {
  curve: ChartCurve;
  toX: (keV: number) => number;
  toY: (value: number) => number;
}) {
  const xs = curve.energiesKeV.map(toX);
  const of = (keep: (value: number) => boolean): string =>
    curvePath(
      xs,
      curve.values.map((value) => (value !== null && keep(value) ? toY(Math.abs(value)) : null)),
    );
  const negative = of((value) => value < 0);
  return (
    <>
      <ChartLine technique={curve.technique} path={of((value) => value > 0)} dash={curve.dash} />
      {negative ? <ChartLine technique={curve.technique} path={negative} dash="2 5" /> : null}
    </>
  );
}

function DecadeAxis(props: {
  domain: readonly [number, number];
  toY: (value: number) => number;
  left: number;
  right: number;
  top: number;
  bottom: number;
}) {
  const { decades, small } = decadeTicks(props.domain, props.toY);
  return (
    <g>
      {decades.map(({ exponent, at }) => (
        <g key={exponent}>
          <line className="grid-line" x1={props.left} x2={props.right} y1={at} y2={at} />
          <text className="t-num" x={props.left - 8} y={at + 4} textAnchor="end">
            {exponent >= -2 && exponent <= 4 ? (
              String(Number(`1e${exponent}`))
            ) : (
              <>
                10
                <tspan dy={-5} fontSize={10}>
                  {exponent < 0 ? `−${-exponent}` : exponent}
                </tspan>
              </>
            )}
          </text>
        </g>
      ))}
      {small.map((at) => (
        <line key={at} className="tick" x1={props.left} x2={props.left + 4} y1={at} y2={at} />
      ))}
      <line className="axis" x1={props.left} x2={props.left} y1={props.top} y2={props.bottom} />
      <line className="axis" x1={props.left} x2={props.right} y1={props.bottom} y2={props.bottom} />
    </g>
  );
}

function EnergyAxis({
  frame,
  rangeKeV,
  y,
  hideNear,
}: {
  frame: Frame;
  rangeKeV: readonly [number, number];
  y: number;
  hideNear: number | null;
}) {
  return (
    <g>
      <line className="axis" x1={frame.left} x2={frame.width - frame.right} y1={y} y2={y} />
      {energyTicks(frame, rangeKeV).map(({ value, at, label }) => (
        <g key={value}>
          <line className="tick" x1={at} x2={at} y1={y} y2={y + (label ? 6 : 3)} />
          {label && (hideNear === null || Math.abs(hideNear - at) > 48) ? (
            <text className="t-num" x={at} y={y + 20} textAnchor="middle">
              {label}
            </text>
          ) : null}
        </g>
      ))}
      <text x={frame.left} y={y + 40}>
        Photon energy, keV, log scale
      </text>
    </g>
  );
}

/** Dotted lines with names at the top; a name that would run into the one before it is left to the table. */
function EdgeMarks(props: {
  edges: readonly EdgeView[];
  toX: (keV: number) => number;
  top: number;
  bottom: number;
  narrow: boolean;
  right: number;
}) {
  let taken = -Infinity;
  const marks = props.edges.map((edge) => {
    const x = props.toX(edge.energyKeV);
    const words = `${edge.element} ${edge.shell}${props.narrow ? "" : ` ${Number(edge.energyKeV.toPrecision(4))}`}`;
    const width = words.length * 7 + 10;
    const named = x > taken && x + width < props.right + 40;
    if (named) taken = x + width;
    return { edge, x, words: named ? words : null };
  });
  return (
    <g>
      {marks.map(({ edge, x, words }) => (
        <g key={`${edge.element}${edge.shell}`}>
          <line className="edge-line" x1={x} x2={x} y1={props.top} y2={props.bottom} />
          {words ? (
            <text className="t-ink" x={x + 3} y={props.top - 9} fontSize={12}>
              {words}
            </text>
          ) : null}
        </g>
      ))}
    </g>
  );
}

/** Width of a letter of a name, px: a guess that leaves room. */
const LETTER_WIDTH = 7.5;

function EndNames(props: {
  curves: readonly ChartCurve[];
  toX: (keV: number) => number;
  toY: (value: number) => number;
  frame: Frame;
  bottom: number;
  narrow: boolean;
}) {
  const ends = props.curves.flatMap((curve) => {
    const last = curve.values.findLastIndex((value) => value !== null && value !== 0);
    const value = curve.values[last];
    const energyKeV = curve.energiesKeV[last];
    if (value == null || energyKeV === undefined) return [];
    const x = props.toX(energyKeV);
    const y = props.toY(Math.abs(value));
    // On a narrow chart the name stands above its line: above the highest point the line has below the name.
    const start = x - (curve.name.length + curve.word.length + 1) * LETTER_WIDTH;
    const highest = curve.values.reduce<number>(
      (top, each, index) =>
        each !== null && each !== 0 && props.toX(curve.energiesKeV[index] ?? 0) >= start
          ? Math.min(top, props.toY(Math.abs(each)))
          : top,
      y,
    );
    return [{ curve, x, y: props.narrow ? highest - 9 : y + 4 }];
  });
  const ys = spreadLabels(
    ends.map(({ y }) => y),
    17,
    props.frame.top + 10,
    props.bottom - 2,
  );
  return (
    <g>
      {ends.map(({ curve, x }, index) => (
        <text
          key={curve.key}
          className={curve.technique === "ink" ? "t-strong" : `t-${curve.technique}`}
          x={props.narrow ? x - 2 : x + 8}
          y={ys[index]}
          textAnchor={props.narrow ? "end" : "start"}
        >
          {curve.name}
          <tspan dx={4} fontSize={12}>
            {curve.word}
          </tspan>
        </text>
      ))}
    </g>
  );
}

function Strip(props: {
  strip: SpreadStrip;
  toX: (keV: number) => number;
  frame: Frame;
  top: number;
  bottom: number;
  clip: string;
  narrow: boolean;
}) {
  const { strip, frame, top, bottom } = props;
  const most = Math.max(0.01, ...[...strip.delta, ...strip.beta].map((value) => value ?? 0));
  const max = most <= 0.05 ? 0.05 : most <= 0.1 ? 0.1 : STRIP_MAX;
  const toY = linearScale([0, max], bottom, top);
  const xs = strip.energiesKeV.map(props.toX);
  const path = (values: readonly (number | null)[]): string =>
    curvePath(
      xs,
      values.map((value) => (value === null ? null : toY(value))),
    );
  const right = frame.width - frame.right;
  const lastOf = (values: readonly (number | null)[]): number => {
    const value = values.findLast((entry) => entry !== null);
    return value == null ? bottom : toY(value);
  };
  const [betaY = 0, deltaY = 0] = spreadLabels([lastOf(strip.beta) + 4, lastOf(strip.delta) + 4], 15, top, bottom + 4);
  return (
    <g>
      {[0, max / 2, max].map((value) => (
        <g key={value}>
          <line className="grid-line" x1={frame.left} x2={right} y1={toY(value)} y2={toY(value)} />
          <text className="t-num" x={frame.left - 8} y={toY(value) + 4} textAnchor="end">
            {`${Number((value * 100).toPrecision(3))} %`}
          </text>
        </g>
      ))}
      <g clipPath={`url(#${props.clip})`}>
        <ChartLine technique="absorption" path={path(strip.beta)} dash={undefined} />
        <ChartLine technique="phase" path={path(strip.delta)} dash={undefined} />
      </g>
      {props.narrow ? null : (
        <>
          <text className="t-absorption" x={right + 8} y={betaY} fontSize={12}>
            β spread
          </text>
          <text className="t-phase" x={right + 8} y={deltaY} fontSize={12}>
            δ spread
          </text>
        </>
      )}
    </g>
  );
}
