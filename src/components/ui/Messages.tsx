/** Things the page has to say: a notice, a fault with its cross, a flag beside a value. */
import type { ReactNode } from "react";
import { Icon } from "./Icon.tsx";

/** Something to know, nothing broken: rim box with a heavy foot. */
export function Notice({ children }: { children: ReactNode }) {
  return <div className="notice">{children}</div>;
}

/** What is wrong and what would be right. Give `id` and point the field's `aria-describedby` at it. */
export function Fault({ id, children }: { id?: string | undefined; children: ReactNode }) {
  return (
    <p className="fault" id={id}>
      <Icon name="cross" />
      <span>{children}</span>
    </p>
  );
}

/** Tick for what holds, exclamation mark for what to check, cross for what fails. */
export function Flag({ state, children }: { state: "holds" | "check" | "fails"; children: ReactNode }) {
  const icon = { holds: "tick", check: "check", fails: "cross" } as const;
  return (
    <span className={state === "fails" ? "flag flag-fault" : "flag"}>
      <Icon name={icon[state]} />
      <span>{children}</span>
    </span>
  );
}
