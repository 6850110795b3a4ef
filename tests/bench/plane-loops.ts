/**
 * The yardstick of the plan's plane: the same integrals S as plain loops in C (gcc -O3) and in NumPy, on this machine. Neither is
 * needed by the product; where a compiler or NumPy is missing its result is null.
 */
import { spawn } from "node:child_process";
import { mkdtemp, rm } from "node:fs/promises";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { fileURLToPath } from "node:url";

const SHAPES = ["sphere", "fibre", "layer"] as const;
type ShapeName = (typeof SHAPES)[number];

/** SI units. The three arrays over the energies are of one length. */
export interface LoopInput {
  /** Diameter of sphere and fibre, depth of the layer along the beam. */
  readonly sizeM: number;
  /** Of the layer, across the beam. */
  readonly widthM: number;
  /** Visible length of fibre and layer. */
  readonly lengthM: number;
  readonly geometry: {
    /** null: a parallel beam. */
    readonly sourceDistanceM: number | null;
    readonly sourceFwhmM: number;
    readonly detectorFwhmM: number;
    readonly pixelM: number;
  };
  readonly wavelengthsM: readonly number[];
  readonly deltaDelta: readonly number[];
  readonly deltaBeta: readonly number[];
  readonly distancesM: readonly number[];
  /** Of Simpson's rule from 0 to the pixels' limit; even. */
  readonly intervals: number;
}

export interface LoopResult {
  /** Median of five for a whole plane, without start and input. */
  readonly milliseconds: Record<ShapeName, number>;
  /** S in m² row by row, energies × distances; null where they were not asked for. */
  readonly values: Record<ShapeName, Float64Array> | null;
}

/**
 * Planes of all three shapes, in C and then in NumPy (never at once: they would disturb each other's times).
 * @throws Error where a program is there but fails
 */
export async function runLoops(
  input: LoopInput,
  { values = true }: { readonly values?: boolean } = {},
): Promise<{ c: LoopResult | null; numpy: LoopResult | null }> {
  const folder = await mkdtemp(join(tmpdir(), "plane-loops-"));
  try {
    const text = textOf(input);
    const flags = [String(input.intervals), ...(values ? ["--values"] : [])];
    const points = input.wavelengthsM.length * input.distancesM.length;
    const program = join(folder, "plane");
    const compiled = await run("gcc", ["-O3", source("plane.c"), "-o", program, "-lm"]);
    const c = compiled === null ? null : await run(program, flags, text);
    const hasNumpy = (await run("python3", ["-c", HAS_NUMPY]))?.trim() === "True";
    const numpy = hasNumpy ? await run("python3", [source("plane.py"), ...flags], text) : null;
    return {
      c: c === null ? null : resultOf(c, points, values),
      numpy: numpy === null ? null : resultOf(numpy, points, values),
    };
  } finally {
    await rm(folder, { recursive: true, force: true });
  }
}

const HAS_NUMPY = "import importlib.util; print(importlib.util.find_spec('numpy') is not None)";

const source = (file: string): string => fileURLToPath(new URL(`loops/${file}`, import.meta.url));

function textOf({
  sizeM,
  widthM,
  lengthM,
  geometry,
  wavelengthsM,
  deltaDelta,
  deltaBeta,
  distancesM,
}: LoopInput): string {
  const { sourceDistanceM, sourceFwhmM, detectorFwhmM, pixelM } = geometry;
  if (deltaDelta.length !== wavelengthsM.length || deltaBeta.length !== wavelengthsM.length)
    throw new Error("Wavelengths, Δδ and Δβ must be as many.");
  const head = [wavelengthsM.length, distancesM.length, sourceDistanceM ?? "inf", sourceFwhmM, detectorFwhmM, pixelM];
  return [
    [...head, sizeM, widthM, lengthM].join(" "),
    ...wavelengthsM.map((wavelengthM, index) => `${wavelengthM} ${deltaDelta[index]!} ${deltaBeta[index]!}`),
    ...distancesM,
    "",
  ].join("\n");
}

/** What a program says; null where there is no such program. */
function run(command: string, given: readonly string[], text = ""): Promise<string | null> {
  return new Promise((resolve, reject) => {
    const child = spawn(command, given);
    let out = "";
    let complaint = "";
    child.stdout.setEncoding("utf8").on("data", (chunk: string) => (out += chunk));
    child.stderr.setEncoding("utf8").on("data", (chunk: string) => (complaint += chunk));
    // A program that stops before it has read everything breaks the pipe; its exit code tells more.
    child.stdin.on("error", () => undefined);
    child.on("error", (error: NodeJS.ErrnoException) => (error.code === "ENOENT" ? resolve(null) : reject(error)));
    child.on("close", (code) =>
      code === 0 ? resolve(out) : reject(new Error(`${command} ended with ${code}: ${complaint.slice(0, 500)}`)),
    );
    child.stdin.end(text);
  });
}

/** Reads "name milliseconds checksum" and, where asked for, the values after it, for each shape. */
function resultOf(out: string, points: number, values: boolean): LoopResult {
  const lines = out.trimEnd().split("\n");
  const block = 1 + (values ? points : 0);
  if (lines.length !== SHAPES.length * block) throw new Error(`A plane came out with ${lines.length} lines.`);
  const milliseconds = { sphere: 0, fibre: 0, layer: 0 };
  const planes = { sphere: new Float64Array(0), fibre: new Float64Array(0), layer: new Float64Array(0) };
  for (const [index, shape] of SHAPES.entries()) {
    const [name, took, checksum] = lines[index * block]!.split(" ");
    if (name !== shape) throw new Error(`Expected the plane of a ${shape}, got "${name}".`);
    milliseconds[shape] = Number(took);
    if (!values) continue;
    planes[shape] = Float64Array.from(lines.slice(index * block + 1, (index + 1) * block), Number);
    const sum = planes[shape].reduce((total, value) => total + value, 0);
    if (!(Math.abs(sum - Number(checksum)) <= 1e-9 * Math.abs(sum)))
      throw new Error(`The values of the ${shape} add up to ${sum}, not to ${checksum}.`);
  }
  return { milliseconds, values: values ? planes : null };
}
