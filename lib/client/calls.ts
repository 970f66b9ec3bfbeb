import { queryOptions } from "@tanstack/react-query";
import type { CallClashes } from "@/lib/data/calls/read";
import { readJson } from "./read-json";

/** What a saved call clashes with, looked up again while its page is open: others plan too. */
export function callClashesQuery(productionId: string, callId: string) {
  return queryOptions({
    queryKey: ["call-clashes", callId],
    queryFn: () =>
      readJson<CallClashes>(`/api/productions/${productionId}/calls/${callId}/clashes`),
    refetchInterval: 20_000,
  });
}
