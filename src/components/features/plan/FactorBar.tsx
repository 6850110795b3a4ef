/** One factor of a product on a log axis: the bar begins where the last one ended. Double to less dose, solid to more. */
const WIDTH = 300;
const INSET = 8;

interface Props {
  /** log₁₀ of the product before, and of this factor. */
  readonly from: number;
  readonly by: number;
  readonly low: number;
  readonly high: number;
}

export function FactorBar({ from, by, low, high }: Props) {
  const toX = (value: number): number => {
    const span = high - low || 1;
    return Math.round((INSET + ((value - low) / span) * (WIDTH - 2 * INSET)) * 10) / 10;
  };
  const [left, right] = [toX(Math.min(from, from + by)), toX(Math.max(from, from + by))];
  const width = Math.max(2, Math.round((right - left) * 10) / 10);
  const decades = Array.from({ length: Math.floor(high) - Math.ceil(low) + 1 }, (_, index) => Math.ceil(low) + index);
  return (
    <svg className="factor-bar" viewBox={`0 0 ${WIDTH} 18`} width={WIDTH} height={18} aria-hidden="true">
      {decades.map((decade) => (
        <path key={decade} d={`M${toX(decade)} 0V18`} stroke="var(--hair)" />
      ))}
      {by >= 0 ? (
        <path d={`M${left} 5H${left + width}M${left} 13H${left + width}`} stroke="var(--pha)" strokeWidth="3" />
      ) : (
        <rect x={left} y="4" width={width} height="10" fill="var(--abs)" />
      )}
    </svg>
  );
}
