/** Distances from the sample to the detector that are ranked. */
import { distancesText, offeredRanges } from "#src/lib/plans/read-live.ts";
import type { EditorProps } from "./props.ts";
import { RangeEditor } from "./RangeEditor.tsx";

export function DistancesEditor(props: EditorProps) {
  const { distancesM } = offeredRanges(props.question.setup);
  return (
    <RangeEditor
      {...props}
      field="distances"
      title="Distances"
      unit="m"
      offered={{
        words: distancesText(distancesM),
        text: Array.isArray(distancesM) ? `${distancesM.join(", ")} m` : `${distancesM.from} to ${distancesM.to} m`,
      }}
      listLabel="Stations, such as 0.01, 0.3, 0.9, 3 m, or a pasted column"
      rangeNote="From the middle of the sample to the detector, in m or with mm or cm. An empty beginning is the shortest distance outside the sample."
      help="Enter takes them and opens the next blank. Esc keeps the old value."
    />
  );
}
