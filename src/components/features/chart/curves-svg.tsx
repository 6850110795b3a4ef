/** The curves of a look-up as an SVG file of its own: colours of the light theme written into it, citation at the foot. */
import { renderToStaticMarkup } from "react-dom/server";
import { citation } from "#src/lib/lookup/citation.ts";
import { curvesOf } from "#src/lib/lookup/curves.ts";
import type { Question } from "#src/lib/lookup/question.ts";
import type { View } from "#src/lib/lookup/view.ts";
import { EnergyChart } from "./EnergyChart.tsx";

const WIDTH = 1000;
const FOOT = 30;

// The design's light colours; fonts fall back to what the reader has, since a file cannot rely on the site's.
const STYLE = `
text{font:13px "Atkinson Hyperlegible",sans-serif;fill:#3D4A43}.t-num,.cursor-text{font:12.5px "Atkinson Hyperlegible Mono",monospace}
.t-ink,.t-strong{fill:#14201B}.t-strong,.t-absorption,.t-phase{font-weight:700}.t-absorption{fill:#943706}.t-phase{fill:#00567F}
.axis{fill:none;stroke:#14201B}.grid-line{stroke:#BFC8C0}.tick{stroke:#6E7A73}.edge-line{stroke:#14201B;stroke-dasharray:2 3}
.curve{fill:none;stroke:#14201B;stroke-width:2}.curve-absorption{fill:none;stroke:#943706;stroke-width:2.6}
.curve-phase{fill:none;stroke:#00567F;stroke-width:5.4}.curve-phase-core{fill:none;stroke:#fff;stroke-width:1.8}
.cursor{stroke:#14201B;stroke-width:1.5}.cursor-bright{stroke:#fff;stroke-width:1.5}.cursor-box{fill:#14201B}.cursor-text{fill:#fff;font-weight:600}
.dot-absorption{fill:#943706}.ring-phase{fill:#fff;stroke:#00567F;stroke-width:2}`;

export function curvesSvg(view: View, question: Question): string {
  const strip =
    question.curve === "delta-beta" && view.main && view.others.length === 0
      ? { energiesKeV: view.main.curve.energiesKeV, ...view.curveSpread }
      : null;
  const chart = (
    <EnergyChart
      width={WIDTH}
      rangeKeV={view.rangeKeV}
      curves={curvesOf(view, question.curve)}
      edges={view.edges}
      strip={strip}
      cursorKeV={null}
      cursorText=""
      title={view.main?.label ?? "Curves"}
    />
  );
  const drawn = renderToStaticMarkup(chart);
  const height = Number(/ height="(\d+)"/.exec(drawn)?.[1] ?? 460);
  const inner = drawn.replace(/^<svg[^>]*>/, "").replace(/<\/svg>$/, "");
  const words = renderToStaticMarkup(
    <text x={56} y={height + 16} fontSize={12}>
      {`${view.main?.label ?? ""}, ${view.main?.densityGCm3 ?? ""} g/cm³. ${citation(view.tableVersion, question.table)}`}
    </text>,
  );
  const size = `width="${WIDTH}" height="${height + FOOT}" viewBox="0 0 ${WIDTH} ${height + FOOT}"`;
  return `<svg xmlns="http://www.w3.org/2000/svg" ${size}><style>${STYLE}</style><rect width="100%" height="100%" fill="#fff"/>${inner}${words}</svg>\n`;
}
