/** The two technique marks: absorption a solid disc, phase a double ring. The word always stands beside the shape. */
import type { ReactNode } from "react";
import type { Technique } from "#src/lib/format/quantities.ts";

export function Mark({ technique, children }: { technique: Technique; children?: ReactNode }) {
  return (
    <span className={technique === "phase" ? "mark mark-phase" : "mark mark-absorption"}>
      <MarkShape technique={technique} />
      {children !== undefined && <span>{children}</span>}
    </span>
  );
}

export function MarkShape({ technique }: { technique: Technique }) {
  if (technique === "absorption") {
    return (
      <svg viewBox="0 0 16 16" aria-hidden="true">
        <circle cx="8" cy="8" r="6.6" fill="currentColor" />
      </svg>
    );
  }
  return (
    <svg viewBox="0 0 16 16" aria-hidden="true" fill="none" stroke="currentColor">
      <circle cx="8" cy="8" r="7.3" strokeWidth="1" />
      <circle cx="8" cy="8" r="4.7" strokeWidth="2" />
    </svg>
  );
}
