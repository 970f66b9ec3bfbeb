import { databaseAnswers } from "@/lib/data/health";

/** Ready to serve: the database answers. 503 when it does not. */
export async function GET(): Promise<Response> {
  const ready = await databaseAnswers();
  return Response.json(
    { status: ready ? "ready" : "no database" },
    { status: ready ? 200 : 503, headers: { "cache-control": "no-store" } },
  );
}
