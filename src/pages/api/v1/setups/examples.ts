/** `GET /api/v1/setups/examples`: invented setups to plan with. */
import { apiRoute, otherMethods } from "#src/lib/http/handler.ts";
import { EXAMPLE_SETUPS } from "#src/lib/plans/examples.ts";

export const GET = apiRoute({ cache: () => "revalidate", answer: () => ({ items: EXAMPLE_SETUPS }) });

export const ALL = otherMethods({ GET });
