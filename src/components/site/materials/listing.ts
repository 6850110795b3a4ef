/** How the handbook is laid out on its page: groups by first tag, compositions in short words. Pure. */
import { formatFormula } from "#src/lib/format/formula.ts";
import { formatPercent } from "#src/lib/format/numbers.ts";
import type { ScriptPart } from "#src/lib/format/units.ts";

/** What the list needs of a material; the service's items carry more. */
export interface ListedMaterial {
  readonly id: string;
  readonly name: string;
  readonly alsoKnownAs: readonly string[];
  readonly formula: string | null;
  readonly massFractions: Readonly<Record<string, number>> | null;
  readonly densityGCm3: number;
  readonly tags: readonly string[];
}

export interface MaterialGroup<T extends ListedMaterial> {
  readonly tag: string;
  readonly items: readonly T[];
}

const UNTAGGED = "other";

/** Groups by the first tag, both groups and their materials in alphabetical order; materials without a tag come last. */
export function groupByTag<T extends ListedMaterial>(items: readonly T[]): MaterialGroup<T>[] {
  const groups = new Map<string, T[]>();
  for (const item of items) {
    const tag = item.tags[0] ?? UNTAGGED;
    groups.set(tag, [...(groups.get(tag) ?? []), item]);
  }
  return [...groups]
    .map(([tag, members]) => ({ tag, items: members.toSorted((a, b) => a.name.localeCompare(b.name, "en")) }))
    .sort((a, b) => Number(a.tag === UNTAGGED) - Number(b.tag === UNTAGGED) || a.tag.localeCompare(b.tag, "en"));
}

/** Every tag with how many materials carry it, most common first. */
export function countTags(items: readonly ListedMaterial[]): { tag: string; count: number }[] {
  const counts = new Map<string, number>();
  for (const { tags } of items) for (const tag of tags) counts.set(tag, (counts.get(tag) ?? 0) + 1);
  return [...counts]
    .map(([tag, count]) => ({ tag, count }))
    .sort((a, b) => b.count - a.count || a.tag.localeCompare(b.tag, "en"));
}

const ELEMENTS_SHOWN = 3;

/** The formula, or the largest shares by mass: `O 61 %, C 24 %, H 10 %, 5 more`. */
export function compositionParts({ formula, massFractions }: ListedMaterial): ScriptPart[] {
  if (formula !== null) return formatFormula(formula);
  const shares = Object.entries(massFractions ?? {}).sort(([, a], [, b]) => b - a);
  if (shares.length === 0) return [{ text: "no matter", script: "base" }];
  const shown = shares.slice(0, ELEMENTS_SHOWN).map(([symbol, share]) => `${symbol}\u00a0${formatPercent(share)}`);
  const left = shares.length - shown.length;
  return [{ text: [...shown, ...(left > 0 ? [`${left}\u00a0more`] : [])].join(", "), script: "base" }];
}

/** Address of the list for some words, of a kind, in full length. */
export function listHref({
  query = "",
  tag = null,
  all = false,
}: {
  query?: string;
  tag?: string | null;
  all?: boolean;
}): string {
  const asked = new URLSearchParams();
  if (query !== "") asked.set("query", query);
  if (tag !== null) asked.set("tag", tag);
  if (all) asked.set("all", "yes");
  return asked.size === 0 ? "/materials" : `/materials?${asked}`;
}

/** `#` id of a group's heading. */
export function groupId(tag: string): string {
  return `tag-${tag.toLowerCase().replace(/[^a-z0-9]+/g, "-")}`;
}

/** First letter large, for headings. */
export function heading(tag: string): string {
  return tag.charAt(0).toUpperCase() + tag.slice(1);
}

/** What a search found, in a sentence. */
export function foundText(count: number, query: string, tag: string | null): string {
  const under = tag === null ? "" : ` under “${tag}”`;
  if (query === "") return tag === null ? `${count} materials, by kind.` : `${count} ${noun(count)}${under}.`;
  if (count === 0) return `Nothing matches “${query}”${under}.`;
  return `${count} ${noun(count)} ${count === 1 ? "matches" : "match"} “${query}”${under}, best first.`;
}

function noun(count: number): string {
  return count === 1 ? "material" : "materials";
}
