/** Judging input by its schema, with faults that say what was given, what is accepted and how to mend it. */
import type { z } from "zod";
import { type InputFault, MAX_FAULTS, ProblemError, quoteInput } from "./problems.ts";

/** The value as the schema gives it back. @throws ProblemError invalid, with one fault for each place */
export function validate<T>(schema: z.ZodType<T>, value: unknown, what = "The input is not valid."): T {
  const result = schema.safeParse(value);
  if (result.success) return result.data;
  throw new ProblemError("invalid", what, { errors: faultsOf(result.error.issues, value, []).slice(0, MAX_FAULTS) });
}

type Issue = z.core.$ZodIssue;

function faultsOf(issues: readonly Issue[], root: unknown, prefix: readonly PropertyKey[]): InputFault[] {
  return issues.flatMap((issue) => {
    const path = [...prefix, ...issue.path];
    if (issue.code === "invalid_union") return unionFaults(issue, root, path);
    if (issue.code === "unrecognized_keys") {
      return issue.keys.slice(0, MAX_FAULTS).map((key) => ({
        path: pointer([...path, key]),
        code: "unknownKey",
        message: `“${quoteInput(key, 40)}” is not a key that is read here. Remove it, or see /api/v1/openapi.json for the ones that are.`,
      }));
    }
    return [faultOf(issue, path, at(root, path))];
  });
}

function faultOf(issue: Issue, path: readonly PropertyKey[], value: unknown): InputFault {
  const missing = value === undefined && issue.code !== "custom";
  return { path: pointer(path), code: missing ? "missing" : codeOf(issue), message: messageOf(issue, value) };
}

const pointer = (path: readonly PropertyKey[]): string =>
  path.map((part) => `/${String(part).replace(/~/g, "~0").replace(/\//g, "~1").slice(0, 64)}`).join("");

function at(root: unknown, path: readonly PropertyKey[]): unknown {
  return path.reduce<unknown>(
    (value, part) =>
      value !== null && typeof value === "object" && Object.hasOwn(value, part)
        ? (value as Record<PropertyKey, unknown>)[part]
        : undefined,
    root,
  );
}

/**
 * Of several accepted forms, the faults of the one that was meant: the form whose own keys the value has. A value that has no
 * key of any form is told all forms at once; a union says them in its schema (`error`).
 */
function unionFaults(
  issue: Extract<Issue, { code: "invalid_union" }>,
  root: unknown,
  path: readonly PropertyKey[],
): InputFault[] {
  const value = at(root, path);
  // A branch that refuses the value's very kind, such as a list where an object was given, was not meant.
  const branches = issue.errors.filter(
    (branch) => !branch.some(({ code, path: place }) => code === "invalid_type" && place.length === 0),
  );
  if (branches.length === 0 || branches.every((branch) => sharesNoKey(branch, value))) {
    const forms = issue.message === UNNAMED_FORMS ? "one of the forms in /api/v1/openapi.json" : issue.message;
    return [
      {
        path: pointer(path),
        code: value === undefined ? "missing" : "wrongType",
        message: `${given(value)}; needed is ${forms}.`,
      },
    ];
  }
  const cost = (branch: readonly Issue[]): number =>
    branch.reduce((sum, each) => {
      if (each.code === "unrecognized_keys" && each.path.length === 0) return sum + 10 * each.keys.length;
      if (each.path.length === 1 && at(value, each.path) === undefined) return sum + 11;
      return sum + (each.path.length === 0 ? 20 : 1);
    }, 0);
  const nearest = branches.reduce((best, branch) => (cost(branch) < cost(best) ? branch : best));
  return faultsOf(nearest, root, path);
}

/** How zod's own messages begin, where a schema says nothing of its own (`error`). */
const UNNAMED_FORMS = "Invalid input";

function sharesNoKey(branch: readonly Issue[], value: unknown): boolean {
  if (value === null || typeof value !== "object" || Array.isArray(value)) return false;
  const unknown = branch.find(({ code, path }) => code === "unrecognized_keys" && path.length === 0);
  return Object.keys(value).length === (unknown?.code === "unrecognized_keys" ? unknown.keys.length : 0);
}

function codeOf(issue: Issue): string {
  switch (issue.code) {
    case "invalid_type":
      return "wrongType";
    case "too_small":
      return "tooSmall";
    case "too_big":
      return issue.origin === "string" || issue.origin === "array" ? "tooLong" : "tooLarge";
    case "invalid_value":
      return "notAChoice";
    case "invalid_format":
      return "wrongFormat";
    case "custom":
      return (issue.params?.["code"] as string | undefined) ?? "invalid";
    default:
      return "invalid";
  }
}

function given(value: unknown): string {
  if (value === undefined) return "Nothing was given";
  if (value === null) return "null was given";
  if (typeof value === "string") return `The text “${quoteInput(value, 40)}” was given`;
  if (typeof value === "number" || typeof value === "boolean") return `${String(value)} was given`;
  return Array.isArray(value) ? "A list was given" : "An object was given";
}

const TYPE_WORDS: Readonly<Record<string, string>> = {
  number: "a number",
  string: "a text",
  array: "a list",
  object: "an object",
  boolean: "true or false",
  int: "a whole number",
};

function amount(count: number | bigint, ofText: boolean): string {
  const [one, many] = ofText ? ["character is", "characters are"] : ["entry is", "entries are"];
  return `${String(count)} ${count === 1 ? one : many}`;
}

function messageOf(issue: Issue, value: unknown): string {
  switch (issue.code) {
    case "invalid_type":
      if (!issue.message.startsWith(UNNAMED_FORMS)) return `${given(value)}; needed is ${issue.message}.`;
      return `${given(value)}; ${TYPE_WORDS[issue.expected] ?? issue.expected} is needed.${typeof value === "string" && issue.expected === "number" ? " Send it as a JSON number, without quotes." : ""}`;
    case "too_small":
      if (issue.origin === "string" || issue.origin === "array")
        return `At least ${amount(issue.minimum, issue.origin === "string")} needed.`;
      return `${given(value)}; ${issue.inclusive ? "at least" : "more than"} ${String(issue.minimum)} is accepted.`;
    case "too_big":
      if (issue.origin === "string" || issue.origin === "array")
        return `More than ${String(issue.maximum)} ${issue.origin === "string" ? "characters" : "entries"} were given; the limit is ${String(issue.maximum)}.`;
      return `${given(value)}; ${issue.inclusive ? "at most" : "less than"} ${String(issue.maximum)} is accepted.`;
    case "invalid_value":
      return `${given(value)}; accepted are ${issue.values.map(String).join(", ")}.`;
    default:
      return issue.message;
  }
}
