/**
 * Every setting of the program, read from the environment in this one place and checked at start.
 * All are optional. Adding one: a line in the schema, one in `.env.example`, one in DEVELOPERS.md.
 */
import { z } from "zod";

/** Names under which one machine calls itself; they then count as one site. */
const LOOPBACK_NAMES: ReadonlySet<string> = new Set(["localhost", "127.0.0.1", "[::1]", "::1"]);
const LOG_LEVELS = ["fatal", "error", "warn", "info", "debug", "trace", "silent"] as const;

/** True for the names and addresses by which a machine reaches only itself. */
export function isLoopback(host: string): boolean {
  return LOOPBACK_NAMES.has(host) || /^127(\.\d{1,3}){3}$/.test(host);
}

const port = z
  .string()
  .regex(/^\d{1,5}$/, "must be a whole number from 1 to 65535")
  .transform(Number)
  .refine((value) => value >= 1 && value <= 65535, "must be a whole number from 1 to 65535");

const publicUrl = z.string().transform((text, context) => {
  const url = URL.canParse(text) ? new URL(text) : null;
  const plain = url !== null && url.pathname === "/" && url.search === "" && url.hash === "" && url.username === "";
  if (url === null || !plain || !["http:", "https:"].includes(url.protocol)) {
    context.addIssue({
      code: "custom",
      message: "must be the address people type, such as https://rimelight.example, without a path",
    });
    return z.NEVER;
  }
  return url.origin;
});

const databaseUrl = z
  .string()
  .regex(
    /^(file:[^?#]+|(libsql|https?|wss?):\/\/.+)$/,
    "must be a file, such as file:var/rimelight.db, or the address of a libSQL server",
  )
  .refine((text) => text !== "file::memory:", "must name a file: a database in memory is lost at every stop");

/** Address or address range in CIDR notation; which of the two is decided where it is used. */
const ADDRESS_RANGE = /^[0-9a-fA-F.:]+(\/\d{1,3})?$/;

const trustProxy = z.string().transform((text, context): TrustProxy => {
  if (/^[1-9]$/.test(text)) return { hops: Number(text) };
  const ranges = text.split(",").map((part) => part.trim());
  if (!ranges.every((range) => ADDRESS_RANGE.test(range) && /[.:]/.test(range))) {
    context.addIssue({
      code: "custom",
      message: "must be the number of proxies in front (1 to 9), or their addresses, such as 10.0.0.0/8",
    });
    return z.NEVER;
  }
  return { ranges };
});

const schema = z.object({
  PORT: port.default(4321),
  HOST: z
    .string()
    .regex(/^[A-Za-z0-9.:-]{1,253}$/, "must be an address or a host name of this machine")
    .default("127.0.0.1"),
  PUBLIC_URL: publicUrl.optional(),
  DATABASE_URL: databaseUrl.default("file:var/rimelight.db"),
  TRUST_PROXY: trustProxy.optional(),
  LIMITS_FACTOR: z
    .string()
    .transform(Number)
    .refine((value) => Number.isFinite(value) && value > 0, "must be a number above 0")
    .default(1),
  LOG_LEVEL: z.enum(LOG_LEVELS, `must be one of ${LOG_LEVELS.join(", ")}`).default("info"),
});

export type TrustProxy = { hops: number } | { ranges: readonly string[] };

export interface Settings {
  readonly port: number;
  readonly host: string;
  /** Scheme, host and port under which people reach the site; links are built from it alone. */
  readonly publicUrl: string;
  readonly databaseUrl: string;
  /** Null: no proxy is believed. */
  readonly trustProxy: TrustProxy | null;
  /** Multiplies the look-up limits; other than 1 only while `host` is a loopback address. */
  readonly limitsFactor: number;
  readonly logLevel: (typeof LOG_LEVELS)[number];
}

/** A setting that cannot be used. The message names each and says what it accepts. */
export class SettingsError extends Error {
  override readonly name = "SettingsError";
}

/**
 * The settings of an environment. An empty value counts as not set.
 * Throws SettingsError with one line for each setting that cannot be used; values are not repeated, they may be secrets.
 */
export function readSettings(environment: Readonly<Record<string, string | undefined>> = process.env): Settings {
  const given = Object.fromEntries(
    Object.entries(environment).filter(([, value]) => value !== undefined && value !== ""),
  );
  const result = schema.safeParse(given);
  if (!result.success) {
    throw new SettingsError(
      result.error.issues.map((issue) => `The setting ${issue.path.join(".")} ${issue.message}.`).join("\n"),
    );
  }
  const values = result.data;
  if (values.LIMITS_FACTOR !== 1 && !isLoopback(values.HOST)) {
    throw new SettingsError("The setting LIMITS_FACTOR may differ from 1 only while HOST is a loopback address.");
  }
  return {
    port: values.PORT,
    host: values.HOST,
    publicUrl: values.PUBLIC_URL ?? `http://localhost:${values.PORT}`,
    databaseUrl: values.DATABASE_URL,
    trustProxy: values.TRUST_PROXY ?? null,
    limitsFactor: values.LIMITS_FACTOR,
    logLevel: values.LOG_LEVEL,
  };
}
