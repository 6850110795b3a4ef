/** The whole beam on one line of 34 px: source, sample to scale, way to the detector. */
import { beamWords, type BeamProps, micrometres, slabsAlong, sourceText } from "./beam.ts";
import { Detector, DistanceLine, SampleBox, SourceBeam, SourceText, wordsRoom } from "./BeamParts.tsx";
import { tenth } from "./drawing.ts";
import { textWidth } from "./text-width.ts";

const HEIGHT = 34;
const Y = 17;

export function BeamLine(props: BeamProps) {
  const { width, distanceM, distanceWords, pixelUm, sourceDistanceM } = props;
  const pixelText = `${micrometres(pixelUm)} pixels`;
  const roomy = width >= 560;
  const left = roomy ? Math.round(width * 0.19) : Math.round(width * 0.2);
  const right = left + Math.round(width * (roomy ? 0.14 : 0.22));
  const contact = distanceM === 0;
  const aside = roomy ? Math.ceil(textWidth(pixelText, 12.5, "figures")) + 9 : 0;
  const detector = contact ? right + 12 : width - aside - 9;
  const from = right + 5;
  const to = detector - 8;
  const room = wordsRoom(distanceWords);
  const middle = (from + to) / 2;
  const inside = !contact && room < to - from - 24;
  const slabs = slabsAlong(props, left, right);
  const host = slabs.find(({ kind }) => kind === "host")!;
  const asideText = contact ? `${distanceWords}, ${pixelText}` : pixelText;
  const hasAside = detector + 17 + textWidth(asideText, 12.5, "figures") <= width + 1;
  return (
    <svg
      className="chart fig"
      width={width}
      height={HEIGHT}
      viewBox={`0 0 ${width} ${HEIGHT}`}
      role="img"
      aria-label={beamWords(props)}
    >
      <SourceBeam
        beam={props}
        from={2}
        to={left}
        y={Y}
        half={9}
        stroke={6}
        {...(roomy ? { words: sourceText(props) } : {})}
      />
      {roomy && sourceDistanceM !== null ? <SourceText beam={props} x={left * 0.27} y={12} /> : null}
      <SampleBox slabs={slabs} top={3} bottom={31} />
      <circle className="fig-solid" cx={tenth(host.x + host.width / 2)} cy={Y} r={1.6} />
      {to - from > 4 ? (
        <DistanceLine
          beam={props}
          from={from}
          to={to}
          y={Y}
          {...(inside ? { gap: [middle - room / 2, middle + room / 2] as [number, number] } : {})}
        />
      ) : null}
      {inside ? (
        <text className="t-num t-strong" x={tenth(middle)} y={21.5} textAnchor="middle">
          {distanceWords}
        </text>
      ) : null}
      <Detector x={detector} top={3} bottom={31} pixels={1} />
      {hasAside ? (
        <text className="t-num t-ink" x={detector + 16} y={21.5}>
          {asideText}
        </text>
      ) : null}
    </svg>
  );
}
