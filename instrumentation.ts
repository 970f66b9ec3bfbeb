/** Runs once when the server starts: a wrong setting stops it here, and the mail worker begins. */
export async function register(): Promise<void> {
  if (process.env["NEXT_RUNTIME"] !== "nodejs") return;
  const { env } = await import("@/lib/env");
  env();
  const { startWorker } = await import("@/lib/data/worker");
  startWorker();
}
