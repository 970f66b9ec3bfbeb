export type Mode = "day" | "lamp";

/** Name of the cookie that keeps a person's reading mode; it holds nothing else. */
export const MODE_COOKIE = "mode";

/** The mode a cookie value stands for; anything unknown is the day mode. */
export function readMode(value: string | undefined): Mode {
  return value === "lamp" ? "lamp" : "day";
}

/** Changes the page at once and keeps the choice for a year. Browser only. */
export function setMode(mode: Mode): void {
  document.documentElement.dataset["mode"] = mode;
  const secure = location.protocol === "https:" ? "; secure" : "";
  document.cookie = `${MODE_COOKIE}=${mode}; path=/; max-age=31536000; samesite=lax${secure}`;
}
