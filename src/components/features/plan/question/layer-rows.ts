/** The rows of the editor of host and layers, in beam order: the host stands between what is before and after it. */
import { lengthText } from "#src/lib/format/plan-quantities.ts";
import type { MaterialFinder } from "#src/lib/lookup/finder.ts";
import { DEFAULT_QUESTION } from "#src/lib/lookup/question.ts";
import { QuestionError, statedMaterial } from "#src/lib/lookup/state-material.ts";
import { type LayerLine, readLayerLines, writeLayerLines } from "#src/lib/plans/question.ts";
import { parseQuantity, QuantityError } from "#src/lib/quantities/index.ts";

export interface LayerRow {
  /** Stays with the row while it moves. */
  readonly id: number;
  readonly isHost: boolean;
  readonly thickness: string;
  readonly material: string;
  readonly density: string;
}

export type LayerFields = Partial<Pick<LayerRow, "thickness" | "material" | "density">>;

const rowOf = (id: number, { thickness, material, density }: LayerLine): LayerRow => ({
  id,
  isHost: false,
  thickness,
  material,
  density,
});
const HOST: LayerRow = { id: 0, isHost: true, thickness: "", material: "", density: "" };
const nextId = (rows: readonly LayerRow[]): number => 1 + Math.max(...rows.map(({ id }) => id));
const hostAt = (rows: readonly LayerRow[]): number => rows.findIndex(({ isHost }) => isHost);

/** The host's own fields are left to the question. */
export function rowsOf(layers: string): LayerRow[] {
  const lines = readLayerLines(layers).map((line, index) => ({ line, row: rowOf(index + 1, line) }));
  const side = (position: LayerLine["position"]): LayerRow[] =>
    lines.filter(({ line }) => line.position === position).map(({ row }) => row);
  return [...side("before"), HOST, ...side("after")];
}

// A line's fields are parted by semicolons and tabs.
const plain = (text: string): string => text.replace(/[;\s]+/g, " ").trim();

export function layersOf(rows: readonly LayerRow[]): string {
  const host = hostAt(rows);
  return writeLayerLines(
    rows.flatMap((row, index) =>
      row.isHost
        ? []
        : [
            {
              position: index < host ? ("before" as const) : ("after" as const),
              thickness: plain(row.thickness),
              material: plain(row.material),
              density: plain(row.density),
            },
          ],
    ),
  );
}

/** The row takes its neighbour's place; at the ends it stays. */
export function moved(rows: readonly LayerRow[], index: number, step: -1 | 1): LayerRow[] {
  const next = [...rows];
  const row = next[index];
  const neighbour = next[index + step];
  if (row && neighbour) [next[index], next[index + step]] = [neighbour, row];
  return next;
}

/** A new row next to the host, or at the outer end where layers stand already. */
export function added(rows: readonly LayerRow[], side: "before" | "after"): LayerRow[] {
  const row: LayerRow = { ...HOST, id: nextId(rows), isHost: false, thickness: "1 mm" };
  return side === "before" ? [row, ...rows] : [...rows, row];
}

/** The layers of one side mirrored to the other: those before the host, or where there are none those after it. */
export function mirrored(rows: readonly LayerRow[]): LayerRow[] {
  const host = hostAt(rows);
  const before = rows.slice(0, host);
  const source = before.length > 0 ? before : rows.slice(host + 1).reverse();
  const first = nextId(rows);
  return [
    ...source,
    rows[host] as LayerRow,
    ...source.toReversed().map((row, index) => ({ ...row, id: first + index })),
  ];
}

export interface RowFault {
  readonly field: keyof LayerFields;
  readonly message: string;
}

/** What keeps a layer from being taken; null when it can be. */
export function rowFault(row: LayerRow, finder: MaterialFinder): RowFault | null {
  try {
    if (!(parseQuantity(row.thickness, "length", { defaultUnit: "mm" }) > 0))
      return { field: "thickness", message: "A thickness is above 0, such as 1 mm." };
    if (row.material.trim() === "") return { field: "material", message: "Name its material, such as polypropylene." };
    statedMaterial({ ...DEFAULT_QUESTION, material: row.material.trim(), density: row.density.trim() }, finder);
    return null;
  } catch (error) {
    if (error instanceof QuantityError) return { field: "thickness", message: error.message };
    if (error instanceof QuestionError)
      return { field: error.fault.field === "density" ? "density" : "material", message: error.message };
    throw error;
  }
}

/** In metres; null where it cannot be read. */
export function thicknessM(text: string): number | null {
  try {
    const value = parseQuantity(text, "length", { defaultUnit: "mm" });
    return value > 0 ? value : null;
  } catch (error) {
    if (error instanceof QuantityError) return null;
    throw error;
  }
}

/** All of it along the beam, in words; null where a thickness cannot be read. */
export function wholeText(thicknesses: readonly string[]): string | null {
  const read = thicknesses.map(thicknessM);
  return read.some((value) => value === null)
    ? null
    : lengthText(read.reduce<number>((sum, value) => sum + (value ?? 0), 0));
}
