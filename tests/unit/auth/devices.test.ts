import { expect, test, vi } from "vitest";

vi.mock("@/lib/data/sessions", () => ({ insertSession: vi.fn() }));
vi.mock("next/headers", () => ({ headers: vi.fn() }));
const { describeDevice } = await import("@/lib/auth/start-session");

// User-agent strings as the browsers send them (from memory).
test.each([
  ["Mozilla/5.0 (Android 15; Mobile; rv:140.0) Gecko/140.0 Firefox/140.0", "Firefox on Android"],
  [
    "Mozilla/5.0 (iPhone; CPU iPhone OS 18_5 like Mac OS X) AppleWebKit/605.1.15 (KHTML, like Gecko) Version/18.5 Mobile/15E148 Safari/604.1",
    "Safari on iOS",
  ],
  [
    "Mozilla/5.0 (Windows NT 10.0; Win64; x64) AppleWebKit/537.36 (KHTML, like Gecko) Chrome/140.0.0.0 Safari/537.36 Edg/140.0.0.0",
    "Edge on Windows",
  ],
  [
    "Mozilla/5.0 (X11; Linux x86_64) AppleWebKit/537.36 (KHTML, like Gecko) Chrome/140.0.0.0 Safari/537.36",
    "Chrome on Linux",
  ],
  ["", "An unknown device"],
])("%s", (agent, device) => {
  expect(describeDevice(agent)).toBe(device);
});
