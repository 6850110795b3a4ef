/**
 * Errors as the product speaks them: RFC 9457 problem documents, one list of codes with their status and title.
 * Codes never change; the sentence in `detail` may. `/method/errors#CODE` explains each.
 */
export const PROBLEM_KINDS = {
  malformed: { status: 400, title: "The request cannot be read" },
  forbiddenKey: { status: 400, title: "A key of that name is not accepted" },
  repeatedKey: { status: 400, title: "A key stands twice" },
  badPath: { status: 400, title: "The address is not spelt in a way that is accepted" },
  twoIdentities: { status: 400, title: "Session and key were sent together" },
  unauthenticated: { status: 401, title: "Sign-in or a valid key is needed" },
  forbidden: { status: 403, title: "That is not allowed" },
  foreignOrigin: { status: 403, title: "The request comes from another site" },
  notFound: { status: 404, title: "There is nothing at this address" },
  methodNotAllowed: { status: 405, title: "That method is not offered here" },
  notAcceptable: { status: 406, title: "No accepted form of answer is offered" },
  requestTimeout: { status: 408, title: "The request took too long to arrive" },
  conflict: { status: 409, title: "That clashes with what is there" },
  gone: { status: 410, title: "That is no longer offered" },
  revisionMismatch: { status: 412, title: "There is a newer revision" },
  tooLarge: { status: 413, title: "The request is too large" },
  addressTooLong: { status: 414, title: "The address is too long" },
  unsupportedMediaType: { status: 415, title: "That kind of content is not accepted" },
  rangeNotSatisfiable: { status: 416, title: "Those ranges are not offered" },
  wrongHost: { status: 421, title: "This site is not served under that name" },
  invalid: { status: 422, title: "The input is not valid" },
  revisionNeeded: { status: 428, title: "The revision being changed must be named" },
  tooManyRequests: { status: 429, title: "Too many requests" },
  headersTooLarge: { status: 431, title: "The request headers are too large" },
  internal: { status: 500, title: "Something failed on our side" },
  overloaded: { status: 503, title: "The site is busy" },
  notReady: { status: 503, title: "The site is starting or stopping" },
  storageFull: { status: 507, title: "The storage is full" },
} as const satisfies Record<string, { status: number; title: string }>;

export type ProblemCode = keyof typeof PROBLEM_KINDS;

/** One fault of the input. `path` is a JSON pointer into the body, or `/name` of a query key. */
export interface InputFault {
  path: string;
  code: string;
  message: string;
}

/** Most faults that one answer tells. */
export const MAX_FAULTS = 20;

export interface ProblemDocument {
  type: string;
  title: string;
  status: number;
  detail: string;
  instance: string;
  code: ProblemCode;
  requestId: string;
  errors?: InputFault[];
}

export const PROBLEM_TYPE = "application/problem+json; charset=utf-8";

/** Thrown inside services and handlers; the edge turns it into a problem document. */
export class ProblemError extends Error {
  override readonly name = "ProblemError";
  readonly code: ProblemCode;
  readonly errors: InputFault[] | undefined;
  readonly headers: Readonly<Record<string, string>>;

  constructor(
    code: ProblemCode,
    detail: string,
    more: { errors?: InputFault[]; headers?: Record<string, string> } = {},
  ) {
    super(detail);
    this.code = code;
    this.errors = more.errors;
    this.headers = more.headers ?? {};
  }
}

/** The document of a problem. `instance` is the path only: query strings may hold unpublished formulas. */
export function problemDocument(
  code: ProblemCode,
  detail: string,
  context: { path: string; requestId: string; errors?: InputFault[] | undefined },
): ProblemDocument {
  const kind = PROBLEM_KINDS[code];
  return {
    type: `/method/errors#${code}`,
    title: kind.title,
    status: kind.status,
    detail,
    instance: quoteInput(context.path),
    code,
    requestId: context.requestId,
    ...(context.errors && context.errors.length > 0 ? { errors: context.errors } : {}),
  };
}

/** At most 64 characters of what came in, controls and invisible characters shown as spaces: safe to repeat in any message. */
export function quoteInput(text: string, limit = 64): string {
  // Characters are one or two units; a long text costs no more than a short one.
  const plain = text.slice(0, 2 * limit + 2).replace(/[\p{Cc}\p{Cf}\p{Cs}]/gu, " ");
  const characters = [...plain];
  return characters.length > limit ? `${characters.slice(0, limit - 1).join("")}…` : plain;
}
