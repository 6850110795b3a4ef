/** The bands in a row, each with the value it ends at. Not a legend of lines: the lines carry the same numbers themselves. */
import { bandText, shadeOf } from "./bands.ts";
import type { PlaneData } from "./types.ts";

export function PlaneKey({ bands, quantity }: Pick<PlaneData, "bands" | "quantity">) {
  if (bands.length === 0) return null;
  const unit = quantity.unit === "" ? "" : `\u00a0${quantity.unit}`;
  const cells = [...bands, null].map((upper, band) => {
    const lower = bands[band - 1];
    const first = band === 0;
    return {
      shade: shadeOf(band, bands.length, quantity.better ?? "less"),
      shown: upper === null ? "more" : first ? `to ${bandText(upper)}${unit}` : bandText(upper),
      said:
        upper === null
          ? `over ${bandText(lower ?? 0)}${unit}`
          : first
            ? `to ${bandText(upper)}${unit}`
            : `${bandText(lower ?? 0)} to ${bandText(upper)}${unit}`,
    };
  });
  return (
    <ul className="plane-key" aria-label={`${quantity.label}, bands`}>
      {cells.map(({ shade, shown, said }) => (
        <li key={said} className={`key-${shade}`}>
          <span aria-hidden="true">{shown}</span>
          <span className="sr-only">{said}</span>
        </li>
      ))}
    </ul>
  );
}
