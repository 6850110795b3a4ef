/** The API's document: valid OpenAPI 3.1, complete, and true of every operation's answer. */
import { readdirSync } from "node:fs";
import { fileURLToPath } from "node:url";
import { Validator } from "@seriousme/openapi-schema-validator";
import { describe, expect, it } from "vitest";
import { OPERATIONS } from "#src/lib/http/openapi.ts";
import { call, good, post, WATER } from "#tests/support/api.ts";

const ROUTES = fileURLToPath(new URL("../../src/pages/api/v1/", import.meta.url));

/** Paths that the file names of the routes stand for. */
function servedPaths(): string[] {
  return readdirSync(ROUTES, { recursive: true, encoding: "utf8" })
    .filter((file) => file.endsWith(".ts"))
    .map(
      (file) =>
        `/${file
          .replace(/\.ts$/, "")
          .replace(/(^|\/)index$/, "")
          .replace(/\[(\w+)\]/g, "{$1}")}`,
    )
    .sort();
}

describe("the document", () => {
  it("is valid OpenAPI 3.1", async () => {
    const document = good<object>(await call("/openapi.json"));
    const result = await new Validator().validate(document as Record<string, unknown>);
    expect(result.errors ?? []).toEqual([]);
    expect(result.valid).toBe(true);
    expect(document).toMatchObject({ openapi: "3.1.0" });
  });

  it("names every served route, and no other", () => {
    expect([...new Set(OPERATIONS.map((operation) => operation.path))].sort()).toEqual(servedPaths());
  });

  it("refers only to schemas it holds", async () => {
    const { body } = await call("/openapi.json");
    const { components } = JSON.parse(body) as { components: { schemas: Record<string, unknown> } };
    const used = [...body.matchAll(/"#\/components\/schemas\/(\w+)"/g)].map(([, name]) => name!);
    expect(used.length).toBeGreaterThan(5);
    for (const name of used) expect(components.schemas, name).toHaveProperty(name);
    expect(body).not.toContain("$defs");
  });

  it("holds no answer that its schema refuses: every operation is called", async () => {
    const bodies: Record<string, unknown> = {
      postConstants: {
        material: {
          components: [
            { ...WATER, fraction: 0.9 },
            { materialId: "pmma", fraction: 0.1 },
          ],
          basis: "volume",
        },
        energiesKeV: { from: 5, to: 40, count: 7 },
      },
      postConstantsBatch: {
        items: [
          { material: WATER, energiesKeV: [20] },
          { material: { formula: "Xx", densityGCm3: 1 }, energiesKeV: [20] },
        ],
      },
    };
    for (const operation of OPERATIONS) {
      const path = operation.parameters.reduce(
        (text, { name, example, in: place }) => (place === "path" ? text.replace(`{${name}}`, example) : text),
        operation.path,
      );
      // Examples of one call must fit together: a material is named once.
      const query = operation.parameters.filter(
        ({ in: place, example, name }) =>
          place === "query" && example !== "" && name !== "materialId" && name !== "version",
      );
      const search = new URLSearchParams(query.map(({ name, example }) => [name, example]));
      const answer =
        operation.method === "post"
          ? await post(path, bodies[operation.id])
          : await call(
              `${path}?${operation.id === "getConstants" || operation.id.startsWith("list") || operation.id.startsWith("getElement") ? search : ""}`,
            );
      const result = operation.answer.safeParse(good(answer));
      expect(result.error?.issues ?? [], operation.id).toEqual([]);
    }
  });
});
