/** The plane as a map: photon energy across, distance up, bands of the quantity, what is not allowed hatched over. */
import { useMemo } from "react";
import { mapLayout } from "./layout.ts";
import { PlaneDrawing } from "./PlaneDrawing.tsx";
import type { PlaneData, PlaneHandlers } from "./types.ts";

interface Props extends PlaneHandlers {
  readonly data: PlaneData;
  readonly width: number;
  /** False where a contact strip below draws the energy axis. */
  readonly axis?: boolean;
}

export function PlaneMap({ data, width, axis = true, ...handlers }: Props) {
  const { energiesKeV, distancesM, edges } = data;
  const layout = useMemo(
    () => mapLayout({ energiesKeV, distancesM, edges }, width, axis),
    [energiesKeV, distancesM, edges, width, axis],
  );
  return <PlaneDrawing data={data} layout={layout} axis={axis} {...handlers} />;
}
