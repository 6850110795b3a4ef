/** The screen of a setup that was typed in: the usual one, a share of the photons, or a scintillator. */
import { MaterialCombobox } from "#src/components/features/question/MaterialCombobox.tsx";
import { InlineField, Setting } from "#src/components/features/question/Setting.tsx";
import type { Reading } from "#src/components/features/question/ReadField.tsx";
import { Segments } from "#src/components/ui/Segments.tsx";
import type { KnownMaterial } from "#src/lib/lookup/finder.ts";
import { type Screen, withoutPercent, withPercent } from "./setup-fields.ts";

const KINDS: readonly { value: Screen["kind"]; label: string }[] = [
  { value: "default", label: "usual screen" },
  { value: "share", label: "share of photons" },
  { value: "scintillator", label: "scintillator" },
];

interface Props {
  readonly screen: Screen;
  readonly reading: Reading | null;
  readonly onChange: (fields: Partial<Screen>) => void;
  readonly onPick: (material: KnownMaterial) => void;
}

export function ScreenSetting({ screen, reading, onChange, onPick }: Props) {
  return (
    <Setting
      label="Screen"
      readings={{ screen: reading }}
      note={
        screen.kind === "default"
          ? "Lu₃Al₅O₁₂, ten times as thick as the blur or the pixel."
          : screen.kind === "scintillator"
            ? "It counts the photons that it absorbs. Density empty: the handbook’s."
            : "The same at every energy."
      }
    >
      <Segments
        label="Screen"
        name="plan-screen"
        options={KINDS}
        value={screen.kind}
        onChange={(value) => onChange({ kind: KINDS.find((kind) => kind.value === value)?.value ?? "default" })}
      />
      {screen.kind === "share" ? (
        <span>
          Counts{" "}
          <InlineField
            field="screen"
            label="Share of the photons that are counted, in percent"
            width={6}
            value={withoutPercent(screen.share)}
            reading={reading}
            onChange={(share) => onChange({ share: withPercent(share) })}
          />{" "}
          % of the photons.
        </span>
      ) : null}
      {screen.kind === "scintillator" ? (
        <>
          <MaterialCombobox
            floating
            inputClass="input-inline"
            label="Material of the scintillator"
            value={screen.material}
            onChange={(material) => onChange({ material })}
            onPick={onPick}
          />
          <span>
            <InlineField
              field="screen"
              label="Thickness of the scintillator"
              value={screen.thickness.replace(/(\d\s*)um\b/, "$1µm")}
              reading={reading}
              onChange={(thickness) => onChange({ thickness: thickness.replace(/[µμ]m/g, "um") })}
            />{" "}
            thick, of density{" "}
            <InlineField
              field="screen"
              label="Density of the scintillator"
              width={12}
              value={screen.density}
              reading={reading}
              onChange={(density) => onChange({ density })}
            />
          </span>
        </>
      ) : null}
    </Setting>
  );
}
