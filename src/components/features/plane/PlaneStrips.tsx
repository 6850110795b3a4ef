/** A plane of five energies or fewer (or five distances): one strip each, the other axis shared. Nothing is interpolated between strips. */
import { useMemo } from "react";
import { stripsLayout } from "./layout.ts";
import { PlaneDrawing } from "./PlaneDrawing.tsx";
import type { PlaneData, PlaneHandlers } from "./types.ts";

interface Props extends PlaneHandlers {
  readonly data: PlaneData;
  readonly width: number;
}

/** Most energies, or distances, that are drawn as strips; from one more the map returns. */
export const MOST_STRIPS = 5;

/** Whether the plane is better drawn as strips than as a map. */
export const inStrips = ({ energiesKeV, distancesM }: Pick<PlaneData, "energiesKeV" | "distancesM">): boolean =>
  energiesKeV.length <= MOST_STRIPS || distancesM.length <= MOST_STRIPS;

export function PlaneStrips({ data, width, ...handlers }: Props) {
  const { energiesKeV, distancesM, edges } = data;
  const layout = useMemo(
    () => stripsLayout({ energiesKeV, distancesM, edges }, width),
    [energiesKeV, distancesM, edges, width],
  );
  return <PlaneDrawing data={data} layout={layout} {...handlers} />;
}
