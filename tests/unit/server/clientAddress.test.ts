import { describe, expect, it } from "vitest";
import { SettingsError } from "#src/lib/settings.ts";
import { addressRule, replaceForwarding } from "#src/server/clientAddress.ts";

describe("the caller's address", () => {
  it("is that of the connection while no proxy is trusted, whatever a header says", () => {
    expect(addressRule(null)("203.0.113.7", "198.51.100.1, 10.0.0.1")).toBe("203.0.113.7");
    expect(addressRule(null)("::ffff:203.0.113.7", undefined)).toBe("203.0.113.7");
  });

  it("is the entry that the trusted number of proxies wrote", () => {
    expect(addressRule({ hops: 1 })("10.0.0.1", "6.6.6.6, 203.0.113.7")).toBe("203.0.113.7");
    expect(addressRule({ hops: 2 })("10.0.0.1", "6.6.6.6, 203.0.113.7, 10.0.0.2")).toBe("203.0.113.7");
    expect(addressRule({ hops: 2 })("10.0.0.1", "203.0.113.7")).toBe("203.0.113.7");
    expect(addressRule({ hops: 1 })("10.0.0.1", undefined)).toBe("10.0.0.1");
    expect(addressRule({ hops: 1 })("10.0.0.1", "not-an-address")).toBe("10.0.0.1");
  });

  it("is the nearest that lies outside the trusted ranges, and a header from elsewhere is not read", () => {
    const rule = addressRule({ ranges: ["10.0.0.0/8", "fd00::/8"] });
    expect(rule("10.0.0.1", "6.6.6.6, 203.0.113.7, 10.9.9.9")).toBe("203.0.113.7");
    expect(rule("fd00::1", "2001:db8::5")).toBe("2001:db8::5");
    expect(rule("203.0.113.9", "6.6.6.6")).toBe("203.0.113.9");
  });

  it("needs ranges that are ranges", () => {
    expect(() => addressRule({ ranges: ["10.0.0.0/99"] })).toThrow(SettingsError);
    expect(() => addressRule({ ranges: ["999.0.0.1"] })).toThrow(/999\.0\.0\.1/);
  });

  it("replaces every forwarding header that came in", () => {
    const headers = {
      host: "localhost",
      forwarded: "for=6.6.6.6;host=evil",
      "x-forwarded-for": "6.6.6.6",
      "x-forwarded-host": "evil",
      "x-forwarded-proto": "https",
      "x-real-ip": "6.6.6.6",
      "x-client-address": "6.6.6.6",
      "x-http-method-override": "DELETE",
    };
    replaceForwarding(headers, "203.0.113.7");
    expect(JSON.parse(JSON.stringify(headers))).toEqual({
      host: "localhost",
      "x-forwarded-for": "203.0.113.7",
      "x-client-address": "203.0.113.7",
    });
  });
});
