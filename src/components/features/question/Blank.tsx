/** A blank of the sentence: a button that shows its value and opens an editor below the line. One is open at a time. */
import { type ReactNode, useEffect, useId, useRef } from "react";

interface BlankProps {
  /** Names the blank among those of its sentence, and its panel. */
  readonly field: string;
  readonly label: string;
  readonly children: ReactNode;
  readonly open: boolean;
  readonly unset?: boolean;
  /** Ids of the faults that speak of it; the blank is marked. */
  readonly faultIds?: string | undefined;
  readonly onToggle: () => void;
}

export const panelId = (field: string): string => `blank-${field}`;

export function Blank({ field, label, children, open, unset = false, faultIds, onToggle }: BlankProps) {
  return (
    <button
      type="button"
      className={unset ? "slot slot-unset" : "slot"}
      data-blank={field}
      aria-expanded={open}
      aria-controls={panelId(field)}
      aria-invalid={faultIds === undefined ? undefined : "true"}
      aria-describedby={faultIds}
      onClick={onToggle}
    >
      <span className="sr-only">{`Change ${label}: `}</span>
      {children}
    </button>
  );
}

interface PanelProps {
  /** The blank that it hangs from. */
  readonly field: string;
  readonly title: string;
  readonly takeText: string;
  readonly help?: ReactNode;
  readonly width?: keyof typeof WIDTHS;
  readonly canTake?: boolean;
  readonly onTake: () => void;
  readonly onClose: () => void;
  readonly children: ReactNode;
}

const WIDTHS = {
  narrow: "panel panel-hang panel-sheet",
  medium: "panel panel-medium panel-hang panel-sheet",
  wide: "panel panel-wide panel-hang panel-sheet",
} as const;

/** The editor of an open blank. Enter takes, Escape and Close keep the old value. On a phone it is a sheet with the focus kept inside. */
export function BlankPanel({
  field,
  title,
  takeText,
  help,
  width = "narrow",
  canTake = true,
  onTake,
  onClose,
  children,
}: PanelProps) {
  const panel = useRef<HTMLDivElement>(null);
  const headingId = useId();
  useEffect(() => {
    const element = panel.current;
    const blank = document.querySelector<HTMLElement>(`[data-blank="${field}"]`);
    if (!element || !blank) return;
    const middle =
      blank.getBoundingClientRect().left + Math.min(blank.offsetWidth / 2, 60) - element.getBoundingClientRect().left;
    element.style.setProperty("--at", `${Math.max(20, Math.min(middle, element.clientWidth - 20))}px`);
    firstStop(element)?.focus();
    return () => blank.focus({ preventScroll: true });
  }, [field]);

  return (
    <>
      <div className="panel-scrim" onClick={onClose} aria-hidden="true" />
      <div
        ref={panel}
        id={panelId(field)}
        className={WIDTHS[width]}
        role="dialog"
        aria-labelledby={headingId}
        onKeyDown={(event) => {
          if (event.key === "Escape" && !event.defaultPrevented) onClose();
          else if (event.key === "Tab") keepInside(event, panel.current);
        }}
      >
        <form
          onSubmit={(event) => {
            event.preventDefault();
            if (canTake) onTake();
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
      </div>
    </>
  );
}

/** The field marked as first, or the first one; of a group of radio buttons the one that is chosen. */
function firstStop(panel: HTMLElement): HTMLElement | null {
  const first =
    panel.querySelector<HTMLElement>("[data-first]") ?? panel.querySelector<HTMLElement>("input, textarea, select");
  if (!(first instanceof HTMLInputElement) || first.type !== "radio") return first;
  return (
    [...panel.querySelectorAll<HTMLInputElement>("input:checked")].find(({ name }) => name === first.name) ?? first
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
