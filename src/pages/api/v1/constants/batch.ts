/** `POST /api/v1/constants/batch`: up to 100 requests, each answered or refused by itself. */
import { apiRoute, otherMethods, problemOf } from "#src/lib/http/handler.ts";
import { constantsBatchFrameSchema } from "#src/lib/schemas/constants.ts";
import { computeBatch } from "#src/lib/services/constants.ts";
import { materialLookup } from "#src/lib/services/lookup.ts";
import { getTables } from "#src/lib/services/tables.ts";

export const POST = apiRoute({
  body: constantsBatchFrameSchema,
  answer: async ({ body, requestId }) => ({
    results: await computeBatch(
      body.items,
      await getTables(),
      materialLookup,
      (error) => problemOf(error, { path: "/api/v1/constants/batch", requestId }).document,
    ),
  }),
});

export const ALL = otherMethods({ POST });
