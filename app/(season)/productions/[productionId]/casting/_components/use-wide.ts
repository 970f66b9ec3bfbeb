import { useSyncExternalStore } from "react";

// From here on a column stands beside the grid.
const WIDE = "(min-width: 64rem)";

function watch(changed: () => void): () => void {
  const query = window.matchMedia(WIDE);
  query.addEventListener("change", changed);
  return () => query.removeEventListener("change", changed);
}

/** Whether there is room for a column beside the grid; taken to be so on the server. */
export function useWide(): boolean {
  return useSyncExternalStore(
    watch,
    () => window.matchMedia(WIDE).matches,
    () => true,
  );
}
