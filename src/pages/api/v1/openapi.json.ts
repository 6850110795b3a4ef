/** `GET /api/v1/openapi.json`: the document of this API, made from the schemas that its handlers use. */
import { apiRoute, otherMethods } from "#src/lib/http/handler.ts";
import { openApiDocument } from "#src/lib/http/openapi.ts";

export const GET = apiRoute({ cache: () => "revalidate", answer: () => openApiDocument() });

export const ALL = otherMethods({ GET });
