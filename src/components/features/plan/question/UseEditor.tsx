/** How the images will be used: it decides which distances are allowed and what is ranked. */
import { BlankPanel } from "#src/components/features/question/Blank.tsx";
import { Choice, type ChoiceOption } from "#src/components/features/question/Choice.tsx";
import { InlineField } from "#src/components/features/question/Setting.tsx";
import { Fault } from "#src/components/ui/Messages.tsx";
import type { Use } from "#src/lib/plans/question.ts";
import type { EditorProps } from "./props.ts";
import { useDraft } from "./useDraft.ts";

const USES: readonly ChoiceOption<Use>[] = [
  {
    value: "direct",
    label: "Look at them directly",
    about:
      "The eye reads fringes. Distances are kept short enough that no detail flips its contrast inside what the detector resolves.",
  },
  {
    value: "retrieval",
    label: "Retrieve from one distance",
    about:
      "One image becomes a map of thickness. Needs the near field and a pair that shifts phase and absorbs in the same sense.",
  },
  {
    value: "tomography",
    label: "Tomography",
    about: "Many angles, one voxel at a time. Asks for contrast to noise in each voxel; dose is for all projections.",
  },
  {
    value: "absorption",
    label: "Absorption only",
    about: "As close to the sample as the setup allows. Phase is reported beside it and never chosen.",
  },
];

export function UseEditor({ field, question, onTake, onClose }: EditorProps) {
  const draft = useDraft(question);
  const { use } = draft.question;
  const fields = (
    use === "tomography" ? ["projections", "nearField"] : use === "retrieval" ? ["nearField"] : []
  ) as readonly ("projections" | "nearField")[];
  const input = (name: "projections" | "nearField", label: string, placeholder: string) => (
    <InlineField
      field={name}
      label={label}
      value={draft.text(name)}
      reading={draft.reading(name)}
      placeholder={placeholder}
      onChange={draft.type(name)}
    />
  );
  return (
    <BlankPanel
      field={field}
      title="How will the images be used?"
      takeText="Take it"
      width="medium"
      help="The use decides which distances are allowed and what is ranked."
      canTake={draft.reads(...fields)}
      onTake={() => onTake(draft.taken("use", "projections", "nearField"))}
      onClose={onClose}
    >
      <Choice
        label="Use of the images"
        name="plan-use"
        options={USES}
        value={use}
        onChange={(value) => draft.set({ use: value })}
      >
        {fields.length === 0 ? null : (
          <div className="setting-line">
            {use === "tomography" ? (
              <span>
                {input("projections", "Projections", "")} projections; empty: π/2 for each pixel across the host.
              </span>
            ) : null}
            <span>
              Near field: πλzu² up to {input("nearField", "Largest πλz times the squared spatial frequency", "0.8")} at
              the finest detail.
            </span>
            {fields.map((name) => {
              const reading = draft.reading(name);
              return reading?.ok === false ? (
                <Fault key={name} id={`edit-${name}-fault`}>
                  {reading.words}
                </Fault>
              ) : null;
            })}
          </div>
        )}
      </Choice>
    </BlankPanel>
  );
}
