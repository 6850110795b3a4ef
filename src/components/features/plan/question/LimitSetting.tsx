/** A limit that may be lifted: "No limit" is a button, not an empty field. */
import { type ReactNode, useState } from "react";
import { Setting } from "#src/components/features/question/Setting.tsx";
import type { Reading } from "#src/components/features/question/ReadField.tsx";

interface Props {
  readonly label: string;
  readonly isOpen: boolean;
  readonly onOpen: () => void;
  readonly onClear: () => void;
  readonly readings: Readonly<Record<string, Reading | null>>;
  readonly children: ReactNode;
}

export function LimitSetting({ label, isOpen, onOpen, onClear, readings, children }: Props) {
  const [limited, setLimited] = useState(isOpen);
  return (
    <Setting label={label} readings={readings}>
      <span>{limited ? children : "No limit."}</span>{" "}
      <button
        type="button"
        className="btn btn-small"
        onClick={() => {
          if (limited) onClear();
          else onOpen();
          setLimited(!limited);
        }}
      >
        <span className="sr-only">{`${label}: `}</span>
        {limited ? "No limit" : "Set a limit"}
      </button>
    </Setting>
  );
}
