/**
 * The one trusted address of a caller: that of the connection, or, only where TRUST_PROXY says so, the one that the
 * nearest trusted proxy wrote into X-Forwarded-For. Every forwarding header that came in is removed.
 */
import type { IncomingHttpHeaders } from "node:http";
import { BlockList, isIP } from "node:net";
import { type TrustProxy, SettingsError } from "#src/lib/settings.ts";

const FORWARDING_HEADERS = [
  "forwarded",
  "x-forwarded-for",
  "x-forwarded-host",
  "x-forwarded-port",
  "x-forwarded-proto",
  "x-forwarded-protocol",
  "x-forwarded-scheme",
  "x-forwarded-server",
  "x-forwarded-ssl",
  "x-forwarded-prefix",
  "x-original-url",
  "x-rewrite-url",
  "x-original-host",
  "x-host",
  "x-real-ip",
  "x-client-ip",
  "x-client-address",
  "x-cluster-client-ip",
  "true-client-ip",
  "cf-connecting-ip",
  "fastly-client-ip",
  "x-http-method-override",
  "x-http-method",
  "x-method-override",
];

export type AddressRule = (peer: string, forwardedFor: string | undefined) => string;

/** How the caller's address is found. Throws SettingsError for a range that is no address range. */
export function addressRule(trust: TrustProxy | null): AddressRule {
  if (trust === null) return (peer) => plainAddress(peer);
  const trusted = "ranges" in trust ? trustedRanges(trust.ranges) : null;
  const hops = "hops" in trust ? trust.hops : Number.POSITIVE_INFINITY;
  return (peer, forwardedFor) => {
    let address = plainAddress(peer);
    const chain = (forwardedFor ?? "").split(",").map((part) => plainAddress(part.trim()));
    // Each trusted proxy appends whom it saw: walk from the nearest outwards, and stop at the first that is not trusted.
    for (let hop = 0; hop < hops && (trusted === null || trusted(address)); hop++) {
      const next = chain.pop();
      if (next === undefined || isIP(next) === 0) break;
      address = next;
    }
    return address;
  };
}

/** Removes what a caller must not set, and writes the one address where the pages' server looks for it. */
export function replaceForwarding(headers: IncomingHttpHeaders, address: string): void {
  for (const name of FORWARDING_HEADERS) headers[name] = undefined;
  headers["x-forwarded-for"] = address;
  headers["x-client-address"] = address;
}

/** An IPv4 address that came over an IPv6 socket, in its own form. */
function plainAddress(address: string): string {
  return address.replace(/^::ffff:(?=\d+\.\d+\.\d+\.\d+$)/i, "");
}

function trustedRanges(ranges: readonly string[]): (address: string) => boolean {
  const list = new BlockList();
  for (const range of ranges) {
    const [address = "", bits] = range.split("/");
    const family = isIP(address) === 4 ? "ipv4" : "ipv6";
    try {
      if (bits === undefined) list.addAddress(address, family);
      else list.addSubnet(address, Number(bits), family);
    } catch {
      throw new SettingsError(`The setting TRUST_PROXY holds ${range}, which is no address range.`);
    }
  }
  return (address) => isIP(address) !== 0 && list.check(address, isIP(address) === 4 ? "ipv4" : "ipv6");
}
