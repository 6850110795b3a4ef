/** Copying a sentence. Where the clipboard is closed the sentence is shown instead, to be copied by hand. */
import { useState } from "react";

const SAID_MS = 2500;

export function useCopy(sentence: string): { copy: () => Promise<void>; said: string } {
  const [copied, setCopied] = useState<"no" | "yes" | "by hand">("no");
  const copy = async (): Promise<void> => {
    // The clipboard is open to pages served safely only.
    const done = await navigator.clipboard?.writeText(sentence).then(
      () => true,
      () => false,
    );
    setCopied(done === true ? "yes" : "by hand");
    if (done === true) setTimeout(() => setCopied("no"), SAID_MS);
  };
  return { copy, said: copied === "yes" ? "Copied." : copied === "by hand" ? sentence : "" };
}
