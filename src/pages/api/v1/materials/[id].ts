/** `GET /api/v1/materials/{id}`. */
import { apiRoute, otherMethods } from "#src/lib/http/handler.ts";
import { ProblemError } from "#src/lib/http/problems.ts";
import { getMaterial } from "#src/lib/services/materials.ts";

export const GET = apiRoute({
  cache: () => "revalidate",
  answer: ({ params }) => {
    const material = getMaterial(params["id"] ?? "");
    if (!material)
      throw new ProblemError("notFound", "No material has that id. Search by name at /api/v1/materials?query=.");
    return material;
  },
});

export const ALL = otherMethods({ GET });
