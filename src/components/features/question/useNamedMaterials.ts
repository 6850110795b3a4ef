/** Kept materials behind the words of a question. */
import { useQueries, type UseQueryResult } from "@tanstack/react-query";
import { useMemo } from "react";
import { type KnownMaterial, materialFinder } from "#src/lib/lookup/finder.ts";
import { searchMaterials } from "#src/lib/lookup/search.client.ts";

/** Asks the handbook once for each of the words that is not known here yet. */
export function useNamedMaterials(given: readonly string[], known: readonly KnownMaterial[]) {
  const key = given.join("\n");
  const words = useMemo(() => {
    const finder = materialFinder(known);
    return [...new Set(key.split("\n").map((word) => word.trim()))].filter(
      (word) => word.length >= 2 && word.length <= 64 && !finder.find(word),
    );
  }, [key, known]);
  const answers = useQueries({
    queries: words.map((word) => ({
      queryKey: ["materials", word],
      queryFn: ({ signal }: { signal: AbortSignal }) => searchMaterials(word, 8, signal),
      staleTime: Infinity,
    })),
    combine: foundMaterials,
  });
  const near = useMemo(
    () => new Map(words.map((word, index) => [word, answers.lists[index] ?? []])),
    [words, answers.lists],
  );
  return { ...answers, near };
}

// Kept outside the hook: react-query gives the same object back while the results are the same.
function foundMaterials(results: UseQueryResult<readonly KnownMaterial[]>[]) {
  return {
    lists: results.map((result) => result.data ?? []),
    found: results.flatMap((result) => result.data ?? []),
    pending: results.some((result) => result.isPending),
    trouble: results.some((result) => result.isError) ? "The handbook cannot be reached. Formulas still work." : null,
  };
}
