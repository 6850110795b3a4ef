/**
 * Request bodies, read strictly before anything is made of them. JSON.parse alone keeps the last of two equal keys, turns 1e400
 * into Infinity and takes any depth; here each of these is told. One pass, no recursion.
 */
import { type InputFault, ProblemError, quoteInput } from "./problems.ts";

/** Deepest nesting of objects and arrays. */
export const MAX_DEPTH = 20;

const FORBIDDEN_KEYS = new Set(["__proto__", "constructor", "prototype"]);

interface Frame {
  /** Keys met so far; null for an array. */
  readonly keys: Set<string> | null;
  /** Where this frame stands in its parent. */
  segment: string;
  index: number;
}

/** The value of a JSON text. @throws ProblemError malformed, repeatedKey, forbiddenKey (400), or invalid (422) for its numbers */
export function readStrictJson(text: string): unknown {
  const faults = scan(text);
  let value: unknown;
  try {
    value = JSON.parse(text);
  } catch {
    throw new ProblemError(
      "malformed",
      "The body is not JSON. Send one JSON object, UTF-8, numbers with a decimal point.",
    );
  }
  if (faults.length > 0)
    throw new ProblemError("invalid", "Some numbers or texts in the body cannot be kept as they are.", {
      errors: faults,
    });
  return value;
}

const TOKEN = /"(?:[^"\\]|\\.)*"|-?\d[\d.eE+-]*|[{}[\],:]/gs;

function scan(text: string): InputFault[] {
  const faults: InputFault[] = [];
  const stack: Frame[] = [];
  let expectKey = false;
  for (const { 0: token } of text.matchAll(TOKEN)) {
    const top = stack.at(-1);
    if (token === "{" || token === "[") {
      stack.push({ keys: token === "{" ? new Set() : null, segment: "", index: 0 });
      if (stack.length > MAX_DEPTH)
        throw new ProblemError("malformed", `The body is nested more than ${MAX_DEPTH} deep. Flatten it.`);
      expectKey = token === "{";
    } else if (token === "}" || token === "]") {
      stack.pop();
      expectKey = false;
    } else if (token === ",") {
      expectKey = top?.keys != null;
      if (top && !top.keys) top.index++;
    } else if (token === ":") {
      expectKey = false;
    } else if (token.startsWith('"')) {
      const content = readString(token);
      if (expectKey && top?.keys) takeKey(top, content);
      else checkText(content, pointer(stack), faults);
    } else {
      checkNumber(token, pointer(stack), faults);
    }
  }
  return faults;
}

function pointer(stack: readonly Frame[]): string {
  return stack
    .map((frame) => `/${frame.keys ? frame.segment.replace(/~/g, "~0").replace(/\//g, "~1") : frame.index}`)
    .join("");
}

function readString(token: string): string {
  try {
    return JSON.parse(token) as string;
  } catch {
    throw new ProblemError(
      "malformed",
      "The body is not JSON: a text in it has a bare control character or a broken escape.",
    );
  }
}

function takeKey(frame: Frame, key: string): void {
  if (FORBIDDEN_KEYS.has(key))
    throw new ProblemError("forbiddenKey", `The key ${key} is not accepted in any body. Remove it.`);
  if (frame.keys?.has(key))
    throw new ProblemError("repeatedKey", `The key ${quoteInput(key)} stands twice in one object. Send it once.`);
  frame.keys?.add(key);
  frame.segment = key;
}

function checkText(content: string, path: string, faults: InputFault[]): void {
  // Line breaks and tabs belong to notes; any other control character is a fault of whoever made the text.
  if (/[\0-\x08\x0b\x0c\x0e-\x1f\x7f]/.test(content))
    throw new ProblemError("malformed", `The text at ${quoteInput(path)} holds a control character. Remove it.`);
  if (/[\ud800-\udbff](?![\udc00-\udfff])|(?<![\ud800-\udbff])[\udc00-\udfff]/.test(content)) {
    faults.push({
      path,
      code: "brokenText",
      message: "The text holds half of a character pair. Send it as whole UTF-8 characters.",
    });
  }
}

function checkNumber(token: string, path: string, faults: InputFault[]): void {
  const value = Number(token);
  if (Number.isNaN(value)) return; // JSON.parse tells it
  const shown = quoteInput(token, 24);
  if (!Number.isFinite(value)) {
    faults.push({
      path,
      code: "notFinite",
      message: `${shown} is too large for a number. Numbers up to 1.8e308 are accepted.`,
    });
  } else if (value === 0 && /[1-9]/.test(token.split(/[eE]/)[0] ?? "")) {
    faults.push({ path, code: "underflow", message: `${shown} is too small for a number: it would become 0.` });
  } else if (!Number.isSafeInteger(value) && /^-?\d+$/.test(token)) {
    faults.push({
      path,
      code: "unsafeInteger",
      message: `${shown} cannot be kept exactly. Whole numbers up to 9007199254740991 are accepted.`,
    });
  }
}
