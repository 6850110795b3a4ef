/**
 * From a material as stated (schemas/material.ts) to one the physics core computes with. Pure: kept materials are looked up
 * by the function passed in, so that server, worker and browser resolve alike.
 */
import {
  checkedDensity,
  compositionOfFormula,
  compositionOfMassFractions,
  dissolve,
  elementBySymbol,
  FormulaError,
  gCm3FromKgPerM3,
  kgPerM3FromGCm3,
  type Material,
  MaterialError,
  mix,
  parseFormula,
  type Part,
  VACUUM,
  withSolidFraction,
} from "#src/lib/physics/index.ts";
import { MATERIAL_LIMITS, type MaterialStatement, type PartStatement } from "#src/lib/schemas/material.ts";

export const DEFAULT_DENSITY_UNCERTAINTY_PERCENT = 1;

/** What a look-up of a kept material gives: its composition by formula or by element symbol, and its density. */
export interface KeptComposition {
  readonly name: string;
  readonly formula: string | null;
  readonly massFractions: Readonly<Record<string, number>> | null;
  readonly densityGCm3: number;
  readonly densityUncertaintyPercent: number | null;
}
export type MaterialLookup = (materialId: string, revision: number | undefined) => KeptComposition | null;

export interface ResolvedMaterial {
  readonly material: Material;
  /** Short words for a heading: the formula, the kept name, or the parts with their shares. */
  readonly label: string;
  /** The formula where the whole is one compound. */
  readonly formula: string | null;
  readonly densityUncertaintyPercent: number;
}

/** A fault in a stated material. `path` is a JSON pointer from the material's own root. */
export class StatementError extends Error {
  override readonly name = "StatementError";
  readonly path: string;
  readonly code: string;
  /** Position from 1 in the text at fault, where it is a formula. */
  readonly position: number | null;
  readonly suggestions: readonly string[];

  constructor(fault: {
    path: string;
    code: string;
    message: string;
    position?: number;
    suggestions?: readonly string[];
  }) {
    super(fault.message);
    this.path = fault.path;
    this.code = fault.code;
    this.position = fault.position ?? null;
    this.suggestions = fault.suggestions ?? [];
  }
}

interface Resolution {
  readonly part: Part;
  readonly densityEstimated: boolean;
  readonly label: string;
  readonly formula: string | null;
  readonly densityUncertaintyPercent: number;
}

/** @throws StatementError with the path of the part at fault */
export function resolveMaterial(statement: MaterialStatement, lookup: MaterialLookup): ResolvedMaterial {
  const resolved = resolvePart(statement, lookup, "", 1);
  const { part } = resolved;
  if (part.densityKgPerM3 === null) {
    throw new StatementError({
      path: "/densityGCm3",
      code: "densityMissing",
      message:
        "The density of the whole is not known. Give it in g/cm³, or give every part's density so that it can be estimated.",
    });
  }
  const material: Material =
    part.massFractions.size === 0
      ? VACUUM
      : { ...part, densityKgPerM3: part.densityKgPerM3, densityEstimated: resolved.densityEstimated };
  return {
    material,
    label: resolved.label,
    formula: resolved.formula,
    densityUncertaintyPercent: resolved.densityUncertaintyPercent,
  };
}

function resolvePart(statement: PartStatement, lookup: MaterialLookup, path: string, depth: number): Resolution {
  if (depth > MATERIAL_LIMITS.nesting) {
    throw new StatementError({
      path,
      code: "nestedTooDeep",
      message: `Mixtures are nested more than ${MATERIAL_LIMITS.nesting} deep. Write the inner parts' elements as a formula.`,
    });
  }
  const resolved = attributed(path, () => {
    if ("formula" in statement) return fromFormula(statement, path);
    if ("materialId" in statement) return fromKept(statement, lookup, path);
    if ("components" in statement) return fromMixture(statement, lookup, path, depth);
    return fromSolution(statement, lookup, path, depth);
  });
  const { solidFraction, densityUncertaintyPercent } = statement;
  const { part } = resolved;
  const porous =
    solidFraction === undefined || part.densityKgPerM3 === null
      ? part
      : attributed(`${path}/solidFraction`, () =>
          withSolidFraction(
            { ...part, densityKgPerM3: part.densityKgPerM3 ?? 0, densityEstimated: false },
            solidFraction,
          ),
        );
  return {
    ...resolved,
    part: porous,
    label:
      solidFraction === undefined || solidFraction === 1
        ? resolved.label
        : `${resolved.label}, ${share(solidFraction)} solid`,
    densityUncertaintyPercent: densityUncertaintyPercent ?? resolved.densityUncertaintyPercent,
  };
}

/** Errors of the core get the path of the statement they came from. */
function attributed<T>(path: string, compute: () => T): T {
  try {
    return compute();
  } catch (error) {
    if (error instanceof FormulaError) {
      throw new StatementError({
        path: `${path}/formula`,
        code: error.code,
        message: error.message,
        position: error.position,
        suggestions: error.suggestions,
      });
    }
    if (error instanceof MaterialError) {
      const component = error.component === null ? "" : `/components/${error.component}`;
      throw new StatementError({ path: path + component, code: error.code, message: error.message });
    }
    throw error;
  }
}

/** The density stated, in kg/m³, or null. */
function givenDensity({ densityGCm3 }: { densityGCm3?: number | undefined }, path: string): number | null {
  if (densityGCm3 === undefined) return null;
  return attributed(`${path}/densityGCm3`, () => checkedDensity(kgPerM3FromGCm3(densityGCm3)));
}

function fromFormula(statement: { formula: string; densityGCm3?: number | undefined }, path: string): Resolution {
  const formula = parseFormula(statement.formula);
  return {
    part: { ...compositionOfFormula(formula), densityKgPerM3: givenDensity(statement, path) },
    densityEstimated: false,
    label: formula.text,
    formula: formula.text,
    densityUncertaintyPercent: DEFAULT_DENSITY_UNCERTAINTY_PERCENT,
  };
}

function fromKept(
  statement: { materialId: string; revision?: number | undefined },
  lookup: MaterialLookup,
  path: string,
): Resolution {
  const kept = lookup(statement.materialId, statement.revision);
  if (!kept) {
    throw new StatementError({
      path: `${path}/materialId`,
      code: "materialNotFound",
      message:
        statement.revision === undefined
          ? "No material has that id. Look it up by name at /api/v1/materials."
          : `No material has that id and a revision ${statement.revision}. Look it up by name at /api/v1/materials.`,
    });
  }
  const densityUncertaintyPercent = kept.densityUncertaintyPercent ?? DEFAULT_DENSITY_UNCERTAINTY_PERCENT;
  const common = { densityEstimated: false, label: kept.name, densityUncertaintyPercent };
  if (kept.densityGCm3 === 0) return { ...common, part: VACUUM, formula: null };
  const densityKgPerM3 = kgPerM3FromGCm3(kept.densityGCm3);
  if (kept.formula !== null) {
    const formula = parseFormula(kept.formula);
    return { ...common, part: { ...compositionOfFormula(formula), densityKgPerM3 }, formula: formula.text };
  }
  const fractions = new Map(
    Object.entries(kept.massFractions ?? {}).map(([symbol, fraction]) => [
      elementBySymbol(symbol)?.atomicNumber ?? 0,
      fraction,
    ]),
  );
  return { ...common, part: { ...compositionOfMassFractions(fractions), densityKgPerM3 }, formula: null };
}

function fromMixture(
  statement: Extract<PartStatement, { components: unknown }>,
  lookup: MaterialLookup,
  path: string,
  depth: number,
): Resolution {
  refuseRepeats(statement.components, (index) => `${path}/components/${index}`);
  const parts = statement.components.map((component, index) =>
    resolvePart(component, lookup, `${path}/components/${index}`, depth + 1),
  );
  const mixture = mix(
    parts.map(({ part }) => part),
    statement.components.map((component) => component.fraction),
    statement.basis,
  );
  const densityKgPerM3 = givenDensity(statement, path) ?? mixture.additiveDensityKgPerM3;
  // A single part at full share, given another density, is that part: it keeps its name and formula.
  const only = parts.length === 1 ? parts[0] : undefined;
  return {
    part: { ...mixture.composition, densityKgPerM3 },
    densityEstimated: statement.densityGCm3 === undefined && !only,
    label:
      only?.label ??
      `${short(parts.map(({ label }, index) => `${share(statement.components[index]?.fraction ?? 0)} ${label}`).join(" + "))} by ${statement.basis}`,
    formula: only?.formula ?? null,
    densityUncertaintyPercent: DEFAULT_DENSITY_UNCERTAINTY_PERCENT,
  };
}

function fromSolution(
  statement: Extract<PartStatement, { solvent: unknown }>,
  lookup: MaterialLookup,
  path: string,
  depth: number,
): Resolution {
  const solvent = resolvePart(statement.solvent, lookup, `${path}/solvent`, depth + 1);
  refuseRepeats([statement.solvent, ...statement.solutes], (index) =>
    index === 0 ? `${path}/solvent` : `${path}/solutes/${index - 1}`,
  );
  const solutes = statement.solutes.map((solute, index) =>
    resolvePart(solute, lookup, `${path}/solutes/${index}`, depth + 1),
  );
  const material = solutionOf(statement, solvent, solutes, path);
  return {
    part: material,
    densityEstimated: material.densityEstimated,
    label: short(
      `${solvent.label} with ${solutes.map(({ label }, index) => `${share(statement.solutes[index]?.mgPerMl ?? 0)} mg/mL ${label}`).join(", ")}`,
    ),
    formula: null,
    densityUncertaintyPercent: DEFAULT_DENSITY_UNCERTAINTY_PERCENT,
  };
}

function solutionOf(
  statement: Extract<PartStatement, { solvent: unknown }>,
  solvent: Resolution,
  solutes: readonly Resolution[],
  path: string,
): Material {
  try {
    return dissolve(
      solvent.part,
      solutes.map(({ part }, index) => ({ part, concentrationKgPerM3: statement.solutes[index]?.mgPerMl ?? 0 })),
      givenDensity(statement, path),
    );
  } catch (error) {
    if (!(error instanceof MaterialError)) throw error;
    // The core counts the solvent as part 0.
    const at = error.component === null ? "" : error.component === 0 ? "/solvent" : `/solutes/${error.component - 1}`;
    throw new StatementError({ path: path + at, code: error.code, message: error.message });
  }
}

function refuseRepeats(parts: readonly PartStatement[], pathOf: (index: number) => string): void {
  const seen = new Set<string>();
  for (const [index, part] of parts.entries()) {
    // The same substance in another density, such as graphite and diamond, is another part.
    const key = JSON.stringify({ ...part, fraction: undefined, mgPerMl: undefined });
    if (seen.has(key)) {
      throw new StatementError({
        path: pathOf(index),
        code: "partRepeated",
        message: `Part ${index + 1} stands twice in the mixture. Add its shares up into one part.`,
      });
    }
    seen.add(key);
  }
}

/** Longest label: thousands of parts still make one heading. */
const LABEL_CHARACTERS = 200;
const short = (label: string): string =>
  label.length > LABEL_CHARACTERS ? `${label.slice(0, LABEL_CHARACTERS - 1)}…` : label;

const share = (value: number): string => String(Number(value.toPrecision(4)));

/** The density in g/cm³, free of the rounding that the way through kg/m³ leaves. */
export function densityGCm3(material: Material): number {
  return Number(gCm3FromKgPerM3(material.densityKgPerM3).toPrecision(12));
}
