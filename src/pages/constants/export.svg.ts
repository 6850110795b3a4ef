/** The drawn curves as a picture that stands alone: light colours, its own styles, the citation below. */
import type { APIRoute } from "astro";
import { curvesSvg } from "#src/components/features/chart/curves-svg.tsx";
import { exportRoute } from "./_export-route.ts";

export const GET: APIRoute = exportRoute("svg", ({ view, question }) => curvesSvg(view, question));
