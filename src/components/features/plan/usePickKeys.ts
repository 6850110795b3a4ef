/** Keys of the plan page: 1 to 9 choose a pick, while no field has the focus. */
import { useEffect, useRef } from "react";
import type { PlanState } from "./usePlan.ts";

export function usePickKeys(plan: PlanState): void {
  const latest = useRef(plan);
  useEffect(() => {
    latest.current = plan;
  });
  useEffect(() => {
    const onKey = (event: KeyboardEvent): void => {
      if (event.defaultPrevented || event.ctrlKey || event.metaKey || event.altKey) return;
      const at = event.target as HTMLElement | null;
      if (at?.closest("input, textarea, select, [contenteditable], [role=dialog], [role=application]")) return;
      if (!/^[1-9]$/.test(event.key)) return;
      const { picks, choose } = latest.current;
      if (picks.some(({ id }) => id === event.key)) choose(event.key);
    };
    document.addEventListener("keydown", onKey);
    return () => document.removeEventListener("keydown", onKey);
  }, []);
}
