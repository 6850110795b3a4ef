/** The words of the full drawing, and the way from sample to detector that carries some of them. */
import type { BeamLayout } from "./beam-layout.ts";
import { type BeamProps, micrometres, sourceText } from "./beam.ts";
import { DistanceLine, SourceText } from "./BeamParts.tsx";
import { tenth } from "./drawing.ts";
import { textWidth } from "./text-width.ts";

/** The line to the detector, its distance above and the technique's word below; in contact the words stand beside. */
export function Way({ beam, layout }: { beam: BeamProps; layout: BeamLayout }) {
  const { right, detector, y, lens, phone } = layout;
  const { distanceM, distanceWords, technique, width } = beam;
  const contact = distanceM === 0;
  const lensEnd = lens && lens.x > right ? lens.x + lens.r + 6 : right + 6;
  const from = contact ? right + 3 : lensEnd;
  const to = detector - 8;
  const middle = contact ? 0 : (from + to) / 2;
  const half = Math.max(textWidth(distanceWords, 12.5, "figures"), 70) / 2;
  // Beside a lens the free line is short: then its words stand higher, over the lens.
  const short = to - from < 2 * half;
  const x = short ? Math.min((right + detector) / 2, width - half) : middle;
  const side = lens && lens.x > detector ? lens.x + lens.r + 6 : detector + 16;
  return (
    <g>
      {to - from > 4 ? <DistanceLine beam={beam} from={from} to={to} y={y} /> : null}
      {contact ? (
        <text className="t-strong" x={tenth(side + 2)} y={phone ? y + 4 : y + 42}>
          {distanceWords}
        </text>
      ) : (
        <text className="t-num t-strong" x={tenth(x)} y={short ? 22 : y - 14} textAnchor="middle">
          {distanceWords}
        </text>
      )}
      {distanceM === null || contact ? null : (
        <text className={`t-${technique}`} x={tenth(x)} y={short ? 88 : y + 24} textAnchor="middle">
          {technique}
        </text>
      )}
    </g>
  );
}

/** Wide: source at left, detector at right. */
export function SideWords({ beam, layout, start }: { beam: BeamProps; layout: BeamLayout; start: number }) {
  const { y, left, detector, spread, lens } = layout;
  const parallel = beam.sourceDistanceM === null;
  const end = lens && !lens.inHost ? lens.x - lens.r : left;
  return (
    <g>
      {parallel ? (
        <SourceText beam={beam} x={(start + end) / 2} y={tenth(y - spread.sample - 8)} />
      ) : (
        <>
          <SourceText beam={beam} x={(start + left) / 2} y={y - 22} />
          <text x={4} y={y + 26}>
            source
          </text>
          <text className="t-num t-ink" x={4} y={y + 43}>
            {micrometres(beam.sourceFwhmUm)}
          </text>
        </>
      )}
      <text x={detector + 18} y={y - 18}>
        detector
      </text>
      <text className="t-num t-ink" x={detector + 18} y={y + 2}>
        {`${micrometres(beam.pixelUm)} px`}
      </text>
      <text className="t-num t-ink" x={detector + 18} y={y + 20}>
        {`${micrometres(beam.blurUm)} blur`}
      </text>
    </g>
  );
}

/** Phone: both on lines of their own under the drawing. */
export function PhoneWords({ beam }: { beam: BeamProps }) {
  const source =
    beam.sourceDistanceM === null ? "parallel beam" : `source ${micrometres(beam.sourceFwhmUm)} at ${sourceText(beam)}`;
  return (
    <g>
      <text x={0} y={152}>
        {source}
      </text>
      <text x={0} y={171}>
        {`detector ${micrometres(beam.pixelUm)} pixels, ${micrometres(beam.blurUm)} blur`}
      </text>
    </g>
  );
}
