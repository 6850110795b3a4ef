import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { ProblemError } from "#src/lib/http/problems.ts";
import { readAddress } from "#src/server/paths.ts";

const codeOf = (url: string): string => {
  try {
    readAddress(url);
  } catch (error) {
    if (error instanceof ProblemError) return error.code;
    throw error;
  }
  return "accepted";
};

describe("the address of a request", () => {
  it.each([
    "/",
    "/constants",
    "/api/v1/elements/Co/factors",
    "/_astro/a.b_C-1.js",
    "/materials/%CE%B1-quartz",
    "/a%20b",
    "/method/",
    "/@x/~y",
  ])("%s is accepted", (path) => {
    expect(readAddress(path).path).toBe(path);
  });

  it.each([
    "//api/x",
    "/\\api/x",
    "/api//v1",
    "/api/v1/..",
    "/api/./v1",
    "/x/../admin",
    "/%2e%2e%2fetc",
    "/%2E/admin",
    "/admin%2f",
    "/admin%5c",
    "/admin%00",
    "/%61dmin",
    "/%2561dmin",
    `/${"%25".repeat(14)}61dmin`,
    "/admin;x",
    "/admin%3bx",
    "/admin.",
    "/admin%20",
    "/admin%2E",
    "/admin%c0%af",
    "/admin%zz",
    "/admin%",
    "/admin%e2%80%8b",
    "/admin#x",
    "/<svg>",
    '/"x"',
    "/a b",
    "/caf\u00e9",
    "http://localhost/admin",
    "admin",
    "*",
    "",
  ])("%j is refused as badPath", (url) => {
    expect(codeOf(url)).toBe("badPath");
  });

  it("over 8 KiB is refused, at 8 KiB accepted", () => {
    expect(codeOf(`/${"a".repeat(8191)}`)).toBe("accepted");
    expect(codeOf(`/?q=${"a".repeat(8189)}`)).toBe("addressTooLong");
  });

  it("gives its query decoded once", () => {
    const { path, query } = readAddress(
      "/constants?formula=Ca5%28PO4%293OH&name=a+b&flag&mu=%CE%BC&=x&pasted=1%0D%0A2",
    );
    expect(path).toBe("/constants");
    expect(Object.fromEntries(query)).toEqual({
      formula: "Ca5(PO4)3OH",
      name: "a b",
      flag: "",
      mu: "μ",
      "": "x",
      pasted: "1\r\n2",
    });
  });

  it.each([
    ["/?id=a&id=b", "repeatedKey"],
    ["/?id=a&%69d=b", "repeatedKey"],
    ["/?a&a", "repeatedKey"],
    ["/?a=%00", "malformed"],
    ["/?a=%zz", "malformed"],
    ["/?a=%c0%af", "malformed"],
    ["/?a=%2541", "malformed"],
    ["/?a=caf\u00e9", "malformed"],
    ["/?a=%1b", "malformed"],
  ])("%j is refused as %s", (url, code) => {
    expect(codeOf(url)).toBe(code);
  });

  it("has one accepted spelling: any path that is accepted stays the same when it is normalised", () => {
    const piece = fc.constantFrom(
      "/",
      ".",
      "..",
      "%2e",
      "%2f",
      "%25",
      "\\",
      "a",
      "admin",
      "%61",
      ";",
      " ",
      "%20",
      "%00",
      "?",
      "~",
    );
    fc.assert(
      fc.property(fc.array(piece, { maxLength: 8 }), (pieces) => {
        const url = `/${pieces.join("")}`;
        if (codeOf(url) !== "accepted") return;
        const { path } = readAddress(url);
        expect(new URL(`http://x${path}`).pathname).toBe(path);
        expect(decodeURI(decodeURI(path))).toBe(decodeURI(path));
      }),
      { numRuns: 5000, seed: 7 },
    );
  });
});
