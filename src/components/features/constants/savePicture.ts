/** The drawn chart as a PNG at twice its size, with the citation line below it. */

const SCALE = 2;
const FOOT = 28;

export async function savePicture(holder: HTMLElement | null, name: string, tableVersion: string): Promise<void> {
  const drawn = holder?.querySelector<SVGSVGElement>("svg.chart");
  if (!drawn) return;
  const { width, height } = drawn.getBoundingClientRect();
  const picture = await loadPicture(selfContained(drawn));
  const canvas = document.createElement("canvas");
  canvas.width = width * SCALE;
  canvas.height = (height + FOOT) * SCALE;
  const pen = canvas.getContext("2d");
  if (!pen) return;
  const style = getComputedStyle(document.documentElement);
  pen.scale(SCALE, SCALE);
  pen.fillStyle = style.getPropertyValue("--paper");
  pen.fillRect(0, 0, width, height + FOOT);
  pen.drawImage(picture, 0, 0, width, height);
  pen.fillStyle = style.getPropertyValue("--ink");
  pen.font = "12px sans-serif";
  pen.fillText(
    `Rimelight tables ${tableVersion}; EPDL97, Henke 1993, Chantler 1995; ${new Date().toISOString().slice(0, 10)}`,
    12,
    height + 18,
  );
  const link = document.createElement("a");
  link.href = canvas.toDataURL("image/png");
  link.download = `${name}.png`;
  link.click();
}

const STYLED = [
  "fill",
  "stroke",
  "stroke-width",
  "stroke-dasharray",
  "opacity",
  "font-family",
  "font-size",
  "font-weight",
  "letter-spacing",
] as const;

/** A copy whose shapes carry their computed style, since a picture does not see the page's style sheets. */
function selfContained(drawn: SVGSVGElement): string {
  const copy = drawn.cloneNode(true) as SVGSVGElement;
  const originals = drawn.querySelectorAll<SVGElement>("*");
  for (const [index, element] of [...copy.querySelectorAll<SVGElement>("*")].entries()) {
    const original = originals[index];
    if (!original) continue;
    const style = getComputedStyle(original);
    element.setAttribute(
      "style",
      STYLED.map((property) => `${property}:${style.getPropertyValue(property)}`).join(";"),
    );
    if (original.getAttribute("role") === "slider") element.setAttribute("visibility", "hidden");
  }
  copy.setAttribute("xmlns", "http://www.w3.org/2000/svg");
  return new XMLSerializer().serializeToString(copy);
}

function loadPicture(svg: string): Promise<HTMLImageElement> {
  return new Promise((resolve, reject) => {
    const picture = new Image();
    picture.onload = () => resolve(picture);
    picture.onerror = () => reject(new Error("The picture could not be drawn."));
    picture.src = `data:image/svg+xml;charset=utf-8,${encodeURIComponent(svg)}`;
  });
}
