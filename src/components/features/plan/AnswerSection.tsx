/** The verdict, what it rests on, and where the doses of both techniques stand. */
import { useCopy } from "#src/components/ui/useCopy.ts";
import { DoseRuler } from "../plan-figures/DoseRuler.tsx";
import { SameScalePair } from "../plan-figures/SameScalePair.tsx";
import { ResponsiveChart } from "../chart/ResponsiveChart.tsx";
import { MarkShape } from "#src/components/ui/Mark.tsx";
import { Flag } from "#src/components/ui/Messages.tsx";
import { doseText, energyText, percentText, ratioText, timeText } from "#src/lib/format/plan-quantities.ts";
import { writePlanQuestion } from "#src/lib/plans/question.ts";
import { copiedSentence, needText, pickPlace } from "#src/lib/plans/pick-words.ts";
import type { PickView, PlanResult, ProfileView } from "#src/lib/plans/view.ts";
import { methodTopicHref } from "#src/lib/format/method-links.ts";
import type { PlanState } from "./usePlan.ts";

export function AnswerSection({ plan }: { plan: PlanState }) {
  const { shown, stale } = plan;
  return (
    <section className="sec" aria-labelledby="answer-heading" data-answer="">
      <div className="sec-head">
        <h2 id="answer-heading">Answer</h2>
        {shown ? <small>{`Detected means ${shown.threshold} times the noise.`}</small> : null}
      </div>
      <div className={stale ? "sec-body chart-stale" : "sec-body"} aria-busy={plan.progress !== null}>
        {shown ? <Answer plan={plan} result={shown} /> : <NoAnswer plan={plan} />}
      </div>
    </section>
  );
}

function NoAnswer({ plan }: { plan: PlanState }) {
  return <p className="lead">{plan.trouble ?? "There is no answer yet: a blank above needs mending."}</p>;
}

function Answer({ plan, result }: { plan: PlanState; result: PlanResult }) {
  const { sentences, choice, picks } = result;
  const [first] = picks;
  const technique = choice === "absorption" ? "absorption" : choice === "phase" ? "phase" : null;
  const { chosen } = plan;
  return (
    <>
      <div className="answer-top">
        <div>
          <p className="verdict" aria-live="polite">
            {technique ? (
              <span
                className={technique === "phase" ? "mark mark-phase verdict-mark" : "mark mark-absorption verdict-mark"}
              >
                <MarkShape technique={technique} />
              </span>
            ) : null}
            {sentences.headline}
          </p>
          {sentences.lead.map((sentence) => (
            <p className="lead" key={sentence}>
              {sentence}
            </p>
          ))}
          {sentences.reason ? <p className="lead">{sentences.reason}</p> : null}
          {choice === "none" ? <NearestMiss result={result} /> : null}
          {result.objectiveProposed && result.objective !== "dose" ? (
            <p className="note">
              {`Ranked by ${result.objective === "time" ? "time" : "fluence"}, since ${result.beam.host.label} holds no hydrogen and is hardly harmed. Choose dose under the limits if it counts.`}
            </p>
          ) : null}
          {chosen && first && chosen.id !== first.id ? (
            <ChosenLine chosen={chosen} first={first} result={result} />
          ) : null}
          {first ? <HoldsLine pick={first} answered={choice !== "none"} /> : null}
        </div>
        {first && (result.fringe || result.use === "absorption") && result.shadow ? (
          <div className="answer-pair">
            <ResponsiveChart
              served={{ wide: 420, narrow: 358 }}
              draw={(width) => (
                <SameScalePair
                  width={width}
                  fringe={result.fringe}
                  shadow={result.shadow}
                  fringeWords={pairWords("fringe", result.fringe, first)}
                  shadowWords={pairWords("shadow", result.shadow, shadowPick(result))}
                  sizeUm={result.beam.feature.widthUm ?? result.beam.feature.sizeUm}
                />
              )}
            />
          </div>
        ) : null}
      </div>
      <Ruler result={result} />
      <AnswerActions plan={plan} result={result} />
    </>
  );
}

const shadowPick = (result: PlanResult): PickView | undefined =>
  result.absorptionId === null ? result.picks[0] : result.picks.find(({ id }) => id === result.absorptionId);

function pairWords(name: string, profile: ProfileView | null, pick: PickView | undefined): string {
  if (!profile || !pick) return "";
  return `${name} ${percentText(Math.abs(profile.largest), 2)} at ${energyText(pick.candidate.energyKeV, 3)}`;
}

function ChosenLine({ chosen, first, result }: { chosen: PickView; first: PickView; result: PlanResult }) {
  const [own, best] = [chosen.objective, first.objective];
  const ratio = own !== null && best !== null && best > 0 ? own / best : null;
  return (
    <p className="note">
      {`You chose pick ${chosen.id}: ${pickPlace(chosen)}, ${needText(result.objective, own)}${ratio === null ? "" : `, ${ratio >= 1 ? `${ratioText(ratio)}\u00a0× more` : `${ratioText(1 / ratio)}\u00a0× less`} than pick ${first.id}`}.`}
    </p>
  );
}

function HoldsLine({ pick, answered }: { pick: PickView; answered: boolean }) {
  const open = pick.checks.filter(({ state }) => state !== "holds").length;
  return (
    <p className="holds-line">
      {!answered ? null : open === 0 ? (
        <Flag state="holds">The model holds for this choice.</Flag>
      ) : (
        <Flag state="check">
          <a href="#holds">{`The model holds, ${open === 1 ? "one thing" : `${open} things`} to check.`}</a>
        </Flag>
      )}
      <span>
        Doses are estimates for planning, not dosimetry for people or animals.{" "}
        <a href={methodTopicHref("safety")}>Safety</a>
      </span>
    </p>
  );
}

/** What the best point would need if no limit were set, and what else would let a point in. */
function NearestMiss({ result }: { result: PlanResult }) {
  const miss = result.miss;
  if (!miss) return null;
  return (
    <>
      <p className="lead">{miss.words}</p>
      {miss.changes.length > 0 ? (
        <ul className="plain-list">
          {miss.changes.map((change) => (
            <li key={change}>{change}</li>
          ))}
        </ul>
      ) : null}
    </>
  );
}

function Ruler({ result }: { result: PlanResult }) {
  const { objective, limits, picks, absorptionId } = result;
  const valued = (technique: "phase" | "absorption") =>
    picks.flatMap((pick) =>
      pick.candidate.technique === technique && pick.objective !== null && pick.objective > 0
        ? [{ id: pick.id, value: pick.objective }]
        : [],
    );
  const [phase, absorption] = [valued("phase"), valued("absorption")];
  if (phase.length + absorption.length === 0) return null;
  const limit =
    objective === "dose" && limits.doseGy !== null
      ? { value: limits.doseGy, words: `your limit ${doseText(limits.doseGy)}` }
      : objective === "time" && limits.timeS !== null
        ? { value: limits.timeS, words: `your limit ${timeText(limits.timeS)}` }
        : null;
  const alone = picks.find(({ id }) => id === absorptionId)?.objective ?? null;
  const best = picks[0]?.objective ?? null;
  const ratio =
    absorptionId !== null && alone !== null && best !== null && picks[0]?.id !== absorptionId ? alone / best : null;
  const words = { dose: "dose", time: "time", fluence: "light" }[objective];
  return (
    <ResponsiveChart
      served={{ wide: 1168, narrow: 358 }}
      draw={(width) => (
        <DoseRuler
          width={width}
          label={{ dose: "Dose, Gy", time: "Time, s", fluence: "Fluence, per µm²" }[objective]}
          unit={{ dose: "Gy", time: "s", fluence: "per µm²" }[objective]}
          phase={phase}
          absorption={absorption}
          limit={limit}
          ratioWords={
            ratio === null || result.choice === "either"
              ? null
              : ratio > 1
                ? `${ratioText(ratio)}\u00a0× less ${words}`
                : `${ratioText(1 / ratio)}\u00a0× more ${words}`
          }
        />
      )}
    />
  );
}

const FILES = [
  { href: "/plan/picks.csv", words: "Save list, CSV" },
  { href: "/plan/plane.csv", words: "Save plane, CSV" },
  { href: "/plan/answer.json", words: "Save JSON" },
] as const;

function AnswerActions({ plan, result }: { plan: PlanState; result: PlanResult }) {
  const sentence = copiedSentence(result);
  const query = writePlanQuestion(plan.question).toString();
  const { copy, said } = useCopy(sentence);
  return (
    <div className="actions">
      <button type="button" className="btn btn-go needs-script" data-shortcut="c" onClick={copy}>
        Copy as a sentence
      </button>
      {FILES.map(({ href, words }) => (
        <a key={href} className="btn" href={`${href}?${query}`} download>
          {words}
        </a>
      ))}
      <span className="note" role="status">
        {said}
      </span>
      <span className="note">
        {plan.tooLong
          ? "This plan is too long to link: the address stands for the plan before. Shorten recipes or layers to link it."
          : "The address of this page reproduces the plan."}
      </span>
    </div>
  );
}
