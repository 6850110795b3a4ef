/** B4: no other spelling of an address reaches what the plain one serves. */
import { describe, expect, inject, it } from "vitest";
import { rawGet } from "#tests/support/raw.ts";
import { expectProblem, expectSecurityHeaders } from "#tests/support/problems.ts";

const baseUrl = inject("baseUrl");

const REFUSED = [
  "//api/v1/health",
  "///api/v1/health",
  "/\\api/v1/health",
  "/api//v1/health",
  "/api/v1//health",
  "/api\\v1\\health",
  "/api%2fv1%2fhealth",
  "/api%2Fv1/health",
  "/api%5cv1/health",
  "/api/v1/health%00",
  "/api/v1/%00health",
  "/api/v1/%2568ealth",
  `/api/v1/${"%25".repeat(14)}68ealth`,
  "/api/v1/%68ealth",
  "/x/../api/v1/health",
  "/api/v1/./health",
  "/api/v1/x/..%2fhealth",
  "/%2e%2e%2fapi/v1/health",
  "/.%2e/api/v1/health",
  "/%2e/api/v1/health",
  "/api/v1/health;x",
  "/api;x=1/v1/health",
  "/api/v1/health%3bx",
  "/api/v1/health.",
  "/api/v1/health%2e",
  "/api/v1/health%20",
  "/api/v1/health%09",
  "/api/v1/health%0d%0aX:1",
  "/api/v1/health%c0%ae",
  "/api/v1/health%e2%80%8b",
  "/api/v1/health%zz",
  "/api/v1/health#x",
  "http://localhost/api/v1/health",
  "/../../etc/passwd",
  "/%2e%2e%2f%2e%2e%2fetc%2fpasswd",
];
const ABSENT = [
  "/API/v1/health",
  "/api/V1/health",
  "/api/v1/Health",
  "/api/v1/health/x",
  "/api/v1/health%C2%A0x",
  "/api/v1/%EF%BC%8E%EF%BC%8E/health",
];

describe("spellings of an address", () => {
  it("are enough to tell", () => {
    expect(REFUSED.length + ABSENT.length).toBeGreaterThanOrEqual(24);
  });

  it.each(REFUSED)("%s is refused", async (target) => {
    const answer = await rawGet(baseUrl, target);
    expect(answer.status).toBe(400);
    expectProblem({ status: 400, contentType: answer.headers.get("content-type"), body: answer.body }, "badPath");
    expectSecurityHeaders((name) => answer.headers.get(name));
    expect(answer.bytes.toString()).not.toContain("tableVersion");
  });

  it("without a slash in front are no request at all", async () => {
    for (const target of ["\\api\\v1\\health", "api/v1/health"]) {
      const answer = await rawGet(baseUrl, target);
      expect(answer.status).toBe(400);
      expect(answer.bytes.toString()).not.toContain("tableVersion");
    }
  });

  it.each(ABSENT)("%s is not there", async (target) => {
    const answer = await rawGet(baseUrl, target);
    expect(answer.status).toBe(404);
    expect(answer.bytes.toString()).not.toContain("tableVersion");
  });

  it("other than the plain one are refused to people in a page, with the same status", async () => {
    const answer = await rawGet(baseUrl, "//constants", ["Accept: text/html"]);
    expect(answer.status).toBe(400);
    expect(answer.headers.get("content-type")).toBe("text/html; charset=utf-8");
    expect(answer.body).toContain("<h1>The address is not spelt in a way that is accepted</h1>");
    expectSecurityHeaders((name) => answer.headers.get(name));
  });
});
