/** Editor of the setup: take an example, or type one in for this plan only. */
import { useState } from "react";
import { BlankPanel } from "#src/components/features/question/Blank.tsx";
import { Choice } from "#src/components/features/question/Choice.tsx";
import { useNamedMaterials } from "#src/components/features/question/useNamedMaterials.ts";
import { materialFinder } from "#src/lib/lookup/finder.ts";
import { EXAMPLE_SETUPS } from "#src/lib/plans/examples.ts";
import { OWN_SETUP } from "#src/lib/plans/question.ts";
import { distancesText, energiesText, type LiveField, offeredRanges } from "#src/lib/plans/read-live.ts";
import { isParallel } from "#src/lib/plans/read-fields.ts";
import { planWords } from "#src/lib/plans/words.ts";
import { DetectorSetting, SourceSetting, SpectrumSettings } from "./OwnSetup.tsx";
import type { EditorProps } from "./props.ts";
import { ScreenSetting } from "./ScreenSetting.tsx";
import { asPercent, fieldsOfExample, readScreen, screenReading, writeScreen } from "./setup-fields.ts";
import { useDraft } from "./useDraft.ts";

const OPTIONS = [
  ...EXAMPLE_SETUPS.map(({ id, name, about, setup }) => ({
    value: id,
    label: name,
    about: `${about} ${energiesText(setup.energiesKeV)}, ${distancesText(setup.distancesM)}.`,
  })),
  { value: OWN_SETUP, label: "Type one in", about: "For this plan only." },
];

export function SetupEditor({ field, question, known, learn, onTake, onClose }: EditorProps) {
  const draft = useDraft({ ...question, bandwidth: asPercent(question.bandwidth) });
  const [screen, setScreen] = useState(() => readScreen(question.screen));
  // A setup that was filled in anew begins its own settings anew.
  const [filled, setFilled] = useState(0);
  const isOwn = draft.question.setup === OWN_SETUP;
  const named = useNamedMaterials(screen.kind === "scintillator" ? [screen.material] : [], known);
  const screenRead = named.pending
    ? null
    : screenReading(screen, draft.question, materialFinder([...known, ...named.found]));
  const sourceFields: readonly LiveField[] = isParallel(draft.question.source) ? [] : ["source", "sourceSize"];
  return (
    <BlankPanel
      field={field}
      title="Setup"
      takeText={
        isOwn ? "Take this setup" : `Take ${OPTIONS.find(({ value }) => value === draft.question.setup)?.label ?? "it"}`
      }
      width="medium"
      help="Energies and distances are the next blanks. Esc keeps the old value."
      canTake={
        !isOwn || (draft.reads(...sourceFields, "pixel", "blur", "bandwidth", "flux") && screenRead?.ok !== false)
      }
      onTake={() =>
        onTake({
          ...draft.taken(
            "setup",
            "source",
            "sourceSize",
            "blur",
            "pixel",
            "bandwidth",
            "flux",
            "energies",
            "distances",
          ),
          screen: writeScreen(screen),
        })
      }
      onClose={onClose}
    >
      <Choice
        label="Setup"
        name="plan-setup"
        options={OPTIONS}
        value={draft.question.setup}
        onChange={(setup) => draft.set({ setup })}
      />
      {isOwn ? (
        <div key={filled}>
          <p className="chips own-setup-start">
            <span className="note">Begin with the figures of</span>
            {EXAMPLE_SETUPS.map((example) => (
              <button
                key={example.id}
                type="button"
                className="chip"
                onClick={() => {
                  draft.set(fieldsOfExample(example));
                  setScreen(readScreen(""));
                  setFilled((before) => before + 1);
                }}
              >
                {example.name}
              </button>
            ))}
          </p>
          <SourceSetting draft={draft} />
          <DetectorSetting draft={draft} />
          <ScreenSetting
            screen={screen}
            reading={screenRead}
            onChange={(fields) => setScreen((before) => ({ ...before, ...fields }))}
            onPick={(material) => {
              learn([material]);
              setScreen((before) => ({ ...before, material: material.name, density: "" }));
            }}
          />
          <SpectrumSettings draft={draft} />
        </div>
      ) : null}
      <WrittenRanges draft={draft} />
    </BlankPanel>
  );
}

/** Energies and distances written for another setup stay, unless the new one's are wanted. */
function WrittenRanges({ draft }: { draft: ReturnType<typeof useDraft> }) {
  const { energies, distances, setup } = draft.question;
  if (energies === "" && distances === "") return null;
  const words = planWords(draft.question, () => null);
  const offered = offeredRanges(setup);
  return (
    <p className="note written-ranges">
      {`Energies and distances stay as written: ${words.energies}, ${words.distances}. `}
      <button type="button" className="btn-text" onClick={() => draft.set({ energies: "", distances: "" })}>
        {`Take the setup’s: ${energiesText(offered.energiesKeV)}, ${distancesText(offered.distancesM)}`}
      </button>
    </p>
  );
}
