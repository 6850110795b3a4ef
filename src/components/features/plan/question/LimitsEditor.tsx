/** Limits and what "best" is: one editor for both blanks of the last clause. */
import { useState } from "react";
import { BlankPanel } from "#src/components/features/question/Blank.tsx";
import { InlineField, Setting } from "#src/components/features/question/Setting.tsx";
import { Segments } from "#src/components/ui/Segments.tsx";
import { TABULATION_NAMES } from "#src/lib/format/tabulations.ts";
import { TABULATION_KEYS } from "#src/lib/physics/index.ts";
import type { Objective } from "#src/lib/plans/question.ts";
import { splitRange } from "#src/lib/quantities/index.ts";
import { LimitSetting } from "./LimitSetting.tsx";
import type { EditorProps } from "./props.ts";
import { withoutPercent } from "./setup-fields.ts";
import { useDraft } from "./useDraft.ts";

const BEST: readonly { value: Objective | ""; label: string }[] = [
  { value: "", label: "as proposed" },
  { value: "dose", label: "least dose" },
  { value: "time", label: "shortest time" },
  { value: "fluence", label: "fewest photons" },
];
const TABLES = TABULATION_KEYS.map((key) => ({ value: key, label: TABULATION_NAMES[key] }));

export function LimitsEditor({ field, question, onTake, onClose }: EditorProps) {
  const draft = useDraft(question);
  const range = splitRange(question.pass);
  const [pass, setPass] = useState({
    low: range ? withoutPercent(range.from.text) : question.pass === "" ? "10" : question.pass,
    high: range ? withoutPercent(range.to.text) : "90",
  });
  const writePass = (next: typeof pass): void => {
    setPass(next);
    draft.set({ pass: `${next.low.trim()} to ${next.high.trim()} %` });
  };
  const number = (name: "threshold" | "counts", label: string, usual: string) => (
    <InlineField
      field={name}
      label={label}
      width={6}
      value={draft.text(name)}
      reading={draft.reading(name)}
      placeholder={usual}
      onChange={draft.type(name)}
    />
  );
  const passField = (end: "low" | "high", label: string) => (
    <InlineField
      field="pass"
      label={label}
      width={6}
      value={pass[end]}
      reading={draft.reading("pass")}
      onChange={(text) => writePass({ ...pass, [end]: text })}
    />
  );
  return (
    <BlankPanel
      field={field}
      title="Limits"
      takeText="Take these limits"
      width="medium"
      help="A plan is shown even where it breaks a limit, and says so. Esc keeps the old values."
      canTake={draft.reads("dose", "time", "pass", "threshold", "counts")}
      onTake={() => onTake(draft.taken("dose", "time", "pass", "threshold", "counts", "objective", "table"))}
      onClose={onClose}
    >
      <LimitSetting
        label="Dose"
        isOpen={question.dose !== "" || field === "dose"}
        onOpen={() => undefined}
        onClear={() => draft.set({ dose: "" })}
        readings={{ dose: draft.reading("dose") }}
      >
        At most{" "}
        <InlineField
          field="dose"
          label="Dose limit"
          isFirst={field === "dose"}
          width={10}
          value={draft.text("dose")}
          reading={draft.reading("dose")}
          placeholder="10 Gy"
          onChange={draft.type("dose")}
        />{" "}
        at the entrance of the host.
      </LimitSetting>
      <LimitSetting
        label="Time"
        isOpen={question.time !== "" || field === "time"}
        onOpen={() => undefined}
        onClear={() => draft.set({ time: "" })}
        readings={{ time: draft.reading("time") }}
      >
        At most{" "}
        <InlineField
          field="time"
          label="Time limit"
          isFirst={field === "time"}
          width={10}
          value={draft.text("time")}
          reading={draft.reading("time")}
          placeholder="60 s"
          onChange={draft.type("time")}
        />{" "}
        of exposure, motors not counted.
      </LimitSetting>
      <LimitSetting
        label="Through"
        isOpen={question.pass !== ""}
        onOpen={() => writePass(pass)}
        onClear={() => draft.set({ pass: "" })}
        readings={{ pass: draft.reading("pass") }}
      >
        Between {passField("low", "Least transmission in percent")} and{" "}
        {passField("high", "Greatest transmission in percent")} % of the photons pass.
      </LimitSetting>
      <Setting
        label="Detected"
        readings={{ threshold: draft.reading("threshold"), counts: draft.reading("counts") }}
        note="Empty: 5 times, 100 photons. 3 is enough for a known position, 5 for a search."
      >
        <span>
          means {number("threshold", "Detectability asked for", "5")} times the noise, with at least{" "}
          {number("counts", "Least detected photons in a pixel", "100")} photons in a pixel.
        </span>{" "}
        <button type="button" className="btn btn-small" onClick={() => draft.set({ counts: "0" })}>
          No least count
        </button>
      </Setting>
      <Setting label="Best is" note="As proposed: least dose where the host holds hydrogen, else the shortest time.">
        <Segments
          label="Best is"
          name="plan-objective"
          options={BEST}
          value={draft.question.objective}
          onChange={(value) => draft.set({ objective: BEST.find((best) => best.value === value)?.value ?? "" })}
        />
      </Setting>
      <Setting label="Values">
        <Segments
          label="Table that gives the values"
          name="plan-table"
          options={TABLES}
          value={draft.question.table}
          onChange={(value) => draft.set({ table: TABULATION_KEYS.find((key) => key === value) ?? question.table })}
        />
      </Setting>
    </BlankPanel>
  );
}
