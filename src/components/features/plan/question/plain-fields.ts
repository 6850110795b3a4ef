/** The fields of the plain form, in groups; choices apart. */
import { TABULATION_NAMES } from "#src/lib/format/tabulations.ts";
import { MIXTURE_BASES } from "#src/lib/lookup/question.ts";
import { TABULATION_KEYS } from "#src/lib/physics/index.ts";
import { EXAMPLE_SETUPS } from "#src/lib/plans/examples.ts";
import { OWN_SETUP, type PlanField } from "#src/lib/plans/question.ts";

interface Choice {
  readonly value: string;
  readonly words: string;
}

export interface PlainField {
  readonly name: PlanField;
  readonly label: string;
  /** Below the field. */
  readonly hint?: string;
  readonly kind: "text" | "lines" | "choice";
  readonly choices?: readonly Choice[];
}

export interface PlainGroup {
  readonly legend: string;
  readonly fields: readonly PlainField[];
  /** Seldom needed: closed unless one of its fields is in use or at fault. */
  readonly more?: { readonly summary: string; readonly fields: readonly PlainField[] };
}

const text = (name: PlanField, label: string, hint?: string): PlainField => ({
  name,
  label,
  kind: "text",
  ...(hint === undefined ? {} : { hint }),
});
const lines = (name: PlanField, label: string, hint: string): PlainField => ({ name, label, hint, kind: "lines" });
const choice = (name: PlanField, label: string, choices: readonly Choice[]): PlainField => ({
  name,
  label,
  kind: "choice",
  choices,
});

const BASES: readonly Choice[] = MIXTURE_BASES.map((value) => ({
  value,
  words: value === "concentration" ? "concentration, in mg/mL" : `${value}, in %`,
}));
const mixture = (which: "feature" | "host"): NonNullable<PlainGroup["more"]> => ({
  summary: "Compose a mixture",
  fields: [
    lines(`${which}Parts`, `Parts of the ${which}`, "One a line: share; material; density. It replaces the material."),
    choice(`${which}By`, `Shares of the ${which} counted by`, BASES),
  ],
});

export const PLAIN_GROUPS: readonly PlainGroup[] = [
  {
    legend: "What you look for",
    fields: [
      choice("shape", "Shape", [
        { value: "sphere", words: "sphere" },
        { value: "fibre", words: "fibre" },
        { value: "layer", words: "layer" },
      ]),
      text("size", "Size", "Diameter, not radius; of a layer its depth along the beam. Such as 20 um."),
      text("length", "Length seen", "Of a fibre or layer. Empty: five times the size."),
      text("width", "Width across the beam", "Of a layer only."),
      text("feature", "Feature material", "A name such as PMMA, or a formula such as SiO2."),
      text(
        "featureDensity",
        "Density of the feature",
        "Empty: the handbook’s. A formula needs one, such as 2.2 g/cm3.",
      ),
    ],
    more: mixture("feature"),
  },
  {
    legend: "Host and layers",
    fields: [
      text("thickness", "Thickness of the host", "Along the beam, such as 5 mm."),
      text("host", "Host material"),
      text("hostDensity", "Density of the host", "Empty: the handbook’s."),
      lines(
        "layers",
        "Layers, in beam order",
        "One a line, at most ten: before; 1 mm; polypropylene, or after; 2 mm; Si; 2.33 g/cm3.",
      ),
    ],
    more: mixture("host"),
  },
  {
    legend: "Setup",
    fields: [
      choice("setup", "Setup", [
        ...EXAMPLE_SETUPS.map(({ id, name }) => ({ value: id, words: name })),
        { value: OWN_SETUP, words: "the one typed in below" },
      ]),
      text("energies", "Photon energies", "Such as 8 to 40 keV, or 12, 18, 24 keV. Empty: all the setup offers."),
      text("distances", "Distances", "Such as up to 3 m, or 0.1, 0.3, 0.9 m. Empty: all the setup offers."),
    ],
    more: {
      summary: "Type a setup in",
      fields: [
        text("source", "Distance of the source", "Such as 30 m, or parallel."),
        text("sourceSize", "Size of the source", "Full width at half height."),
        text("pixel", "Detector pixel"),
        text("blur", "Blur of the detector", "Full width at half height, without the pixel."),
        text("screen", "Screen", "Empty: the usual one. Or 40 %, or Gd2O2S; 20 um; 7.3 g/cm3."),
        text("bandwidth", "Bandwidth", "Such as 0.02 %. Empty: one energy at a time."),
        lines(
          "flux",
          "Flux, photons per s and mm²",
          "One number, or one energy a line: 10; 1e9. Empty: not known, and no times are given.",
        ),
      ],
    },
  },
  {
    legend: "Use and limits",
    fields: [
      choice("use", "Use of the images", [
        { value: "direct", words: "look at them directly" },
        { value: "retrieval", words: "retrieve from one distance" },
        { value: "tomography", words: "tomography" },
        { value: "absorption", words: "absorption only" },
      ]),
      text("dose", "Dose limit", "Such as 10 Gy. Empty: none."),
      text("time", "Time limit", "Such as 60 s. Empty: none."),
    ],
    more: {
      summary: "More limits, and what is best",
      fields: [
        text("pass", "Transmission allowed", "Such as 10 to 90 %. Empty: any."),
        text("threshold", "Detected means, times the noise", "Empty: 5."),
        text("counts", "Least photons in a pixel", "Empty: 100. 0: no floor."),
        text("projections", "Projections of a tomography", "Empty: π/2 for each pixel across the host."),
        text("nearField", "Near-field limit", "Of retrieval and tomography. Empty: 0.8."),
        choice("objective", "Best is", [
          { value: "", words: "as proposed" },
          { value: "dose", words: "least dose" },
          { value: "time", words: "shortest time" },
          { value: "fluence", words: "fewest photons" },
        ]),
        choice(
          "table",
          "Values from",
          TABULATION_KEYS.map((value) => ({ value, words: TABULATION_NAMES[value] })),
        ),
      ],
    },
  },
];
