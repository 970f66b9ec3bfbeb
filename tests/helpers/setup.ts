import { beforeEach, vi } from "vitest";

// The session is the one thing a test stands in for: who asks is set with `as(userId)`; the actor's positions, the
// permissions and the queries are the real ones on a real database.
const asking = vi.hoisted(() => ({ userId: null as string | null }));
vi.mock("@/lib/auth/current-user", () => ({ currentUserId: () => Promise.resolve(asking.userId) }));
vi.mock("react", async (original) => ({
  ...(await original<typeof import("react")>()),
  cache: <T>(fn: T) => fn,
}));
vi.mock("next/cache", () => ({
  revalidatePath: vi.fn(),
  revalidateTag: vi.fn(),
  refresh: vi.fn(),
}));
const jar = vi.hoisted(() => ({ cookies: new Map<string, string>() }));
vi.mock("next/headers", () => ({
  headers: () =>
    Promise.resolve(new Headers({ "x-forwarded-for": "192.0.2.1", "user-agent": "test" })),
  cookies: () =>
    Promise.resolve({
      get: (name: string) =>
        jar.cookies.has(name) ? { name, value: jar.cookies.get(name) } : undefined,
      set: (name: string, value: string) => jar.cookies.set(name, value),
      delete: (name: string) => jar.cookies.delete(name),
    }),
}));
vi.mock("next/server", async (original) => ({
  ...(await original<typeof import("next/server")>()),
  after: (work: () => unknown) => {
    work();
  },
}));

(globalThis as Record<string, unknown>)["cembaloAsking"] = asking;
(globalThis as Record<string, unknown>)["cembaloCookies"] = jar.cookies;

beforeEach(() => {
  asking.userId = null;
  jar.cookies.clear();
});
