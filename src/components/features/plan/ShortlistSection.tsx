/** The ranked picks, and the whole plane beside them. One selection is shared by row, map, drawing and working. */
import { type KeyboardEvent, useRef, useState } from "react";
import { MarkShape } from "#src/components/ui/Mark.tsx";
import { Flag } from "#src/components/ui/Messages.tsx";
import { percentText, ratioText, rounded, timeText } from "#src/lib/format/plan-quantities.ts";
import { capital } from "#src/lib/format/sentence.ts";
import { FORBIDDEN_REASONS } from "#src/lib/plans/forbidden-words.ts";
import { needText, OBJECTIVE_NAMES, pickPlace, pickWhy } from "#src/lib/plans/pick-words.ts";
import type { PickView, PlanResult } from "#src/lib/plans/view.ts";
import { PlaneSection } from "./PlaneSection.tsx";
import type { PlanState } from "./usePlan.ts";

const ORDERS = {
  objective: "least needed",
  time: "shortest time",
  distance: "shortest distance",
  transmission: "most let through",
} as const;
type Order = keyof typeof ORDERS;

export function ShortlistSection({ plan }: { plan: PlanState }) {
  const { shown, stale } = plan;
  if (!shown) return null;
  return (
    <section className="sec" aria-labelledby="shortlist-heading">
      <div className="sec-head">
        <h2 id="shortlist-heading">Shortlist</h2>
        <small>Select a row or a point. Both move together.</small>
      </div>
      <div className={stale ? "sec-body plan-columns chart-stale" : "sec-body plan-columns"}>
        <div>
          {plan.picks.length > 0 ? (
            <Shortlist plan={plan} result={shown} />
          ) : (
            <p className="lead">{shown.sentences.headline}</p>
          )}
        </div>
        <PlaneSection plan={plan} result={shown} />
      </div>
    </section>
  );
}

function Shortlist({ plan, result }: { plan: PlanState; result: PlanResult }) {
  const [order, setOrder] = useState<Order>("objective");
  const picks = [...plan.picks].sort((a, b) => keyOf(a, order) - keyOf(b, order));
  const body = useRef<HTMLTableSectionElement>(null);
  const chosenId = plan.chosen?.id ?? picks[0]?.id;
  const move = (event: KeyboardEvent, index: number): void => {
    const step = { ArrowDown: 1, ArrowUp: -1, Home: -picks.length, End: picks.length }[event.key];
    if (step === undefined) {
      if (event.key === "Enter" || event.key === " ") {
        event.preventDefault();
        plan.choose(picks[index]!.id);
      }
      return;
    }
    event.preventDefault();
    const next = Math.max(0, Math.min(picks.length - 1, index + step));
    plan.choose(picks[next]!.id);
    body.current?.querySelectorAll<HTMLElement>("tr")[next]?.focus();
  };
  const gain = result.use === "retrieval" || result.use === "tomography";
  return (
    <>
      <div className="row row-apart">
        <label className="sort needs-script">
          <span className="sr-only">Order of the list</span>
          <select
            className="input-inline"
            value={order}
            onChange={(event) => setOrder(event.currentTarget.value as Order)}
          >
            {(Object.keys(ORDERS) as Order[])
              .filter((key) => key !== "time" || result.flux)
              .map((key) => (
                <option key={key} value={key}>
                  {key === "objective"
                    ? { dose: "Least dose", time: "Least time", fluence: "Fewest photons" }[result.objective]
                    : capital(ORDERS[key])}
                </option>
              ))}
          </select>{" "}
          first
        </label>
        <span className="note">
          {result.featureDose
            ? "The feature’s own dose: the host is gas or vacuum."
            : "Dose at the entrance of the host."}
        </span>
      </div>
      <table className="list shortlist" role="grid" aria-label="Ranked picks">
        <thead>
          <tr>
            <th scope="col">
              <span className="sr-only">Pick</span>
            </th>
            <th scope="col">Choice</th>
            <th scope="col" className="num">
              {OBJECTIVE_NAMES[result.objective]}
            </th>
            {result.objective === "dose" ? null : (
              <th scope="col" className="num">
                Dose
              </th>
            )}
            {result.flux && result.objective !== "time" ? (
              <th scope="col" className="num">
                Time
              </th>
            ) : null}
            <th scope="col" className="num">
              Through sample
            </th>
            <th scope="col" className="num">
              Fresnel number
            </th>
            {gain ? (
              <th scope="col" className="num">
                Gain
              </th>
            ) : null}
          </tr>
        </thead>
        <tbody ref={body}>
          {picks.map((pick, index) => (
            <Row
              key={pick.id}
              pick={pick}
              result={result}
              gain={gain}
              chosen={pick.id === chosenId}
              onChoose={() => plan.choose(pick.id)}
              onKeyDown={(event) => move(event, index)}
            />
          ))}
        </tbody>
      </table>
      <p className="note">
        {result.absorptionId === null
          ? "Picks are at least 15 % apart in energy or distance."
          : `Picks are at least 15 % apart in energy or distance; pick ${result.absorptionId} is absorption’s own best over the whole plane, whatever the limits.`}
      </p>
    </>
  );
}

function keyOf({ candidate, objective }: PickView, order: Order): number {
  if (order === "objective") return objective ?? Infinity;
  if (order === "time") return candidate.timeS ?? Infinity;
  return order === "distance" ? candidate.distanceM : -candidate.transmission;
}

interface RowProps {
  readonly pick: PickView;
  readonly result: PlanResult;
  readonly gain: boolean;
  readonly chosen: boolean;
  readonly onChoose: () => void;
  readonly onKeyDown: (event: KeyboardEvent) => void;
}

function Row({ pick, result, gain, chosen, onChoose, onKeyDown }: RowProps) {
  const { candidate } = pick;
  const faults = pick.checks.filter(({ state }) => state !== "holds");
  const phase = candidate.technique === "phase";
  return (
    <tr
      aria-selected={chosen}
      tabIndex={chosen ? 0 : -1}
      onClick={onChoose}
      onKeyDown={onKeyDown}
      data-pick={pick.id}
      data-shortcut={/^[1-9]$/.test(pick.id) ? pick.id : undefined}
    >
      <td className="pick-rank">{pick.id}</td>
      <td className="pick-choice">
        <span className="pick-place">
          <span className={phase ? "mark mark-phase" : "mark mark-absorption"}>
            <MarkShape technique={candidate.technique} />
            <span className="sr-only">{phase ? "phase contrast" : "absorption"}</span>
          </span>
          {pickPlace(pick)}
        </span>
        <small>{pickWhy(pick, result.absorptionId)}</small>
        {pick.forbiddenBy === null ? null : <Flag state="fails">{FORBIDDEN_REASONS[pick.forbiddenBy].short}</Flag>}
        {faults.length > 0 ? (
          <Flag state="check">
            {faults.length === 1
              ? (CHECK_WORDS[faults[0]!.about] ?? "1 thing to check")
              : `${faults.length} things to check`}
          </Flag>
        ) : null}
      </td>
      <td className="num" data-label={OBJECTIVE_NAMES[result.objective]}>
        {needText(result.objective, pick.objective)}
      </td>
      {result.objective === "dose" ? null : (
        <td className="num" data-label="Dose">
          {needText("dose", pick.doseGy)}
        </td>
      )}
      {result.flux && result.objective !== "time" ? (
        <td className="num" data-label="Time">
          {candidate.timeS === null ? "" : timeText(candidate.timeS)}
        </td>
      ) : null}
      <td className="num" data-label="Through sample">
        {percentText(candidate.transmission, 2)}
      </td>
      <td className="num" data-label="Fresnel number">
        {candidate.fresnelResolution === null || !phase ? "none" : rounded(candidate.fresnelResolution, 2)}
      </td>
      {gain ? (
        <td className="num" data-label="Gain by retrieval">
          {phase
            ? `${ratioText((result.use === "tomography" ? candidate.gainCt : candidate.gain2d) ?? 1)}\u00a0×`
            : "none"}
        </td>
      ) : null}
    </tr>
  );
}

const CHECK_WORDS: Readonly<Record<string, string>> = {
  transmissionLow: "little is let through",
  transmissionHigh: "nearly all is let through",
  linearTheoryLeft: "strong contrast",
  thickSample: "thick sample",
  refractionShift: "edges shift",
  nearlyMatched: "density decides",
  opposedPair: "opposed pair",
  phaseWrap: "more than half a turn",
  sourceBlur: "source blurs most",
  countFloor: "counts decide",
  fewCountsPerProjection: "few counts a projection",
  tables: "tables differ",
  density: "density decides",
};
