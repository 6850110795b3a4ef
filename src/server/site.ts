/** Under which names the site answers, and from which pages it accepts writes. */
import type { IncomingMessage } from "node:http";
import { ProblemError } from "#src/lib/http/problems.ts";

const LOOPBACK_NAMES = ["localhost", "127.0.0.1", "[::1]"];
const HOST_FORM = /^([A-Za-z0-9.-]+|\[[0-9A-Fa-f:.]+\])(:\d{1,5})?$/;
const SAFE_METHODS: ReadonlySet<string> = new Set(["GET", "HEAD"]);

export interface Site {
  readonly publicUrl: string;
  readonly protocol: string;
  readonly hosts: ReadonlySet<string>;
  readonly origins: ReadonlySet<string>;
}

/** The site of a public address. The names of the machine itself count as one. */
export function siteOf(publicUrl: string): Site {
  const { protocol, hostname, port } = new URL(publicUrl);
  const names = LOOPBACK_NAMES.includes(hostname) ? LOOPBACK_NAMES : [hostname];
  const hosts = names.map((name) => (port === "" ? name : `${name}:${port}`));
  return {
    publicUrl,
    protocol,
    hosts: new Set(hosts),
    origins: new Set(hosts.map((host) => `${protocol}//${host}`)),
  };
}

/** Exactly one Host, and one of ours: links and redirects must never carry a name that a stranger chose. */
export function checkHost(request: IncomingMessage, site: Site): void {
  // `headers` keeps only the first of two; the raw list shows both.
  const given = request.rawHeaders
    .filter((_, index) => index % 2 === 0)
    .filter((name) => name.toLowerCase() === "host");
  const host = request.headers.host;
  if (given.length !== 1 || host === undefined || !HOST_FORM.test(host)) {
    throw new ProblemError("malformed", "A request names its host exactly once.");
  }
  if (!site.hosts.has(withoutDefaultPort(host.toLowerCase(), site.protocol))) {
    throw new ProblemError(
      "wrongHost",
      `This site is served as ${site.publicUrl}. Whoever runs it can set PUBLIC_URL to the address that people type.`,
    );
  }
}

function withoutDefaultPort(host: string, protocol: string): string {
  const port = protocol === "https:" ? ":443" : ":80";
  return host.endsWith(port) ? host.slice(0, -port.length) : host;
}

/**
 * Writes come from our own pages or from programs. A browser says where a request comes from, for every content type;
 * a program says nothing, and then may not carry a cookie.
 */
export function checkOrigin(request: IncomingMessage, site: Site): void {
  if (SAFE_METHODS.has(request.method ?? "")) return;
  const origin = request.headers.origin;
  const fetchSite = request.headers["sec-fetch-site"];
  const fine =
    origin !== undefined
      ? site.origins.has(origin.toLowerCase())
      : fetchSite !== undefined
        ? fetchSite === "same-origin" || fetchSite === "none"
        : request.headers.cookie === undefined;
  if (!fine) throw new ProblemError("foreignOrigin", `Changes are accepted only from pages of ${site.publicUrl}.`);
}
