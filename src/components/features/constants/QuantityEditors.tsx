/** Editors of the density and energy blanks: text with a unit, read as it is typed. */
import { useState } from "react";
import { BlankPanel } from "#src/components/features/question/Blank.tsx";
import { attempt, ReadField } from "#src/components/features/question/ReadField.tsx";
import { formatGiven, significantText } from "#src/lib/format/numbers.ts";
import {
  angstromFromM,
  gCm3FromKgPerM3,
  kevFromEv,
  MAX_DENSITY_KG_PER_M3,
  wavelengthM,
} from "#src/lib/physics/index.ts";
import type { Question } from "#src/lib/lookup/question.ts";
import { parseEnergies, parseQuantity, QuantityError } from "#src/lib/quantities/index.ts";
import type { Lookup } from "./useLookup.ts";

interface Props {
  readonly lookup: Lookup;
  readonly onTake: (fields: Partial<Question>) => void;
  readonly onClose: () => void;
}

export function DensityEditor({ lookup, onTake, onClose }: Props) {
  const { question, view } = lookup;
  const isRecipe = question.parts.trim() !== "";
  const [text, setText] = useState(
    question.density || (view.main && !view.main.densityEstimated ? `${formatGiven(view.main.densityGCm3)} g/cm3` : ""),
  );
  const [solid, setSolid] = useState(question.solid);
  const optional = isRecipe || view.main?.keptId != null;
  const reading =
    text.trim() === ""
      ? optional
        ? {
            ok: true,
            words: isRecipe
              ? "Left empty: estimated from additive volumes, and marked as an estimate."
              : "Left empty: the handbook's density.",
          }
        : { ok: false, words: "A formula needs its density. Write it as 2.65 g/cm3." }
      : attempt(() => {
          const density = parseQuantity(text, "density", { defaultUnit: "g/cm3" });
          if (!(density > 0) || density > MAX_DENSITY_KG_PER_M3)
            throw new QuantityError({
              code: "outOfRange",
              message: "Densities from above 0 to 50 g/cm³ are accepted.",
              position: 1,
            });
          return `${significantText(gCm3FromKgPerM3(density), 5)} g/cm³. δ, β and μ are proportional to it.`;
        });
  return (
    <BlankPanel
      field="density"
      title="Density"
      takeText="Take this density"
      canTake={reading.ok}
      onTake={() => onTake({ density: text.trim(), solid: solid.trim() })}
      onClose={onClose}
    >
      <div className="stack">
        <ReadField label="Density, in g/cm³ or with a unit" value={text} reading={reading} onChange={setText} />
        <ReadField
          label="Solid share of the volume, for porous or packed matter"
          value={solid}
          reading={solid.trim() === "" ? { ok: true, words: "Left empty: 100 %." } : null}
          onChange={setSolid}
        />
      </div>
    </BlankPanel>
  );
}

export function EnergyEditor({ lookup, onTake, onClose }: Props) {
  const [text, setText] = useState(lookup.question.energy);
  const reading = attempt(() => {
    const { energiesEv } = parseEnergies(text, { defaultUnit: "keV" });
    const energyEv = energiesEv[0];
    if (energyEv === undefined || energiesEv.length !== 1)
      return "Several energies: they go into the list below the curves.";
    return `${formatGiven(kevFromEv(energyEv))} keV, wavelength ${significantText(angstromFromM(wavelengthM(energyEv)))} Å.`;
  });
  return (
    <BlankPanel
      field="energy"
      title="Photon energy or wavelength"
      takeText="Take this energy"
      canTake={reading.ok}
      onTake={() => onTake(isSeveral(text) ? { list: text.trim() } : { energy: text.trim() })}
      onClose={onClose}
    >
      <ReadField label="In keV, or with eV, Å or nm" value={text} reading={reading} onChange={setText} />
    </BlankPanel>
  );
}

function isSeveral(text: string): boolean {
  return parseEnergies(text, { defaultUnit: "keV" }).energiesEv.length > 1;
}
