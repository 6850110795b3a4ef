/** Between the fields of a setup that was typed in and what its editor shows. */
import { readLive, type LiveReading } from "#src/lib/plans/read-live.ts";
import { percentText } from "#src/lib/format/plan-quantities.ts";
import type { MaterialFinder } from "#src/lib/lookup/finder.ts";
import type { ExampleSetup } from "#src/lib/plans/examples.ts";
import type { PlanQuestion } from "#src/lib/plans/question.ts";
import { readShare, tidy } from "#src/lib/plans/read-fields.ts";
import { rowFault } from "./layer-rows.ts";

/** A screen as its editor holds it; the texts of the other kinds stay while the kind is switched. */
export interface Screen {
  readonly kind: "default" | "share" | "scintillator";
  readonly share: string;
  readonly material: string;
  readonly thickness: string;
  readonly density: string;
}

const plain = (text: string): string => text.replace(/[;\s]+/g, " ").trim();
const isNumber = (text: string): boolean => /^\s*\d*\.?\d+(?:e-?\d{1,3})?\s*$/i.test(text);

/** A bare number up to 1 is a share in the address; fields count in percent. */
export function asPercent(text: string): string {
  if (!isNumber(text)) return text;
  return Number(text) <= 1 ? `${tidy(Number(text) * 100)} %` : `${text.trim()} %`;
}

/** What a field before a percent sign shows, and what it keeps. */
export const withoutPercent = (text: string): string => text.replace(/\s*%\s*$/, "");
export const withPercent = (text: string): string => (text.trim() === "" || /%/.test(text) ? text : `${text} %`);

export function readScreen(text: string): Screen {
  const [material = "", thickness = "", density = ""] = text.split(";").map((part) => part.trim());
  const empty = { share: "40 %", material: "Lu3Al5O12", thickness: "20 um", density: "6.73 g/cm3" };
  if (text.trim() === "") return { kind: "default", ...empty };
  if (thickness === "" && /^[\d.,]+\s*%?$/.test(material))
    return { ...empty, kind: "share", share: asPercent(material) };
  return { ...empty, kind: "scintillator", material, thickness, density };
}

export function writeScreen(screen: Screen): string {
  if (screen.kind === "default") return "";
  if (screen.kind === "share") return plain(screen.share);
  const { material, thickness, density } = screen;
  return [plain(material), plain(thickness) || "20 um", ...(plain(density) === "" ? [] : [plain(density)])].join("; ");
}

/** Null for the default screen, which needs nothing. */
export function screenReading(screen: Screen, question: PlanQuestion, finder: MaterialFinder): LiveReading | null {
  if (screen.kind === "default") return null;
  if (screen.kind === "share")
    return readLive(() => `${percentText(readShare(question, "screen", 0, 1, screen.share))} of the photons`);
  const fault = rowFault(
    {
      ...screen,
      id: 0,
      isHost: false,
      thickness: isNumber(screen.thickness) ? `${screen.thickness} um` : screen.thickness,
    },
    finder,
  );
  return fault === null ? null : { ok: false, words: fault.message };
}

const exponential = (value: number): string => value.toExponential().replace("e+", "e");
const rangeText = (range: ExampleSetup["setup"]["energiesKeV"] | ExampleSetup["setup"]["distancesM"], unit: string) =>
  Array.isArray(range) ? `${range.join(", ")} ${unit}` : `${range.from} to ${range.to} ${unit}`;

/** The figures of an example, to begin a setup of one's own with. */
export function fieldsOfExample({ setup }: ExampleSetup): Partial<PlanQuestion> {
  const { sourceDistanceM, sourceFwhmUm, detectorFwhmUm, pixelUm, bandwidth, fluxPerSMm2 } = setup;
  return {
    source: sourceDistanceM === null ? "parallel" : `${sourceDistanceM} m`,
    sourceSize: `${sourceFwhmUm} um`,
    blur: `${detectorFwhmUm} um`,
    pixel: `${pixelUm} um`,
    screen: "",
    bandwidth: bandwidth === undefined ? "" : `${tidy(bandwidth * 100)} %`,
    flux: typeof fluxPerSMm2 === "number" ? exponential(fluxPerSMm2) : "",
    energies: rangeText(setup.energiesKeV, "keV"),
    distances: rangeText(setup.distancesM, "m"),
  };
}
