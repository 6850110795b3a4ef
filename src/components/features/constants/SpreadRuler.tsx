/** Deviations of the other tables on one linear axis; the chosen table is the rim line in the middle. */
export function SpreadRuler({ deviations, most }: { deviations: readonly number[]; most: number }) {
  const width = 230;
  const toX = (share: number): number => width / 2 + (share / most) * (width / 2 - 8);
  const ends = [0, ...deviations].map(toX);
  const from = Math.min(...ends);
  return (
    <svg className="chart" width={width} height={26} viewBox={`0 0 ${width} 26`} aria-hidden="true">
      <line className="axis" x1={8} x2={width - 8} y1={13} y2={13} />
      {[-1, 1].map((side) => (
        <line key={side} className="tick" x1={toX(side * most)} x2={toX(side * most)} y1={9} y2={17} />
      ))}
      <rect className="cursor-box" opacity={0.18} x={from} y={8} width={Math.max(...ends) - from} height={10} />
      <line className="rim-dark" x1={width / 2} x2={width / 2} y1={3} y2={23} />
      <line className="rim-bright" x1={width / 2 + 2} x2={width / 2 + 2} y1={3} y2={23} />
      {deviations.map((share, index) => (
        <line key={index} className="cursor" x1={toX(share)} x2={toX(share)} y1={5} y2={21} />
      ))}
    </svg>
  );
}
