/** A blank of the sentence: a button that shows its value and opens an editor below the line. One is open at a time. */
import { type ReactNode, useEffect, useId, useRef } from "react";
import type { Question } from "#src/lib/lookup/question.ts";

export type BlankField = keyof Question;

interface BlankProps {
  readonly field: BlankField;
  readonly label: string;
  readonly children: ReactNode;
  readonly open: boolean;
  readonly unset?: boolean;
  readonly onToggle: () => void;
}

export const panelId = (field: BlankField): string => `blank-${field}`;

export function Blank({ field, label, children, open, unset = false, onToggle }: BlankProps) {
  return (
    <button
      type="button"
      className={unset ? "slot slot-unset" : "slot"}
      data-blank={field}
      aria-expanded={open}
      aria-controls={panelId(field)}
      onClick={onToggle}
    >
      <span className="sr-only">{`Change ${label}: `}</span>
      {children}
    </button>
  );
}

interface PanelProps {
  readonly field: BlankField;
  readonly title: string;
  readonly takeText: string;
  readonly help?: ReactNode;
  readonly wide?: boolean;
  readonly canTake?: boolean;
  readonly onTake: () => void;
  readonly onClose: () => void;
  readonly children: ReactNode;
}

/** The editor of an open blank. Enter takes, Escape and Close keep the old value. On a phone it is a sheet with the focus kept inside. */
export function BlankPanel({
  field,
  title,
  takeText,
  help,
  wide = false,
  canTake = true,
  onTake,
  onClose,
  children,
}: PanelProps) {
  const panel = useRef<HTMLFormElement>(null);
  const headingId = useId();
  useEffect(() => {
    const element = panel.current;
    const blank = document.querySelector<HTMLElement>(`[data-blank="${field}"]`);
    if (!element || !blank) return;
    const middle =
      blank.getBoundingClientRect().left + Math.min(blank.offsetWidth / 2, 60) - element.getBoundingClientRect().left;
    element.style.setProperty("--at", `${Math.max(20, Math.min(middle, element.clientWidth - 20))}px`);
    element.querySelector<HTMLElement>("input, textarea, select")?.focus();
    return () => blank.focus({ preventScroll: true });
  }, [field]);

  return (
    <>
      <div className="panel-scrim" onClick={onClose} aria-hidden="true" />
      <form
        ref={panel}
        id={panelId(field)}
        className={wide ? "panel panel-medium panel-hang panel-sheet" : "panel panel-hang panel-sheet"}
        role="dialog"
        aria-labelledby={headingId}
        onSubmit={(event) => {
          event.preventDefault();
          if (canTake) onTake();
        }}
        onKeyDown={(event) => {
          if (event.key === "Escape" && !event.defaultPrevented) onClose();
          else if (event.key === "Tab") keepInside(event, panel.current);
        }}
        noValidate
      >
        <div className="panel-head">
          <h3 id={headingId}>{title}</h3>
          <button type="button" className="btn btn-small" onClick={onClose}>
            Close
          </button>
        </div>
        {children}
        <div className="panel-foot">
          <button type="submit" className="btn btn-go" disabled={!canTake}>
            {takeText}
          </button>
          <p className="note">{help ?? "Enter takes it, Esc keeps the old one."}</p>
        </div>
      </form>
    </>
  );
}

function keepInside(event: { shiftKey: boolean; preventDefault: () => void }, panel: HTMLElement | null): void {
  const stops = [
    ...(panel?.querySelectorAll<HTMLElement>("button:not(:disabled), input, textarea, select, a[href]") ?? []),
  ];
  const first = stops[0];
  const last = stops.at(-1);
  if (event.shiftKey && document.activeElement === first) {
    event.preventDefault();
    last?.focus();
  } else if (!event.shiftKey && document.activeElement === last) {
    event.preventDefault();
    first?.focus();
  }
}
