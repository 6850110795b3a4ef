/** Keeps the page's address in step with its question, so that it can be copied at any time. */
import { useEffect, useRef } from "react";

// Browsers slow pages down that write the address on every pointer move.
const DELAY_MS = 250;

/** @param query the question as a query, or null where no address can hold it; the one that was served is not written again */
export function useAddress(query: string | null): void {
  const written = useRef(query);
  useEffect(() => {
    if (query === null || query === written.current) return;
    const timer = setTimeout(() => {
      written.current = query;
      const address = new URL(location.href);
      address.search = query;
      history.replaceState(history.state, "", address);
    }, DELAY_MS);
    return () => clearTimeout(timer);
  }, [query]);
}
