/** What an API request says about who sends it. */
import type { IncomingMessage } from "node:http";
import { ProblemError } from "#src/lib/http/problems.ts";

/** Keys are far shorter; a longer one is refused without being looked up. */
const MAX_KEY_LENGTH = 256;

/** Throws ProblemError: twoIdentities or unauthenticated. */
export function checkIdentity(request: IncomingMessage): void {
  const key = /^bearer(?:\s+(.*))?$/i.exec(request.headers.authorization ?? "");
  if (key === null) return;
  if (request.headers.cookie !== undefined) {
    throw new ProblemError("twoIdentities", "Send either the session's cookie or a key, not both.");
  }
  const reason =
    (key[1] ?? "").length > MAX_KEY_LENGTH
      ? "The key is longer than any key."
      : "The key is not known, or no longer valid.";
  throw new ProblemError("unauthenticated", reason, { headers: { "www-authenticate": "Bearer" } });
}
