import { readJson } from "@/lib/auth/api-body";
import { defineApiRoute } from "@/lib/auth/define-api-route";
import { rangeFit } from "@/lib/music/range-fit";
import { rangeFitRequest } from "@/lib/schemas/api";

/** How one singer's range meets one vocal line. */
export const POST = defineApiRoute(async (request) => {
  const { singer, line } = await readJson(request, rangeFitRequest);
  const { sits: _sits, ...fit } = rangeFit(singer, line);
  return fit;
});
