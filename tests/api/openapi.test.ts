/** The API's document: valid OpenAPI 3.1, complete, and true of every operation's answer. */
import { readdirSync } from "node:fs";
import { fileURLToPath } from "node:url";
import { Validator } from "@seriousme/openapi-schema-validator";
import { describe, expect, it } from "vitest";
import { z } from "zod";
import { OPERATIONS } from "#src/lib/http/operations.ts";
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

interface Described {
  paths: Record<string, Record<string, DescribedOperation>>;
  components: { schemas: Record<string, object> };
}
interface DescribedOperation {
  requestBody?: { content: Record<string, { schema: object }> };
  responses: Record<string, { content: Record<string, { schema: object }> }>;
}

/** A schema of the served document, as a reader would build one from it. */
function readerOf(document: Described, schema: object): z.ZodType {
  const local = (part: object): object =>
    JSON.parse(JSON.stringify(part).replaceAll("#/components/schemas/", "#/$defs/")) as object;
  return z.fromJSONSchema({ ...local(schema), $defs: local(document.components.schemas) } as Parameters<
    typeof z.fromJSONSchema
  >[0]);
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

  it("describes problems as they are sent", async () => {
    const document = good<Described>(await call("/openapi.json"));
    const answer = await post("/constants", {});
    const { content } = document.paths["/constants"]!["post"]!.responses[String(answer.status)]!;
    const written = readerOf(document, content["application/problem+json"]!.schema);
    expect(written.safeParse(JSON.parse(answer.body)).error?.issues ?? []).toEqual([]);
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
      evaluatePlan: {
        feature: { material: { materialId: "pmma" }, shape: "fibre", sizeUm: 20 },
        host: { material: WATER, thicknessMm: 5 },
        setup: { setupId: "fine-parallel" },
        use: "direct",
        energyKeV: 20,
        distanceM: 0.3,
      },
      rankPlan: {
        feature: { material: { materialId: "pmma" }, shape: "layer", sizeUm: 20, widthUm: 10 },
        host: { material: WATER, thicknessMm: 5 },
        layers: [{ material: { materialId: "polypropylene" }, thicknessMm: 1, position: "before" }],
        setup: {
          sourceDistanceM: 30,
          sourceFwhmUm: 50,
          detectorFwhmUm: 2,
          pixelUm: 1,
          efficiency: { scintillator: { formula: "CsI", densityGCm3: 4.51 }, thicknessUm: 20 },
          fluxPerSMm2: [
            [8, 1e10],
            [40, 2e10],
          ],
          energiesKeV: { from: 10, to: 40, count: 12 },
          distancesM: [0.1, 0.3],
        },
        use: "tomography",
        limits: { doseGy: 100, transmission: [0.1, 0.9] },
      },
      postConstantsBatch: {
        items: [
          { material: WATER, energiesKeV: [20] },
          { material: { formula: "Xx", densityGCm3: 1 }, energiesKeV: [20] },
        ],
      },
    };
    const document = good<Described>(await call("/openapi.json"));
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
      const value = good(answer);
      const result = operation.answer.safeParse(value);
      expect(result.error?.issues ?? [], operation.id).toEqual([]);
      const described = document.paths[operation.path]![operation.method]!;
      const written = readerOf(document, described.responses["200"]!.content["application/json"]!.schema);
      expect(written.safeParse(value).error?.issues ?? [], `${operation.id}, as described`).toEqual([]);
      if (operation.method === "post") {
        const asked = readerOf(document, described.requestBody!.content["application/json"]!.schema);
        const body = bodies[operation.id] as object;
        expect(asked.safeParse(body).success, operation.id).toBe(true);
        expect(asked.safeParse({ ...body, more: 1 }).success, operation.id).toBe(false);
      }
    }
  });
});
