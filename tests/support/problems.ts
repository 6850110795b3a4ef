/** What every problem document of the site must be, whoever wrote it. */
import { expect } from "vitest";
import { FAULT_EXPLANATIONS } from "#src/components/site/method/error-explanations.ts";
import { PROBLEM_KINDS, type ProblemCode, type ProblemDocument } from "#src/lib/http/problems.ts";

/** Asserts status, type and form of a problem, and that it tells nothing it should not; returns it. */
export function expectProblem(
  answer: { status: number; contentType: string | undefined; body: string },
  code: ProblemCode,
): ProblemDocument {
  expect(answer.contentType).toBe("application/problem+json; charset=utf-8");
  const problem = JSON.parse(answer.body) as ProblemDocument;
  expect(problem.code, answer.body).toBe(code);
  expect(answer.status).toBe(PROBLEM_KINDS[code].status);
  expect(problem).toMatchObject({
    type: `/method/errors#${code}`,
    title: PROBLEM_KINDS[code].title,
    status: answer.status,
    instance: expect.any(String),
  });
  expect(problem.detail).toMatch(/^\S.*[.?]$/s);
  expect(problem.requestId).toMatch(/^[\w-]{8,}$/);
  // Whatever is asked in a test, the list of errors explains what is said.
  for (const fault of problem.errors ?? []) expect(Object.keys(FAULT_EXPLANATIONS)).toContain(fault.code);
  expect([...problem.instance].length).toBeLessThanOrEqual(64);
  expect(answer.body).not.toMatch(/\bat .*:\d+:\d+|node_modules|\bSELECT\b|sqlite/i);
  return problem;
}

/** The headers that every answer carries. */
export function expectSecurityHeaders(header: (name: string) => string | null | undefined): void {
  const policy = header("content-security-policy") ?? "";
  expect(policy).toMatch(/object-src 'none'/);
  expect(policy).toMatch(/base-uri 'none'/);
  expect(policy).toMatch(/frame-ancestors 'none'/);
  expect(policy).toMatch(/default-src '(self|none)'/);
  const scripts = /script-src ([^;]*)/.exec(policy)?.[1] ?? "";
  expect(scripts).not.toMatch(/unsafe-inline|unsafe-eval|\*|https?:/);
  expect(header("x-content-type-options")).toBe("nosniff");
  expect(header("referrer-policy")).toBe("same-origin");
  expect(header("x-frame-options")).toBe("DENY");
  expect(header("cross-origin-opener-policy")).toBe("same-origin");
  expect(header("access-control-allow-origin") ?? null).toBeNull();
  expect(header("x-powered-by") ?? null).toBeNull();
  expect(header("server") ?? null).toBeNull();
}
