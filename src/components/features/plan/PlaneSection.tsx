/** The whole plane beside the list: look, move a cross, keep points as picks; the same in a table. */
import { useMemo, useState } from "react";
import { niceBands } from "../plane/bands.ts";
import { ContactStrip } from "../plane/ContactStrip.tsx";
import { nearestIndex } from "../plane/keys.ts";
import { PlaneKey } from "../plane/PlaneKey.tsx";
import { PlaneMap } from "../plane/PlaneMap.tsx";
import { inStrips, PlaneStrips } from "../plane/PlaneStrips.tsx";
import { PlaneTable } from "../plane/PlaneTable.tsx";
import { Readout } from "../plane/readout.tsx";
import type { PlaneData, PlaneQuantity as Drawn } from "../plane/types.ts";
import { crossText, forbiddenNotes, rimNote } from "../plane/words.ts";
import { ResponsiveChart } from "../chart/ResponsiveChart.tsx";
import { percentText, ratioText, timeText } from "#src/lib/format/plan-quantities.ts";
import { needText, OBJECTIVE_NAMES, pickPlace } from "#src/lib/plans/pick-words.ts";
import type { PickView, PlaneQuantity, PlaneView, PlanResult } from "#src/lib/plans/view.ts";
import type { PlanState } from "./usePlan.ts";

export function PlaneSection({ plan, result }: { plan: PlanState; result: PlanResult }) {
  const plane = plan.plane ?? result.plane;
  const { chosen } = plan;
  const start = {
    i: nearestIndex(plane.energiesKeV, chosen?.candidate.energyKeV ?? 0),
    j: nearestIndex(plane.distancesM, chosen?.candidate.distanceM ?? 0),
  };
  // The cross follows the chosen pick until it is moved by hand.
  const [moved, setMoved] = useState<{ i: number; j: number; from: string | null } | null>(null);
  const cross = moved && moved.from === (chosen?.id ?? null) ? moved : start;
  const { picks } = plan;
  const chosenId = chosen?.id ?? null;
  // The drawing is kept while only the cross moves.
  const still = useMemo(() => drawn(plane, picks, result), [plane, picks, result]);
  const data = { ...still, chosen: chosenId, cross };
  const handlers = {
    onCross: (i: number, j: number) => setMoved({ i, j, from: chosen?.id ?? null }),
    onKeep: (i: number, j: number) => void plan.keepPoint(i, j),
    onPick: (id: string) => {
      setMoved(null);
      plan.choose(id);
    },
  };
  const strips = inStrips(data);
  const alone = result.picks.find(({ id }) => id === result.absorptionId);
  const contact = plane.quantity === "objective" && result.use !== "absorption" && !strips ? plane.contact : null;
  return (
    <div className="plane-block">
      <div className="row row-apart">
        <h3 className="sub">
          The whole plane, by{" "}
          <select
            className="input-inline needs-script"
            aria-label="Quantity of the plane"
            value={plane.quantity}
            onChange={(event) => plan.showQuantity(event.currentTarget.value as PlaneQuantity)}
          >
            {quantitiesOf(result).map((quantity) => (
              <option key={quantity} value={quantity}>
                {quantityOf(quantity, result).label.toLowerCase()}
              </option>
            ))}
          </select>
          <noscript>{quantityOf(plane.quantity, result).label.toLowerCase()}</noscript>
        </h3>
      </div>
      <Readout text={crossText(data)} />
      <ResponsiveChart
        served={{ wide: 520, narrow: 358 }}
        draw={(width) =>
          strips ? (
            <PlaneStrips data={data} width={width} {...handlers} />
          ) : (
            <>
              <PlaneMap data={data} width={width} axis={contact === null} {...handlers} />
              {contact ? (
                <ContactStrip
                  energiesKeV={plane.energiesKeV}
                  values={contact.values}
                  bands={data.bands}
                  edges={data.edges}
                  width={width}
                  words="shortest distance, absorption only"
                  best={
                    alone
                      ? { id: alone.id, energyKeV: alone.candidate.energyKeV, chosen: alone.id === chosen?.id }
                      : null
                  }
                  onPick={handlers.onPick}
                />
              ) : null}
            </>
          )
        }
      />
      <PlaneKey bands={data.bands} quantity={data.quantity} />
      <p className="note">{noteOf(data)}</p>
      <div className="actions needs-script">
        <button type="button" className="btn btn-small" onClick={() => handlers.onKeep(cross.i, cross.j)}>
          Keep this point as a pick
        </button>
      </div>
      <PlaneTable data={data} />
    </div>
  );
}

function noteOf(data: PlaneData): string {
  const reasons = forbiddenNotes(data);
  const rim = rimNote(data);
  return [
    ...(reasons.length > 0
      ? [`Hatched: ${reasons.map((reason, index) => (index === 0 ? reason : lower(reason))).join("; ")}.`]
      : []),
    ...(rim === null ? [] : [`${rim}.`]),
    "Arrow keys move the cross, Enter keeps the point.",
  ].join(" ");
}

const lower = (words: string): string => words.charAt(0).toLowerCase() + words.slice(1);

function drawn(plane: PlaneView, picks: readonly PickView[], result: PlanResult): Omit<PlaneData, "chosen" | "cross"> {
  const quantity = quantityOf(plane.quantity, result);
  return {
    energiesKeV: plane.energiesKeV,
    distancesM: plane.distancesM,
    values: plane.values,
    forbidden: plane.forbidden,
    bands: niceBands(plane.values, quantity.better),
    quantity,
    edges: result.edges,
    equal: plane.equal,
    picks: picks.map((pick) => ({
      id: pick.id,
      technique: pick.candidate.technique,
      energyKeV: pick.candidate.energyKeV,
      distanceM: pick.candidate.distanceM,
      words: `${pickPlace(pick)}, ${needText(result.objective, pick.objective)}`,
    })),
  };
}

function quantitiesOf(result: PlanResult): PlaneQuantity[] {
  return [
    "objective",
    ...(result.flux && result.objective !== "time" ? (["time"] as const) : []),
    ...(result.use === "absorption" ? [] : (["advantage"] as const)),
    ...(result.use === "retrieval" || result.use === "tomography" ? (["gain"] as const) : []),
    "transmission",
  ];
}

function quantityOf(quantity: PlaneQuantity, { objective }: PlanResult): Drawn {
  switch (quantity) {
    case "objective":
      return {
        label: OBJECTIVE_NAMES[objective],
        unit: { dose: "Gy", time: "s", fluence: "per µm²" }[objective],
        format: (value) => needText(objective, value),
      };
    case "time":
      return { label: "Time needed", unit: "s", format: (value) => timeText(value) };
    case "advantage":
      return {
        label: "Gain over absorption",
        unit: "×",
        better: "more",
        format: (value) => `${ratioText(value)}\u00a0×`,
      };
    case "gain":
      return { label: "Gain by retrieval", unit: "×", better: "more", format: (value) => `${ratioText(value)}\u00a0×` };
    case "transmission":
      return { label: "Let through the sample", unit: "", better: "more", format: (value) => percentText(value) };
  }
}
