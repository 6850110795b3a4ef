/** What both drawings of the beam are made of: source, sample, way to the detector, detector. */
import { type BeamProps, LEAST_DRAWN, type Slab, sourceText } from "./beam.ts";
import { tenth } from "./drawing.ts";
import { textWidth } from "./text-width.ts";

/** From the source to the sample: a point and a broken line, or parallel lines. */
export function SourceBeam(props: {
  beam: BeamProps;
  from: number;
  to: number;
  y: number;
  /** Half the beam's height at the sample. */
  half: number;
  /** Half the height of the break's strokes. */
  stroke: number;
  /** Words that stand in the middle one of parallel lines. */
  words?: string;
}) {
  const { from, to, y, half, stroke, words } = props;
  const cut = tenth(from + (to - from) * 0.5);
  if (props.beam.sourceDistanceM === null) {
    const outer = [y - half, y + half].map((each) => `M${from} ${tenth(each)}H${to}`).join("");
    const room = words ? textWidth(words, 13) / 2 + 6 : 0;
    return (
      <g>
        <path className="axis" d={`${outer}M${from} ${y}H${tenth(cut - room)}M${tenth(cut + room)} ${y}H${to}`} />
        {words ? (
          <text className="t-ink" x={cut} y={y + 4.5} textAnchor="middle">
            {words}
          </text>
        ) : null}
      </g>
    );
  }
  return (
    <g>
      <circle className="fig-solid" cx={from + 4} cy={y} r={4} />
      <path className="axis" d={`M${from + 9} ${y}H${cut - 7}M${cut + 7} ${y}H${to}`} />
      <path
        className="axis"
        d={[-5, 5].map((x) => `M${cut + x - 3} ${y + stroke}L${cut + x + 3} ${y - stroke}`).join("")}
      />
    </g>
  );
}

/** Host and layers to scale; what is thinner than a line is drawn as one. */
export function SampleBox({ slabs, top, bottom }: { slabs: readonly Slab[]; top: number; bottom: number }) {
  // Thin ones last, so that a thick neighbour's edge does not hide them.
  const order = [...slabs.filter(({ thin }) => !thin), ...slabs.filter(({ thin }) => thin)];
  return (
    <g>
      {order.map(({ kind, x, width, thin }, index) => (
        <rect
          key={index}
          className={thin ? "fig-solid" : kind === "host" ? "fig-host" : "fig-layer"}
          x={tenth(thin ? x + width / 2 - Math.max(width, LEAST_DRAWN) / 2 : x)}
          y={top}
          width={tenth(Math.max(width, LEAST_DRAWN))}
          height={bottom - top}
        />
      ))}
    </g>
  );
}

/** The feature in section, to scale between its two directions, in a square of 2 r. */
export function FeatureShape({ feature, x, y, r }: { feature: BeamProps["feature"]; x: number; y: number; r: number }) {
  if (feature.shape !== "layer") {
    return (
      <g>
        <circle className="fig-feature" cx={tenth(x)} cy={tenth(y)} r={tenth(r)} />
        {/* A fibre is seen end on: its axis as a point. */}
        {feature.shape === "fibre" && r >= 8 ? (
          <circle className="fig-bright" cx={tenth(x)} cy={tenth(y)} r={1.6} />
        ) : null}
      </g>
    );
  }
  const across = feature.widthUm ?? feature.sizeUm;
  const most = Math.max(feature.sizeUm, across) || 1;
  const [width, height] = [feature.sizeUm, across].map((size) => Math.max((2 * r * size) / most, 2)) as [
    number,
    number,
  ];
  return (
    <rect
      className="fig-feature"
      x={tenth(x - width / 2)}
      y={tenth(y - height / 2)}
      width={tenth(width)}
      height={tenth(height)}
    />
  );
}

/** From sample to detector in the technique's hand; dotted while no distance is chosen. */
export function DistanceLine(props: { beam: BeamProps; from: number; to: number; y: number; gap?: [number, number] }) {
  const { beam, y, gap } = props;
  const [from, to] = [tenth(props.from), tenth(props.to)];
  const runs =
    gap && gap[0] > from && gap[1] < to ? [[from, tenth(gap[0])] as const, [tenth(gap[1]), to] as const] : [];
  const path = (at: number): string =>
    (runs.length > 0 ? runs : [[from, to] as const]).map(([a, b]) => `M${a} ${at}H${b}`).join("");
  if (beam.distanceM === null) return <path className="edge-line" d={path(y)} />;
  const head = to - from > 14 ? `M${to - 2} ${y - 6}l7 6l-7 6` : "";
  if (beam.technique === "phase") {
    return <path className="fig-way-phase" d={path(y - 2.2) + path(y + 2.2) + head} />;
  }
  return <path className="curve-absorption" d={path(y) + head} />;
}

export function Detector({ x, top, bottom, pixels }: { x: number; top: number; bottom: number; pixels: number }) {
  const ticks = Array.from({ length: pixels - 1 }, (_, index) => tenth(top + ((index + 1) * (bottom - top)) / pixels));
  return (
    <g>
      <rect className="fig-solid" x={tenth(x)} y={top} width={pixels > 1 ? 9 : 7} height={bottom - top} />
      {ticks.length > 0 ? (
        <path className="fig-pixel" d={ticks.map((y) => `M${tenth(x - 1)} ${y}h11`).join("")} />
      ) : null}
    </g>
  );
}

/** Distance of the source, or "parallel", over its line. */
export function SourceText({ beam, x, y }: { beam: BeamProps; x: number; y: number }) {
  return (
    <text className={beam.sourceDistanceM === null ? "t-ink" : "t-num t-ink"} x={tenth(x)} y={y} textAnchor="middle">
      {sourceText(beam)}
    </text>
  );
}

/** Room that a distance needs in its line, px. */
export function wordsRoom(words: string): number {
  return textWidth(words, 13, "figures") + 20;
}
