/** A setup typed in for this plan only, as sentences with fields. */
import { useState } from "react";
import { InlineField, Setting } from "#src/components/features/question/Setting.tsx";
import { Segments } from "#src/components/ui/Segments.tsx";
import { isParallel } from "#src/lib/plans/read-fields.ts";
import { withoutPercent, withPercent } from "./setup-fields.ts";
import type { Draft } from "./useDraft.ts";

const SOURCES = [
  { value: "distance", label: "at a distance" },
  { value: "parallel", label: "parallel beam" },
];
const FLUXES = [
  { value: "number", label: "one number" },
  { value: "curve", label: "a curve" },
  { value: "unknown", label: "not known" },
];

export function SourceSetting({ draft }: { draft: Draft }) {
  const [distance, setDistance] = useState(isParallel(draft.question.source) ? "30 m" : draft.question.source);
  const parallel = isParallel(draft.question.source);
  const source = draft.reading("source");
  const size = draft.reading("sourceSize");
  return (
    <Setting
      label="Source"
      readings={parallel ? {} : { source, sourceSize: size }}
      note={
        parallel
          ? "A parallel beam has no size: only the detector blurs."
          : "From the source to the middle of the sample. Its size is the full width at half height."
      }
    >
      <Segments
        label="Source"
        name="plan-source"
        options={SOURCES}
        value={parallel ? "parallel" : "distance"}
        onChange={(value) => draft.set({ source: value === "parallel" ? "parallel" : distance })}
      />
      {parallel ? null : (
        <span>
          <InlineField
            field="source"
            label="Distance of the source"
            value={distance}
            reading={source}
            onChange={(text) => {
              setDistance(text);
              draft.type("source")(text);
            }}
          />{" "}
          from the sample,{" "}
          <InlineField
            field="sourceSize"
            label="Size of the source"
            value={draft.text("sourceSize")}
            reading={size}
            onChange={draft.type("sourceSize")}
          />{" "}
          wide.
        </span>
      )}
    </Setting>
  );
}

export function DetectorSetting({ draft }: { draft: Draft }) {
  const input = (field: "pixel" | "blur", label: string) => (
    <InlineField
      field={field}
      label={label}
      value={draft.text(field)}
      reading={draft.reading(field)}
      onChange={draft.type(field)}
    />
  );
  return (
    <Setting
      label="Detector"
      readings={{ pixel: draft.reading("pixel"), blur: draft.reading("blur") }}
      note="Blur of screen and optics: full width at half height of a point, without the pixel."
    >
      <span>
        Pixels of {input("pixel", "Detector pixel")}, blur {input("blur", "Blur of the detector")}.
      </span>
    </Setting>
  );
}

export function SpectrumSettings({ draft }: { draft: Draft }) {
  const { flux } = draft.question;
  const [kind, setKind] = useState(
    flux.trim() === "" ? "unknown" : /[;\t]/.test(flux) || flux.trim().includes("\n") ? "curve" : "number",
  );
  const [texts, setTexts] = useState({
    number: kind === "number" ? flux : "1e9",
    curve: kind === "curve" ? flux : "10; 1e9\n60; 2e8",
    unknown: "",
  });
  const bandwidth = draft.reading("bandwidth");
  const reading = draft.reading("flux");
  const write = (text: string): void => {
    setTexts((before) => ({ ...before, [kind]: text }));
    draft.set({ flux: text });
  };
  return (
    <>
      <Setting
        label="Bandwidth"
        readings={{ bandwidth }}
        note="Full width at half height. Empty: one energy at a time."
      >
        <span>
          <InlineField
            field="bandwidth"
            label="Bandwidth in percent of the energy"
            value={withoutPercent(draft.question.bandwidth)}
            reading={bandwidth}
            onChange={(text) => draft.set({ bandwidth: withPercent(text) })}
          />{" "}
          % of the energy.
        </span>
      </Setting>
      <Setting
        label="Flux"
        readings={{ flux: reading }}
        note={kind === "unknown" ? "Not known: the plan gives dose but no time." : "At the first layer."}
      >
        <Segments
          label="Flux"
          name="plan-flux"
          options={FLUXES}
          value={kind}
          onChange={(value) => {
            const next = value as keyof typeof texts;
            setKind(next);
            draft.set({ flux: texts[next] });
          }}
        />
        {kind === "number" ? (
          <span>
            <InlineField
              field="flux"
              label="Flux, photons per second and square millimetre"
              width={12}
              value={flux}
              reading={reading}
              onChange={write}
            />{" "}
            photons per s and mm².
          </span>
        ) : null}
        {kind === "curve" ? (
          <span className="field">
            <label htmlFor="plan-flux-curve">One energy a line: keV; photons per s and mm².</label>
            <textarea
              id="plan-flux-curve"
              className="input"
              rows={4}
              value={flux}
              aria-invalid={reading?.ok === false ? "true" : undefined}
              aria-describedby={reading?.ok === false ? "edit-flux-fault" : undefined}
              onChange={(event) => write(event.currentTarget.value)}
            />
          </span>
        ) : null}
      </Setting>
    </>
  );
}
