/** Fuzzy search in the handbook over the API, best first. */
import type { KnownMaterial } from "./finder.ts";

interface MaterialsAnswer {
  readonly items: readonly (KnownMaterial & { readonly tags: readonly string[] })[];
}

export async function searchMaterials(
  query: string,
  limit: number,
  signal?: AbortSignal,
): Promise<MaterialsAnswer["items"]> {
  const search = new URLSearchParams({ query: query.slice(0, 64), limit: String(limit) });
  const response = await fetch(`/api/v1/materials?${search}`, signal ? { signal } : {});
  if (!response.ok) throw new Error(`The handbook did not answer (${response.status}).`);
  return ((await response.json()) as MaterialsAnswer).items;
}
