/** Calls of the API in tests, and what must hold of each answer. */
import { expect, inject } from "vitest";
import type { ProblemCode, ProblemDocument } from "#src/lib/http/problems.ts";
import { expectProblem } from "./problems.ts";

export interface ApiAnswer {
  readonly status: number;
  readonly body: string;
  readonly headers: Headers;
}

export async function call(path: string, init: RequestInit = {}): Promise<ApiAnswer> {
  const response = await fetch(`${inject("baseUrl")}/api/v1${path}`, init);
  return { status: response.status, body: await response.text(), headers: response.headers };
}

export const postText = (path: string, body: string, headers: Record<string, string> = {}): Promise<ApiAnswer> =>
  call(path, { method: "POST", body, headers: { "content-type": "application/json", ...headers } });

export const post = (path: string, body: unknown): Promise<ApiAnswer> => postText(path, JSON.stringify(body));

/** The JSON of a good answer. */
export function good<T>(answer: ApiAnswer): T {
  expect(answer.status, answer.body.slice(0, 400)).toBe(200);
  expect(answer.headers.get("content-type")).toBe("application/json; charset=utf-8");
  return JSON.parse(answer.body) as T;
}

/** The problem of a refused answer. */
export function refused(answer: ApiAnswer, code: ProblemCode): ProblemDocument {
  return expectProblem(
    { status: answer.status, contentType: answer.headers.get("content-type") ?? undefined, body: answer.body },
    code,
  );
}

export const WATER = { formula: "H2O", densityGCm3: 1 };
