/** A share from 0 to 1 as an ink bar. The number stands beside it, so the bar is hidden from screen readers. */
export function ShareBar({ share }: { share: number }) {
  return (
    <svg className="share-bar" viewBox="0 0 84 8" aria-hidden="true">
      <rect width="1" height="8" />
      <rect y="1" width={Math.max(0.5, 84 * Math.min(1, share)).toFixed(1)} height="6" />
    </svg>
  );
}
