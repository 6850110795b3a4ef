/** Which curves a choice shows, of which materials. */
import type { Curve } from "./question.ts";
import type { MaterialView, View } from "./view.ts";

export interface ChosenCurve {
  readonly key: string;
  /** Symbol at the line's end, and a word after it. */
  readonly name: string;
  readonly word: string;
  readonly technique: "phase" | "absorption" | "ink";
  readonly energiesKeV: readonly number[];
  readonly values: readonly (number | null)[];
  readonly dash?: string;
  /** Exactly at the question's energy; the points beside it are rounded for drawing. */
  readonly atEnergy: number | null;
  /** For files: the quantity's key and the material's label. */
  readonly quantity: string;
  readonly material: string;
}

// Further materials are told apart by dashes as well as by name.
const DASHES = [undefined, "10 5", "3 4", "14 4 3 4", "6 3", "18 5", "2 6", "8 3 2 3"];

export function curvesOf(view: View, choice: Curve): ChosenCurve[] {
  const { main, pairCurve } = view;
  if (!main) return [];
  const material = `${main.label} less ${view.others[0]?.label ?? ""}`;
  if (choice === "pair-contrast" && pairCurve) {
    const common = { energiesKeV: pairCurve.energiesKeV, material };
    return [
      {
        ...common,
        key: "deltaDelta",
        quantity: "deltaDelta",
        atEnergy: view.pair?.deltaDelta ?? null,
        name: "Δδ",
        word: "phase",
        technique: "phase",
        values: pairCurve.deltaDelta,
      },
      {
        ...common,
        key: "deltaMu",
        quantity: "deltaMuPerCm",
        atEnergy: view.pair?.deltaMuPerCm ?? null,
        name: "Δμ",
        word: "cm⁻¹",
        technique: "absorption",
        values: pairCurve.deltaMuPerCm,
      },
    ];
  }
  if (choice === "pair-gamma" && pairCurve) {
    return [
      {
        key: "gamma",
        quantity: "gamma",
        atEnergy: view.pair?.gamma ?? null,
        material,
        name: "γ",
        word: "of the pair",
        technique: "ink",
        energiesKeV: pairCurve.energiesKeV,
        values: pairCurve.gamma,
      },
    ];
  }
  const materials = [main, ...view.others];
  return materials.flatMap((each, index) => curvesOfMaterial(each, choice, index, materials.length > 1));
}

function curvesOfMaterial(material: MaterialView, choice: Curve, index: number, several: boolean): ChosenCurve[] {
  const { energiesKeV, ...values } = material.curve;
  const dash = DASHES[index];
  const common = { energiesKeV, material: material.label, ...(dash === undefined ? {} : { dash }) };
  const now = material.row?.values;
  const short = several ? material.label.slice(0, 14) : "";
  if (choice === "attenuation") {
    const total: ChosenCurve = {
      ...common,
      key: `mu${index}`,
      quantity: "muTotalPerCm",
      atEnergy: now?.muTotalPerCm ?? null,
      name: "μ",
      word: several ? short : "total",
      technique: "absorption",
      values: values.muTotalPerCm,
    };
    if (several) return [total];
    return [
      total,
      {
        ...common,
        key: "photo",
        quantity: "muPhotoPerCm",
        atEnergy: now?.muPhotoPerCm ?? null,
        name: "μ",
        word: "photoelectric",
        technique: "absorption",
        values: values.muPhotoPerCm,
        dash: "6 4",
      },
    ];
  }
  if (choice === "ratio") {
    return [
      {
        ...common,
        key: `ratio${index}`,
        quantity: "deltaOverBeta",
        atEnergy: now?.deltaOverBeta ?? null,
        name: "δ/β",
        word: short,
        technique: "ink",
        values: values.deltaOverBeta,
      },
    ];
  }
  return [
    {
      ...common,
      key: `delta${index}`,
      quantity: "delta",
      atEnergy: now?.delta ?? null,
      name: "δ",
      word: several ? short : "phase",
      technique: "phase",
      values: values.delta,
    },
    {
      ...common,
      key: `beta${index}`,
      quantity: "beta",
      atEnergy: now?.beta ?? null,
      name: "β",
      word: several ? short : "absorption",
      technique: "absorption",
      values: values.beta,
    },
  ];
}
