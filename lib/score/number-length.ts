const WRITTEN = /^(\d{1,2})(?::([0-5]\d))?$/;

/** Reads a length as people type it: "3:20", or "4" for four minutes. Out: seconds; null for anything else, also for nothing at all. */
export function parseLength(text: string): number | null {
  const match = WRITTEN.exec(text.trim());
  if (!match) return null;
  const seconds = Number(match[1]) * 60 + Number(match[2] ?? 0);
  return seconds > 0 ? seconds : null;
}

/** 200 seconds → "3:20". */
export function formatLength(seconds: number): string {
  const whole = Math.round(seconds);
  return `${String(Math.floor(whole / 60))}:${String(whole % 60).padStart(2, "0")}`;
}
