import { describe, expect, it } from "vitest";
import { policyFor } from "#src/server/headers.ts";
import { withoutQueries } from "#src/server/log.ts";
import { checkNode } from "#src/server/prepare.mjs";

describe("the log", () => {
  it("leaves out the query of every address in what libraries print", () => {
    const text = "Could not render http://localhost/constants?formula=SecretX2&x=1 nor /plan?host=SecretY, but why?";
    expect(withoutQueries(text)).toBe("Could not render http://localhost/constants?… nor /plan?… but why?");
  });
});

describe("the content policy", () => {
  it("keeps a page's own with its hashes and allows style attributes", () => {
    expect(policyFor("text/html", "script-src 'self' 'sha256-x'; ")).toBe(
      "script-src 'self' 'sha256-x'; style-src-attr 'unsafe-inline'",
    );
  });

  it("closes everything for documents that only programs read", () => {
    expect(policyFor("application/problem+json; charset=utf-8", undefined)).toContain("default-src 'none'");
  });

  it("never allows inline scripts, and always forbids objects, bases and frames", () => {
    for (const type of ["text/html", "application/json", "text/csv", ""]) {
      const policy = policyFor(type, undefined);
      expect(policy).toMatch(/object-src 'none'.*base-uri 'none'.*frame-ancestors 'none'/);
      expect(policy).not.toContain("unsafe-inline");
    }
  });
});

describe("the version of Node", () => {
  it.each(["20.12.0", "20.20.2", "22.12.0", "24.0.0"])("%s fits", (version) => {
    expect(() => checkNode(version)).not.toThrow();
  });

  it.each(["18.20.0", "20.11.1", "21.7.0", "22.11.0"])("%s is refused with what to do", (version) => {
    expect(() => checkNode(version)).toThrow(/Install Node 20\.12 or newer/);
  });
});
