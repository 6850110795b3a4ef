/** Photon energies that are ranked. */
import { energiesText, offeredRanges } from "#src/lib/plans/read-live.ts";
import type { EditorProps } from "./props.ts";
import { RangeEditor } from "./RangeEditor.tsx";

export function EnergiesEditor(props: EditorProps) {
  const { energiesKeV } = offeredRanges(props.question.setup);
  return (
    <RangeEditor
      {...props}
      field="energies"
      title="Photon energies"
      unit="keV"
      offered={{
        words: energiesText(energiesKeV),
        text: Array.isArray(energiesKeV)
          ? `${energiesKeV.join(", ")} keV`
          : `${energiesKeV.from} to ${energiesKeV.to} keV`,
      }}
      listLabel="Energies, such as 12, 18, 24 keV, or 8 to 40 keV in 20 steps"
      rangeNote="In keV, or with eV or Å. Steps are even in the logarithm, with more beside absorption edges."
      help="Enter takes them and opens the next blank. Esc keeps the old value."
    />
  );
}
