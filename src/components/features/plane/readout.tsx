/** The line that says what stands at the cross: outside the map, of fixed height, announced politely. */
export function Readout({ text }: { text: string }) {
  return (
    <p className="readout plane-readout" aria-live="polite">
      {text}
    </p>
  );
}
