/** Text parts with real superscripts and subscripts. */
export interface Part {
  readonly text: string;
  readonly script: "base" | "sup" | "sub";
}

export function Scripts({ parts }: { parts: readonly Part[] }) {
  return (
    <>
      {parts.map(({ text, script }, index) =>
        script === "sup" ? <sup key={index}>{text}</sup> : script === "sub" ? <sub key={index}>{text}</sub> : text,
      )}
    </>
  );
}
