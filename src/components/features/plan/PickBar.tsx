/** The chosen pick at the foot of the screen, with previous and next, so that map and figures follow the thumb. */
import { useEffect, useState } from "react";
import { needText, pickPlace } from "#src/lib/plans/pick-words.ts";
import { timeText } from "#src/lib/format/plan-quantities.ts";
import type { PlanState } from "./usePlan.ts";

/** Narrower screens always show it; wide ones once the answer has left the view. */
function useAnswerInView(): boolean {
  const [inView, setInView] = useState(true);
  useEffect(() => {
    const answer = document.querySelector("[data-answer]");
    if (!answer) return;
    const observer = new IntersectionObserver(([entry]) => setInView(entry?.isIntersecting ?? true));
    observer.observe(answer);
    return () => observer.disconnect();
  }, []);
  return inView;
}

export function PickBar({ plan }: { plan: PlanState }) {
  const inView = useAnswerInView();
  const { picks, chosen, shown } = plan;
  if (!shown || !chosen || picks.length < 2) return null;
  const index = picks.indexOf(chosen);
  const step = (by: number) => () => plan.choose(picks[(index + by + picks.length) % picks.length]!.id);
  const { technique, timeS } = chosen.candidate;
  return (
    <div
      className={inView ? "pick-bar pick-bar-phone needs-script" : "pick-bar needs-script"}
      role="group"
      aria-label="Chosen pick"
    >
      <button type="button" aria-label="Previous pick" onClick={step(-1)}>
        ‹
      </button>
      <div aria-live="polite">
        <b>{`Pick ${chosen.id}: ${pickPlace(chosen)}`}</b>
        <span>
          {`${technique === "phase" ? "phase" : "absorption"}, ${needText(shown.objective, chosen.objective)}${timeS === null || shown.objective === "time" ? "" : ` in ${timeText(timeS)}`}`}
        </span>
      </div>
      <button type="button" aria-label="Next pick" onClick={step(1)}>
        ›
      </button>
    </div>
  );
}
