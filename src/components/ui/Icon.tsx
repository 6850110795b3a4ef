/** Small line icons. They repeat what the words beside them say, so they are hidden from screen readers. */
const PATHS = {
  tick: "M2 8.5l4 4 8-9",
  cross: "M3 3l10 10M13 3L3 13",
  check: "M8 2v8M8 12.6v1.6",
  search: "M7 12A5 5 0 1 0 7 2a5 5 0 0 0 0 10zM10.6 10.6L14.5 14.5",
} as const;

export function Icon({ name }: { name: keyof typeof PATHS }) {
  return (
    <svg className="icon" viewBox="0 0 16 16" fill="none" stroke="currentColor" strokeWidth="2" aria-hidden="true">
      <path d={PATHS[name]} />
    </svg>
  );
}
