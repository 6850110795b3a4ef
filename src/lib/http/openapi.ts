/** OpenAPI 3.1 from the operations and the zod schemas that handlers, forms and tests share. */
import { z } from "zod";
import { OPERATIONS } from "./operations.ts";
import { problemSchema } from "./problem-schema.ts";
import { PROBLEM_KINDS } from "./problems.ts";

/** Statuses that every operation may answer with. */
const EVERYWHERE = [400, 401, 405, 406, 429, 500, 503];

type Json = Record<string, unknown>;

/** Schemas with an id become components; the rest stands in place. */
function jsonSchema(schema: z.ZodType, io: "input" | "output", components: Json): Json {
  const { $defs, ...root } = z.toJSONSchema(schema, { io, target: "draft-2020-12", unrepresentable: "any" }) as Json & {
    $defs?: Json;
  };
  for (const [name, definition] of Object.entries($defs ?? {})) {
    // Names that zod makes up are counted anew in every call: two schemas would share one.
    if (name.startsWith("__")) throw new Error("A schema that refers to itself needs an id (schemas/material.ts).");
    components[name] = cleaned(definition);
  }
  const clean = cleaned(root) as Json;
  const id = schema.meta()?.id;
  // A schema with an id comes either in place or, where it is used within, as a reference to its definition.
  if (id === undefined || "$ref" in clean) return clean;
  components[id] = clean;
  return { $ref: `#/components/schemas/${id}` };
}

/** Without zod's own marks, references turned to components. Names of properties are kept, whatever they are. */
function cleaned(node: unknown, areNames = false): unknown {
  if (Array.isArray(node)) return node.map((each) => cleaned(each));
  if (node === null || typeof node !== "object") return node;
  return Object.fromEntries(
    Object.entries(node).flatMap(([key, value]): [string, unknown][] => {
      if (areNames) return [[key, cleaned(value)]];
      if (MARKS.has(key)) return [];
      if (key === "$ref") return [[key, String(value).replace("#/$defs/", "#/components/schemas/")]];
      return [[key, cleaned(value, key === "properties")]];
    }),
  );
}

const MARKS = new Set(["$schema", "$id", "id", "~standard"]);

const codesOf = (status: number): string =>
  Object.entries(PROBLEM_KINDS)
    .flatMap(([code, kind]) => (kind.status === status ? [code] : []))
    .join(", ");

export function openApiDocument(): Json {
  const components: Json = {};
  const problem = { "application/problem+json": { schema: jsonSchema(problemSchema, "output", components) } };
  const paths: Record<string, Json> = {};
  for (const operation of OPERATIONS) {
    const responses: Json = {
      "200": {
        description: "The answer",
        content: { "application/json": { schema: jsonSchema(operation.answer, "output", components) } },
      },
    };
    for (const status of [...EVERYWHERE, ...operation.problems].sort())
      responses[String(status)] = { description: `Problem: ${codesOf(status)}. See /method/errors.`, content: problem };
    const path = (paths[operation.path] ??= {});
    path[operation.method] = {
      operationId: operation.id,
      summary: operation.summary,
      parameters: operation.parameters.map(({ schema, example, ...parameter }) => ({
        ...parameter,
        schema: jsonSchema(schema, "input", components),
        ...(example === "" ? {} : { example }),
      })),
      ...(operation.body
        ? {
            requestBody: {
              required: true,
              content: { "application/json": { schema: jsonSchema(operation.body, "input", components) } },
            },
          }
        : {}),
      responses,
    };
  }
  return {
    openapi: "3.1.0",
    info: {
      title: "Rimelight API",
      version: "1",
      description:
        "Optical constants for X-ray imaging, and plans that rank photon energies and distances on them. Units stand in the names; what has no value is null. Version 1 only ever gains fields.",
      license: { name: "MIT", identifier: "MIT" },
    },
    servers: [{ url: "/api/v1" }],
    paths,
    components: { schemas: components },
  };
}
