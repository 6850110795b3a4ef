/** TeX to MathML on the server, without style attributes: the looks are those of styles/parts/equation.css. */
import temml from "temml";

const rendered = new Map<string, string>();

/** MathML of a piece of TeX. `spoken` becomes its label; display pieces stand in a line of their own. */
export function mathml(tex: string, { display = false, spoken }: { display?: boolean; spoken?: string } = {}): string {
  const key = `${display}|${spoken}|${tex}`;
  const known = rendered.get(key);
  if (known !== undefined) return known;
  const bare = temml
    .renderToString(tex, { displayMode: display, throwOnError: true })
    .replace(/ (?:style|class)="[^"]*"/g, "")
    .replace(/<mspace><\/mspace>/g, "");
  const label =
    spoken === undefined ? "" : ` aria-label="${spoken.replaceAll("&", "&amp;").replaceAll('"', "&quot;")}"`;
  const markup = bare.replace(/^<math/, `<math${label}`);
  rendered.set(key, markup);
  return markup;
}
