import { Fault } from "#src/components/ui/Messages.tsx";

/** What the faults of both pages have in common. */
export interface FixableFault {
  readonly message: string;
  /** Texts that would be accepted in the field's place. */
  readonly suggestions: readonly { readonly text: string; readonly words: string }[];
}

/** A fault with one button for each text that would be accepted. */
export function FaultWithFixes({
  fault,
  id,
  onFix,
}: {
  fault: FixableFault;
  id?: string;
  onFix: (text: string) => void;
}) {
  return (
    <span className="fault-block" role="alert">
      <Fault id={id}>{fault.message}</Fault>
      {fault.suggestions.length > 0 ? (
        <span className="chips">
          {fault.suggestions.map(({ text, words }) => (
            <button key={words} type="button" className="chip needs-script" onClick={() => onFix(text)}>
              {words}
            </button>
          ))}
        </span>
      ) : null}
    </span>
  );
}
