import { queryOptions } from "@tanstack/react-query";
import type { Acknowledged } from "@/lib/data/sheets/read";
import { readJson } from "./read-json";

/** Who has acknowledged an issue, read again while one looks. */
export function acknowledgementsQuery(productionId: string, issueId: string) {
  return queryOptions({
    queryKey: ["acknowledgements", issueId],
    queryFn: () =>
      readJson<Acknowledged[]>(
        `/api/productions/${productionId}/call-sheets/${issueId}/acknowledgements`,
      ),
    refetchInterval: 15_000,
  });
}
