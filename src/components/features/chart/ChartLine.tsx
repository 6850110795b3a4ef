/** One line in its technique's hand: absorption solid, phase double, anything else in ink. */
export type Technique = "phase" | "absorption" | "ink";

export function ChartLine({ technique, path, dash }: { technique: Technique; path: string; dash: string | undefined }) {
  if (path === "") return null;
  if (technique === "phase") {
    return (
      <>
        <path className="curve-phase" d={path} strokeDasharray={dash} />
        <path className="curve-phase-core" d={path} />
      </>
    );
  }
  return <path className={technique === "absorption" ? "curve-absorption" : "curve"} d={path} strokeDasharray={dash} />;
}

/** A point on a line: a disc for absorption, a double ring for phase, a small square otherwise. */
export function ChartMark({ technique, x, y }: { technique: Technique; x: number; y: number }) {
  if (technique === "phase") {
    return (
      <>
        <circle className="ring-phase" cx={x} cy={y} r={7.5} strokeWidth={1} />
        <circle className="ring-phase" cx={x} cy={y} r={4.5} />
      </>
    );
  }
  if (technique === "absorption") return <circle className="dot-absorption" cx={x} cy={y} r={6} />;
  return <rect className="cursor-box" x={x - 4} y={y - 4} width={8} height={8} />;
}
