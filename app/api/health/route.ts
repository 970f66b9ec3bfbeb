/** The process is up. Asked by the start script and by whoever watches the server. */
export function GET(): Response {
  return Response.json({ status: "up" }, { headers: { "cache-control": "no-store" } });
}
