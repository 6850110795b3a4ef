/**
 * Request bodies, read strictly before anything is made of them. JSON.parse alone keeps the last of two equal keys, turns 1e400
 * into Infinity and takes any depth; here each of these is told. One pass, no recursion, time linear in the text.
 */
import { type InputFault, MAX_FAULTS, ProblemError, quoteInput } from "./problems.ts";

/** Deepest nesting of objects and arrays. */
export const MAX_DEPTH = 20;

const FORBIDDEN_KEYS = new Set(["__proto__", "constructor", "prototype"]);
const NOT_JSON = "The body is not JSON. Send one JSON object, UTF-8, numbers with a decimal point.";

/** The value of a JSON text. @throws ProblemError malformed, repeatedKey, forbiddenKey (400), or invalid (422) for its numbers */
export function readStrictJson(text: string): unknown {
  const faults = new Scanner(text).scan();
  let value: unknown;
  try {
    value = JSON.parse(text);
  } catch {
    throw new ProblemError("malformed", NOT_JSON);
  }
  if (faults.length > 0)
    throw new ProblemError("invalid", "Some numbers or texts in the body cannot be kept as they are.", {
      errors: faults,
    });
  return value;
}

interface Frame {
  /** Keys met so far; null for an array. */
  readonly keys: Set<string> | null;
  /** Key or index of the value being read. */
  key: string;
  index: number;
}

// Each matches where it stands or not at all: no text makes them search.
const STRING = /"[^"\\]*(?:\\.[^"\\]*)*"/sy;
const NUMBER = /-?\d[\d.eE+-]*/y;
const OTHER = /[^"{}[\],:\d-]+|-/y;

/** Looks at what JSON.parse would not tell. Whether the text is JSON at all is left to JSON.parse. */
class Scanner {
  private readonly faults: InputFault[] = [];
  private readonly stack: Frame[] = [];
  private expectKey = false;

  constructor(private readonly text: string) {}

  scan(): InputFault[] {
    const { text } = this;
    for (let at = 0; at < text.length;) {
      const character = text[at] as string;
      if (character === '"') at = this.string(at);
      else if (character === "-" || (character >= "0" && character <= "9")) at = this.number(at);
      else if ("{}[],:".includes(character)) {
        this.structure(character);
        at++;
      } else at = endOf(OTHER, text, at);
    }
    return this.faults;
  }

  private structure(character: string): void {
    const { stack } = this;
    const top = stack.at(-1);
    if (character === "{" || character === "[") {
      stack.push({ keys: character === "{" ? new Set() : null, key: "", index: 0 });
      if (stack.length > MAX_DEPTH)
        throw new ProblemError("malformed", `The body is nested more than ${MAX_DEPTH} deep. Flatten it.`);
    } else if (character === "}" || character === "]") stack.pop();
    else if (character === "," && top && !top.keys) top.index++;
    this.expectKey = character === "{" || (character === "," && top?.keys != null);
  }

  private string(at: number): number {
    const end = endOf(STRING, this.text, at);
    if (end === at) throw new ProblemError("malformed", NOT_JSON);
    const token = this.text.slice(at, end);
    const content = token.includes("\\") ? unescaped(token) : token.slice(1, -1);
    const top = this.stack.at(-1);
    const isKey = this.expectKey && top?.keys != null;
    // Line breaks and tabs belong to notes; any other control character is a fault of whoever made the text.
    if (/[\0-\x08\x0b\x0c\x0e-\x1f\x7f]/.test(content)) {
      throw new ProblemError(
        "malformed",
        isKey
          ? `The key “${quoteInput(content)}” holds a control character. Remove it.`
          : `The text at ${quoteInput(this.pointer()) || "the top"} holds a control character. Remove it.`,
      );
    }
    if (isKey) takeKey(top, content);
    if (
      this.faults.length < MAX_FAULTS &&
      /[\ud800-\udbff](?![\udc00-\udfff])|(?<![\ud800-\udbff])[\udc00-\udfff]/.test(content)
    ) {
      this.fault("brokenText", "The text holds half of a character pair. Send it as whole UTF-8 characters.");
    }
    return end;
  }

  private number(at: number): number {
    const end = endOf(NUMBER, this.text, at);
    // A lone minus; JSON.parse tells it.
    if (end === at) return at + 1;
    if (this.faults.length >= MAX_FAULTS) return end;
    const token = this.text.slice(at, end);
    const value = Number(token);
    if (Number.isNaN(value)) return end;
    if (!Number.isFinite(value)) {
      this.fault("notFinite", `${shown(token)} is too large for a number. Numbers up to 1.8e308 are accepted.`);
    } else if (value === 0 && /[1-9]/.test(token.split(/[eE]/)[0] as string)) {
      this.fault("underflow", `${shown(token)} is too small for a number: it would become 0.`);
    } else if (!Number.isSafeInteger(value) && /^-?\d+$/.test(token)) {
      this.fault(
        "unsafeInteger",
        `${shown(token)} cannot be kept exactly. Whole numbers up to ${Number.MAX_SAFE_INTEGER} are accepted.`,
      );
    }
    return end;
  }

  private fault(code: string, message: string): void {
    this.faults.push({ path: this.pointer(), code, message });
  }

  private pointer(): string {
    return this.stack
      .map(({ keys, key, index }) => `/${keys ? quoteInput(key).replace(/~/g, "~0").replace(/\//g, "~1") : index}`)
      .join("");
  }
}

function endOf(pattern: RegExp, text: string, at: number): number {
  pattern.lastIndex = at;
  return pattern.test(text) ? pattern.lastIndex : at;
}

function unescaped(token: string): string {
  try {
    return JSON.parse(token) as string;
  } catch {
    throw new ProblemError("malformed", "The body is not JSON: a text in it has a broken escape.");
  }
}

function takeKey(frame: Frame, key: string): void {
  if (FORBIDDEN_KEYS.has(key))
    throw new ProblemError("forbiddenKey", `The key ${key} is not accepted in any body. Remove it.`);
  if (frame.keys?.has(key))
    throw new ProblemError("repeatedKey", `The key “${quoteInput(key)}” stands twice in one object. Send it once.`);
  frame.keys?.add(key);
  frame.key = key;
}

const shown = (token: string): string => quoteInput(token, 24);
