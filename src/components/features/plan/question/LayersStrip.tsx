/** Layers and host to scale along the beam, from the source at left. A thin one keeps a width that can be seen. */
import { type LayerRow, thicknessM } from "./layer-rows.ts";

interface Props {
  readonly rows: readonly LayerRow[];
  readonly hostThickness: string;
  readonly hostName: string;
}

export function LayersStrip({ rows, hostThickness, hostName }: Props) {
  const parts = rows.map((row) => ({
    row,
    words: row.isHost ? `${hostThickness} ${hostName}` : `${row.thickness} ${row.material}`,
    share: (thicknessM(row.isHost ? hostThickness : row.thickness) ?? 0) * 1e6,
  }));
  return (
    <div
      className="layers-strip"
      role="img"
      aria-label={`Along the beam, to scale: ${parts.map(({ words }) => words).join(", ")}`}
    >
      <span className="layers-beam" />
      {parts.map(({ row, share }) => (
        <span key={row.id} className={row.isHost ? "layers-host" : "layers-wall"} style={{ flexGrow: share }}>
          {row.isHost ? hostName : null}
        </span>
      ))}
    </div>
  );
}
