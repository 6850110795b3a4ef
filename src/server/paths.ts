/**
 * The address of a request, read raw, before anything decodes it. One thing has one spelling: an address that a later
 * layer might read differently (doubled slashes, backslashes, dot segments, needless or double percent-encoding) is
 * refused, so that no check on a path can be walked around.
 */
import { ProblemError } from "#src/lib/http/problems.ts";

/** Longest address in bytes, query included. */
export const MAX_ADDRESS_BYTES = 8192;

export interface Address {
  /** As sent, which is the one accepted spelling. */
  readonly path: string;
  /** Decoded query keys and values; no key stands twice. */
  readonly query: ReadonlyMap<string, string>;
}

/** Characters that may stand in a path unencoded (RFC 3986 pchar and "/"), without ";" and with "%" for what is encoded. */
const PATH_CHARACTERS = /^[A-Za-z0-9\-._~!$&'()*+,=:@/%]*$/;
/** Encoded, these would be a second spelling of a plain character, a separator, or a percent sign to be decoded twice. */
const NEEDLESSLY_ENCODED = /[A-Za-z0-9\-._~/\\%;]/;
/** Controls, invisible characters, lone surrogates. */
const UNSEEN = /[\p{Cc}\p{Cf}\p{Cs}]/u;
/** Controls other than those that a pasted column of values brings. */
const QUERY_CONTROLS = /[\u0000-\u0008\u000b\u000c\u000e-\u001f\u007f]/;

/** Throws ProblemError: addressTooLong, badPath, malformed or repeatedKey. */
export function readAddress(rawUrl: string): Address {
  if (rawUrl.length > MAX_ADDRESS_BYTES) {
    throw new ProblemError("addressTooLong", `An address may have at most ${MAX_ADDRESS_BYTES} bytes.`);
  }
  const mark = rawUrl.indexOf("?");
  const path = mark < 0 ? rawUrl : rawUrl.slice(0, mark);
  checkPath(path);
  return { path, query: readQuery(mark < 0 ? "" : rawUrl.slice(mark + 1)) };
}

function checkPath(path: string): void {
  if (!path.startsWith("/")) throw badPath("It must begin with one slash.");
  if (!PATH_CHARACTERS.test(path)) throw badPath("It holds a character that must not stand in a path as it is.");
  if (path.includes("//")) throw badPath("It holds two slashes in a row.");
  for (const segment of path.slice(1).split("/")) checkSegment(segment);
}

function checkSegment(segment: string): void {
  if (/%(?![0-9A-Fa-f]{2})/.test(segment)) throw badPath("A percent sign is not followed by two hexadecimal digits.");
  for (const [code] of segment.matchAll(/%[0-9A-Fa-f]{2}/g)) {
    if (NEEDLESSLY_ENCODED.test(String.fromCharCode(parseInt(code.slice(1), 16)))) {
      throw badPath(`"${code}" must not be percent-encoded.`);
    }
  }
  const decoded = decode(segment);
  if (decoded === null) throw badPath("It is not UTF-8.");
  if (UNSEEN.test(decoded)) throw badPath("It holds an invisible character.");
  if (/[. ]$/.test(decoded)) throw badPath("No part of it may end with a dot or a space.");
}

function readQuery(text: string): ReadonlyMap<string, string> {
  const query = new Map<string, string>();
  if (/[^\x21-\x7e]/.test(text)) {
    throw new ProblemError("malformed", "The query holds a character that must be percent-encoded.");
  }
  if (/%25[0-9A-Fa-f]{2}/.test(text)) throw new ProblemError("malformed", "The query is percent-encoded twice.");
  for (const pair of text.split("&")) {
    if (pair === "") continue;
    const at = pair.indexOf("=");
    const key = decode((at < 0 ? pair : pair.slice(0, at)).replaceAll("+", " "));
    const value = decode(at < 0 ? "" : pair.slice(at + 1).replaceAll("+", " "));
    if (key === null || value === null) {
      throw new ProblemError("malformed", "The query is not percent-encoded UTF-8.");
    }
    if (QUERY_CONTROLS.test(key) || QUERY_CONTROLS.test(value)) {
      throw new ProblemError("malformed", "The query holds a control character.");
    }
    if (query.has(key)) {
      throw new ProblemError("repeatedKey", "A query key may stand once.", {
        errors: [{ path: `/${pointer(key)}`, code: "repeatedKey", message: "This key stands more than once." }],
      });
    }
    query.set(key, value);
  }
  return query;
}

function decode(text: string): string | null {
  try {
    return decodeURIComponent(text);
  } catch {
    return null;
  }
}

/** A key as one step of a JSON pointer, shortened. */
function pointer(key: string): string {
  return key.slice(0, 60).replaceAll("~", "~0").replaceAll("/", "~1");
}

function badPath(reason: string): ProblemError {
  return new ProblemError("badPath", `The path of the address cannot be accepted. ${reason}`);
}
