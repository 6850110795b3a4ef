/** Headers that every answer carries, errors and static files included. */

/** For pages the pages' server writes a policy with the hashes of its scripts and styles; this one is for the rest. */
const DEFAULT_POLICY =
  "default-src 'self'; object-src 'none'; base-uri 'none'; form-action 'self'; frame-ancestors 'none'";
/** Documents that are only read by programs. */
const CLOSED_POLICY =
  "default-src 'none'; object-src 'none'; base-uri 'none'; form-action 'none'; frame-ancestors 'none'";
/** Charts and formulas set sizes in style attributes; attributes cannot be hashed. */
const STYLE_ATTRIBUTES = "style-src-attr 'unsafe-inline'";

/** The headers of an answer. Transport security is promised only where the site is served over TLS. */
export function securityHeaders(https: boolean): Readonly<Record<string, string>> {
  return {
    "content-security-policy": CLOSED_POLICY,
    "x-content-type-options": "nosniff",
    // Not "no-referrer": browsers would then send Origin "null" with the site's own forms.
    "referrer-policy": "same-origin",
    "cross-origin-opener-policy": "same-origin",
    "cross-origin-resource-policy": "same-origin",
    "permissions-policy": "camera=(), geolocation=(), microphone=()",
    "x-frame-options": "DENY",
    ...(https ? { "strict-transport-security": "max-age=31536000" } : {}),
  };
}

/** The policy of an answer, from its content type and the policy that the pages' server gave it. */
export function policyFor(contentType: string, given: string | undefined): string {
  if (given !== undefined && given !== CLOSED_POLICY) {
    return contentType.startsWith("text/html") ? `${given.replace(/;?\s*$/, "")}; ${STYLE_ATTRIBUTES}` : given;
  }
  return /json/.test(contentType) ? CLOSED_POLICY : DEFAULT_POLICY;
}
