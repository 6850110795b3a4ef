/** Which bodies are read at all. Judged from the headers, before a byte is buffered. */
import type { IncomingMessage } from "node:http";
import { ProblemError } from "#src/lib/http/problems.ts";

/** Largest body in bytes; chunked ones are cut off when they pass it. */
export const MAX_BODY_BYTES = 256 * 1024;

const BODY_METHODS: ReadonlySet<string> = new Set(["POST", "PUT", "PATCH", "DELETE"]);

/** Throws ProblemError: malformed, tooLarge or unsupportedMediaType. `isApi`: JSON is expected, else a form. */
export function checkBodyHeaders(request: IncomingMessage, isApi: boolean): void {
  const { headers, method = "" } = request;
  const length = Number(headers["content-length"] ?? 0);
  const hasBody = headers["transfer-encoding"] !== undefined || length > 0;
  if (!hasBody) return;
  if (!BODY_METHODS.has(method)) throw new ProblemError("malformed", `A ${method} request carries no body.`);
  if (length > MAX_BODY_BYTES) throw tooLarge();

  const encoding = headers["content-encoding"] ?? "identity";
  if (encoding.toLowerCase() !== "identity") {
    throw new ProblemError("unsupportedMediaType", "A body is sent as it is, without a Content-Encoding.");
  }
  const accepted = isApi ? "application/json" : "application/x-www-form-urlencoded";
  const [type = "", ...parameters] = (headers["content-type"] ?? "").toLowerCase().split(";");
  if (type.trim() !== accepted) {
    throw new ProblemError("unsupportedMediaType", `The body's Content-Type here is ${accepted}.`);
  }
  const charset = parameters.map((parameter) => parameter.trim()).find((parameter) => parameter.startsWith("charset="));
  if (charset !== undefined && !/^charset="?utf-?8"?$/.test(charset)) {
    throw new ProblemError("unsupportedMediaType", "Text is sent as UTF-8.");
  }
}

export function tooLarge(): ProblemError {
  return new ProblemError("tooLarge", `A body may have at most ${MAX_BODY_BYTES / 1024} KiB.`);
}
