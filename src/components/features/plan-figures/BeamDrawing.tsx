/** The beam drawn large: sample to scale along it, a lens on the feature, source and detector with their sizes. */
import { type BeamLayout, layBeam } from "./beam-layout.ts";
import { beamWords, type BeamProps } from "./beam.ts";
import { Detector, FeatureShape, SampleBox, SourceBeam } from "./BeamParts.tsx";
import { PhoneWords, SideWords, Way } from "./BeamWords.tsx";
import { lengthText, tenth } from "./drawing.ts";
import { ScalePlace } from "./ScalePlace.tsx";
import { textWidth } from "./text-width.ts";

export function BeamDrawing(props: BeamProps) {
  const layout = layBeam(props);
  const { width } = props;
  const { height, y, left, top, bottom, slabs, phone, detector, spread } = layout;
  const start = phone ? 0 : 10;
  const thicknesses = slabs.map(({ thicknessMm, x, width: px, kind }) => {
    const text = lengthText(thicknessMm);
    return { text, at: x + px / 2, width: textWidth(text, 12.5, "figures"), weight: kind === "host" ? 1 : 0 };
  });
  return (
    <svg
      className="chart fig"
      width={width}
      height={height}
      viewBox={`0 0 ${width} ${height}`}
      role="img"
      aria-label={beamWords(props)}
    >
      <Cone beam={props} layout={layout} start={start} />
      {phone ? (
        <path className="axis" d={`M0 ${y}H${left}`} />
      ) : (
        <SourceBeam beam={props} from={start} to={left} y={y} half={spread.sample} stroke={8} />
      )}
      <SampleBox slabs={slabs} top={top} bottom={bottom} />
      <Feature beam={props} layout={layout} />
      <ScalePlace
        texts={thicknesses}
        row={{ ...layout.row, gap: 8 }}
        y={bottom + 24}
        className="t-num t-ink"
        leader={{ from: bottom + 1, to: bottom + 12 }}
      />
      {layout.caption.map((line, index) => (
        <text key={index} x={layout.captionAt.x} y={layout.captionAt.y + 17 * (index + 1 - layout.caption.length)}>
          {line}
        </text>
      ))}
      <Way beam={props} layout={layout} />
      <Detector x={detector} top={top} bottom={bottom} pixels={10} />
      {phone ? <PhoneWords beam={props} /> : <SideWords beam={props} layout={layout} start={start} />}
    </svg>
  );
}

/** The beam's body: it widens from a source, and does not from a parallel one. */
function Cone({ beam, layout, start }: { beam: BeamProps; layout: BeamLayout; start: number }) {
  const { y, left, right, detector, spread, phone } = layout;
  const parallel = beam.sourceDistanceM === null;
  // On a phone the source itself lies off the drawing.
  const first = parallel ? spread.sample : phone ? spread.sample * 0.8 : 1.5;
  const from = parallel || phone ? start : start + 6;
  const body = (x0: number, h0: number, x1: number, h1: number): string =>
    `M${x0} ${tenth(y - h0)}L${x1} ${tenth(y - h1)}V${tenth(y + h1)}L${x0} ${tenth(y + h0)}Z`;
  return (
    <path
      className="fig-beam"
      d={body(from, first, left, spread.sample) + body(right, spread.sample, detector, spread.detector)}
    />
  );
}

/** The feature where it stands, and a lens on it where it is too small to be seen. */
function Feature({ beam, layout }: { beam: BeamProps; layout: BeamLayout }) {
  const { feature: at, lens, y, host, top, bottom, phone } = layout;
  const { feature } = beam;
  const nameWidth = textWidth(beam.host.label, 13);
  const free = host.x + host.width - at.x - (lens ? 8 : at.r + 8);
  const labelWidth = textWidth(feature.label, 12);
  const labelX = lens?.inHost ? host.x + 6 : lens ? lens.x - labelWidth / 2 : at.x - labelWidth / 2;
  // Under a lens outside the host there is room; in the host only where the label is shorter, and the feature is not as high.
  const below = (bottom - top) / 2 - 18;
  const labelFits = lens && !lens.inHost ? !phone && labelX >= 70 : labelWidth <= host.width - 12 && at.r <= below;
  return (
    <g>
      <FeatureShape feature={feature} x={at.x} y={y} r={lens ? Math.max(at.r, 1.1) : at.r} />
      {nameWidth + 8 <= free ? (
        <text className="t-ink" x={tenth(host.x + host.width - free / 2)} y={top + 18} textAnchor="middle">
          {beam.host.label}
        </text>
      ) : null}
      {lens ? (
        <g>
          <path className="axis" d={lensLines(lens, at.x, y)} />
          <circle className="fig-lens" cx={tenth(lens.x)} cy={y} r={lens.r} />
          <FeatureShape feature={feature} x={lens.x} y={y - lens.r * 0.28} r={lens.r * 0.38} />
          <text className="t-ink fig-small" x={tenth(lens.x)} y={tenth(y + lens.r * 0.62)} textAnchor="middle">
            {lengthText(feature.sizeUm / 1000)}
          </text>
        </g>
      ) : null}
      {labelFits ? (
        <text className="t-ink fig-small" x={tenth(labelX)} y={bottom - 4}>
          {feature.label}
        </text>
      ) : null}
    </g>
  );
}

/** Two lines from the rim of the lens to the feature. */
function lensLines(lens: { x: number; r: number }, x: number, y: number): string {
  const side = x > lens.x ? 1 : -1;
  const from = tenth(lens.x + side * lens.r * 0.3);
  const rim = tenth(lens.r * 0.95);
  return `M${from} ${tenth(y - rim)}L${tenth(x)} ${y - 1.5}M${from} ${tenth(y + rim)}L${tenth(x)} ${y + 1.5}`;
}
