/** Up to four picks side by side with their differences in words, and whether the model holds for the chosen one. */
import { useState } from "react";
import { Icon } from "#src/components/ui/Icon.tsx";
import {
  distanceText,
  energyText,
  lengthText,
  percentText,
  ratioText,
  rounded,
  timeText,
} from "#src/lib/format/plan-quantities.ts";
import { needText, OBJECTIVE_NAMES, pickPlace } from "#src/lib/plans/pick-words.ts";
import type { PickView, PlanResult } from "#src/lib/plans/view.ts";
import type { PlanState } from "./usePlan.ts";

const MOST = 4;

export function CompareSection({ plan }: { plan: PlanState }) {
  const { shown, picks, chosen, stale } = plan;
  const [wanted, setWanted] = useState<readonly string[] | null>(null);
  if (!shown || picks.length === 0) return null;
  const known = new Set(picks.map(({ id }) => id));
  const ids = (wanted ?? startingIds(shown, picks)).filter((id) => known.has(id));
  const compared = ids.flatMap((id) => picks.filter((pick) => pick.id === id));
  const toggle = (id: string): void =>
    setWanted(ids.includes(id) ? ids.filter((other) => other !== id) : [...ids, id].slice(-MOST));
  return (
    <section className="sec" aria-labelledby="compare-heading">
      <div className="sec-head">
        <h2 id="compare-heading">Compare</h2>
      </div>
      <div className={stale ? "sec-body cols chart-stale" : "sec-body cols"}>
        <div>
          <div className="chips needs-script" role="group" aria-label="Picks to compare, up to four">
            {picks.map((pick) => (
              <button
                key={pick.id}
                type="button"
                className="chip"
                aria-pressed={ids.includes(pick.id)}
                onClick={() => toggle(pick.id)}
              >{`Pick ${pick.id}`}</button>
            ))}
          </div>
          {compared.length > 0 ? (
            <CompareTable compared={compared} result={shown} />
          ) : (
            <p className="note">Choose picks to compare.</p>
          )}
        </div>
        {chosen ? <Holds pick={chosen} /> : null}
      </div>
    </section>
  );
}

const startingIds = (result: PlanResult, picks: readonly PickView[]): string[] =>
  [...new Set([picks[0]?.id, picks[1]?.id, result.absorptionId ?? picks[2]?.id])].flatMap((id) =>
    id === undefined ? [] : [id],
  );

const energySpan = ([low, high]: readonly [number, number]): string =>
  low === high ? energyText(low) : `${rounded(low, 4)} to ${energyText(high)}`;
const distanceSpan = ([low, high]: readonly [number, number]): string =>
  low === high ? distanceText(low) : `${distanceText(low)} to ${distanceText(high)}`;

function CompareTable({ compared, result }: { compared: readonly PickView[]; result: PlanResult }) {
  const first = compared[0]!;
  const times = (value: number | null, base: number | null): string | null => {
    if (value === null || base === null || !(base > 0) || value === base) return null;
    const ratio = value / base;
    if (Math.abs(ratio - 1) < 0.005) return "the same";
    return ratio > 1 ? `${ratioText(ratio)}\u00a0× more` : `${ratioText(1 / ratio)}\u00a0× less`;
  };
  const rows: readonly { name: string; text: (pick: PickView) => string; value: (pick: PickView) => number | null }[] =
    [
      {
        name: OBJECTIVE_NAMES[result.objective],
        text: (pick) => needText(result.objective, pick.objective),
        value: (pick) => pick.objective,
      },
      ...(result.objective === "dose"
        ? []
        : [
            {
              name: "Dose",
              text: (pick: PickView) => needText("dose", pick.doseGy),
              value: (pick: PickView) => pick.doseGy,
            },
          ]),
      ...(result.flux && result.objective !== "time"
        ? [
            {
              name: "Exposure",
              text: (pick: PickView) => (pick.candidate.timeS === null ? "not known" : timeText(pick.candidate.timeS)),
              value: (pick: PickView) => pick.candidate.timeS,
            },
          ]
        : []),
      {
        name: "Photons counted in a pixel",
        text: ({ candidate }) => (candidate.countsPerPixel === null ? "no value" : rounded(candidate.countsPerPixel)),
        value: ({ candidate }) => candidate.countsPerPixel,
      },
      {
        name: "Blur in the sample, FWHM",
        text: ({ candidate }) => lengthText(candidate.blurFwhmUm * 1e-6, 3),
        value: ({ candidate }) => candidate.blurFwhmUm,
      },
      {
        name: "Magnification",
        text: ({ candidate }) => `${rounded(candidate.magnification)}\u00a0×`,
        value: () => null,
      },
      { name: "Let through", text: ({ candidate }) => percentText(candidate.transmission), value: () => null },
      {
        name: "Good choices around it",
        text: ({ candidate: { plateau } }) =>
          plateau ? `${energySpan(plateau.energyKeV)}, ${distanceSpan(plateau.distanceM)}` : "not given",
        value: () => null,
      },
    ];
  return (
    <table className="list list-tight list-flow compare">
      <thead>
        <tr>
          <th scope="col">
            <span className="sr-only">Figure</span>
          </th>
          {compared.map((pick) => (
            <th scope="col" key={pick.id}>{`Pick ${pick.id}`}</th>
          ))}
        </tr>
      </thead>
      <tbody>
        <tr>
          <th scope="row">Choice</th>
          {compared.map((pick) => (
            <td key={pick.id} data-label={`Pick ${pick.id}`}>
              <span>
                {pickPlace(pick)}
                <small>{pick.candidate.technique === "phase" ? "phase contrast" : "absorption"}</small>
              </span>
            </td>
          ))}
        </tr>
        {rows.map((row) => (
          <tr key={row.name}>
            <th scope="row">{row.name}</th>
            {compared.map((pick) => {
              const difference = pick === first ? null : times(row.value(pick), row.value(first));
              return (
                <td key={pick.id} data-label={`Pick ${pick.id}`}>
                  <span>
                    {row.text(pick)}
                    {difference === null ? null : <small>{difference}</small>}
                  </span>
                </td>
              );
            })}
          </tr>
        ))}
      </tbody>
    </table>
  );
}

function Holds({ pick }: { pick: PickView }) {
  const ICONS = { holds: "tick", check: "check", fails: "cross" } as const;
  const NAMES = { holds: "Holds", check: "Check", fails: "Fails" } as const;
  return (
    <div>
      <h3 className="sub" id="holds">{`Does the model hold for pick ${pick.id}?`}</h3>
      <ul className="holds">
        {pick.checks.map(({ state, about, text }) => (
          <li key={about} data-check={about}>
            <b>
              <Icon name={ICONS[state]} />
              {NAMES[state]}
            </b>
            <span>
              {text}{" "}
              <a href={about === "tables" || about === "density" ? "/method#ranking" : `/method#warning-${about}`}>
                More
              </a>
            </span>
          </li>
        ))}
      </ul>
    </div>
  );
}
