import { readdirSync } from "node:fs";
import path from "node:path";
import { chromium } from "playwright-core";
import type { Browser, BrowserContext } from "playwright-core";
import { afterAll, beforeAll, describe, expect, test, vi } from "vitest";
import {
  DemoDatabase,
  EVERY_VIEWER,
  PEOPLE,
  newestSignInMail,
  setting,
} from "./helpers/demo-season";
import type { Places, Sessions, Viewer } from "./helpers/demo-season";
import { lookAtPage } from "./helpers/look-at-page";
import { PAGES } from "./helpers/table-of-pages";
import type { PageRow } from "./helpers/table-of-pages";

const COOKIE = "authjs.session-token";
const base = setting("E2E_BASE_URL");

let database: DemoDatabase;
let browser: Browser;
/** One for all pages, so that what they share is fetched once; who is looking is a cookie in it. */
let context: BrowserContext;
let sessions: Sessions;
let places: Places;

const newContext = (): Promise<BrowserContext> =>
  browser.newContext({ baseURL: base, reducedMotion: "reduce", locale: "en-GB" });

/** From here on the browser is this person's. */
async function lookAs(viewer: Viewer): Promise<void> {
  await context.clearCookies();
  const secret = sessions[viewer];
  if (secret !== null) await context.addCookies([{ name: COOKIE, value: secret, url: base }]);
}

/** Asks for a page as this person, following nothing. */
function ask(address: string, viewer: Viewer): Promise<Response> {
  const secret = sessions[viewer];
  return fetch(new URL(address, base), {
    redirect: "manual",
    headers: secret === null ? {} : { cookie: `${COOKIE}=${secret}` },
  });
}

/** Where an answer leads on to, as a path; null when it does not. */
function leadsTo(response: Response): string | null {
  const location = response.headers.get("location");
  if (location === null || response.status < 300 || response.status > 399) return null;
  const { pathname, search } = new URL(location, base);
  return pathname + search;
}

/** Waits for what arrives a moment after the page has answered. */
const arrival = <T>(look: () => T | Promise<T | null> | null): Promise<T> =>
  vi.waitFor(
    async () => {
      const found = await look();
      if (found === null) throw new Error("It has not arrived.");
      return found;
    },
    { timeout: 30_000, interval: 250 },
  );

/** A mail with a sign-in link; asked for at the page, unless one is in the mailbox. */
async function signInMail(): Promise<{ id: string; link: string }> {
  const there = newestSignInMail();
  if (there) return there;
  await lookAs("nobody");
  const page = await context.newPage();
  await page.goto("/sign-in", { waitUntil: "networkidle" });
  await page.getByLabel("Your e-mail").fill(PEOPLE.imke);
  await page.keyboard.press("Enter");
  await page.waitForURL("**/sign-in/sent");
  await page.close();
  return arrival(newestSignInMail);
}

/** The call sheet of the day, sent by the stage manager at its page unless it has gone out before. */
async function issueSheet({
  marrow,
  callDay,
}: Pick<Places, "marrow" | "callDay">): Promise<string> {
  const before = await database.issueOf(marrow, callDay);
  if (before !== null) return before;
  await lookAs("stageManager");
  const page = await context.newPage();
  await page.goto(`/productions/${marrow}/call-sheets/${callDay}`, { waitUntil: "networkidle" });
  await page.getByRole("button", { name: "Issue 1", exact: true }).click();
  const issue = await arrival(() => database.issueOf(marrow, callDay));
  await page.close();
  return issue;
}

beforeAll(async () => {
  database = await DemoDatabase.open();
  browser = await chromium.launch({
    executablePath: setting("E2E_CHROMIUM"),
    args: ["--no-sandbox", "--disable-gpu"],
  });
  context = await newContext();
  sessions = await database.signInEveryone();
  const found = await database.findPlaces();
  const mail = await signInMail();
  places = {
    ...found,
    invitation: await database.invite(),
    signInLink: mail.link,
    message: mail.id,
    issue: await issueSheet(found),
  };
});

afterAll(async () => {
  await browser?.close();
  await database?.signEveryoneOut();
  await database?.close();
});

const nameOf = ({ file, of }: PageRow): string => (of === undefined ? file : `${file} (${of})`);
const rows = PAGES.map((row) => [nameOf(row), row] as const);

test("the table holds every page of the product, and none that is gone", () => {
  const app = path.join(import.meta.dirname, "../../app");
  const pages = readdirSync(app, { recursive: true, encoding: "utf8" })
    .filter((file) => path.basename(file) === "page.tsx")
    .map((file) => path.dirname(file).split(path.sep).join("/"));
  expect(pages.length).toBeGreaterThan(30);
  expect([...new Set(PAGES.map(({ file }) => file))].toSorted()).toEqual(pages.toSorted());
});

describe("who may open a page", () => {
  test.for(rows)("%s", async ([, row]) => {
    const address = row.path(places);
    const answers = await Promise.all(
      EVERY_VIEWER.map(async (viewer) => {
        const response = await ask(address, viewer);
        await response.arrayBuffer();
        return [viewer, response] as const;
      }),
    );
    const got: Partial<Record<Viewer, string>> = {};
    const wanted: Partial<Record<Viewer, string>> = {};
    for (const [viewer, response] of answers) {
      const to = leadsTo(response);
      const asked = to?.startsWith("/sign-in?") ? new URL(to, base).searchParams.get("to") : null;
      const on = row.leadsOn?.[viewer]?.(places);
      // Sent to sign in, and from there to this page or the one above it.
      const signsIn = viewer === "nobody" && Boolean(asked) && address.startsWith(String(asked));
      got[viewer] =
        on === undefined && signsIn
          ? "sign in first"
          : to === null
            ? String(response.status)
            : `on to ${to}`;
      wanted[viewer] =
        on !== undefined
          ? `on to ${on}`
          : row.may.includes(viewer)
            ? "200"
            : viewer === "nobody"
              ? "sign in first"
              : "404";
    }
    expect(got).toEqual(wanted);
  });
});

describe("what is not there answers 404, to those who might have it too", () => {
  const UUID = /[0-9a-f]{8}(?:-[0-9a-f]{4}){3}-[0-9a-f]{12}/g;
  const withIds = rows.filter(
    ([, { file, eyes }]) => eyes !== null && eyes !== "nobody" && /\[\w+Id\]/.test(file),
  );

  test.for(withIds)("%s", async ([, row]) => {
    const address = row.path(places);
    const ids = address.match(UUID) ?? [];
    expect(ids.length).toBeGreaterThan(0);
    const variants = ids.flatMap((id) => [
      address.replace(id, "00000000-0000-7000-8000-000000000000"),
      address.replace(id, "no-such-thing"),
    ]);
    // What belongs to one production is not found under another, though the reader may see both.
    const [production, inside] = ids;
    if (inside !== undefined && production !== undefined)
      variants.push(address.replace(production, places.candlemas));
    const statuses = await Promise.all(
      variants.map(async (variant) => {
        // The music director works in every production of the demo.
        const response = await ask(variant, inside === undefined ? (row.eyes ?? "nobody") : "md");
        return [variant, response.status];
      }),
    );
    expect(statuses).toEqual(variants.map((variant) => [variant, 404]));
  });

  test.for([
    "/no-such-page",
    "/door/no-such-link",
    "/invitation/no-such-invitation",
    "/mailbox/no-such-message",
    "/mailbox/..%2F..%2Fpackage",
  ])("%s", async (address) => {
    expect((await ask(address, "nobody")).status).toBe(404);
  });
});

// WCAG 2.2, levels A and AA: https://www.w3.org/TR/WCAG22/ as far as axe-core checks it by itself.
describe("how a page looks, in both modes, wide and narrow", () => {
  const seen = rows.filter(([, { eyes }]) => eyes !== null);

  test.for(seen)("%s", async ([, row]) => {
    await lookAs(row.eyes ?? "nobody");
    const url = new URL(row.path(places), base).href;
    expect(await lookAtPage(context, { url, status: 200 })).toEqual([]);
  });

  const refused: { what: string; path: (from: Places) => string; eyes: Viewer }[] = [
    { what: "a page that is not there", path: () => "/no-such-page", eyes: "nobody" },
    { what: "a link that is not there", path: () => "/door/no-such-link", eyes: "nobody" },
    { what: "an invitation that is not there", path: () => "/invitation/none", eyes: "nobody" },
    { what: "a message that is not there", path: () => "/mailbox/none", eyes: "nobody" },
    {
      what: "a sheet not about them",
      path: ({ issue }) => `/me/call-sheets/${issue}`,
      eyes: "imke",
    },
    {
      what: "a production not theirs",
      path: ({ candlemas }) => `/productions/${candlemas}`,
      eyes: "admin",
    },
    {
      what: "a call that is not there",
      path: ({ marrow }) => `/productions/${marrow}/rehearsals/none`,
      eyes: "md",
    },
    {
      what: "a part of a company not theirs",
      path: ({ company }) => `/companies/${company}/people`,
      eyes: "director",
    },
  ];

  test.for(refused)("$what", async ({ path: address, eyes }) => {
    await lookAs(eyes);
    const url = new URL(address(places), base).href;
    expect(await lookAtPage(context, { url, status: 404 })).toEqual([]);
  });
});

// OWASP HTTP Headers Cheat Sheet and Session Management Cheat Sheet; CSP Level 3 (W3C) for the policy's words.
describe("what goes along with a page", () => {
  const subjects: { name: string; path: (from: Places) => string; viewer: Viewer }[] = [
    { name: "the front page", path: () => "/", viewer: "nobody" },
    { name: "the sign-in page", path: () => "/sign-in", viewer: "nobody" },
    { name: "the season", path: () => "/season", viewer: "md" },
    { name: "the door", path: ({ doorPath }) => doorPath, viewer: "nobody" },
    { name: "a page that is not there", path: () => "/no-such-page", viewer: "nobody" },
  ];

  test.for(subjects)(
    "$name: a policy with a nonce of its own, and the usual headers",
    async (row) => {
      const [first, second] = [
        await ask(row.path(places), row.viewer),
        await ask(row.path(places), row.viewer),
      ];
      const html = await first.text();
      await second.arrayBuffer();
      const policy = new Map(
        (first.headers.get("content-security-policy") ?? "").split(/;\s*/).map((directive) => {
          const [name = "", ...sources] = directive.split(" ");
          return [name, sources];
        }),
      );
      const nonceOf = (response: Response) =>
        /'nonce-([\w+/=-]{20,})'/.exec(response.headers.get("content-security-policy") ?? "")?.[1];
      const nonce = nonceOf(first);
      expect(nonce).toBeDefined();
      expect(nonceOf(second)).not.toBe(nonce);

      // The development server refreshes by eval and over a socket; what is built has neither.
      const development = html.includes("hmr-client");
      expect(policy.get("script-src")).toEqual([
        "'self'",
        `'nonce-${String(nonce)}'`,
        "'strict-dynamic'",
        ...(development ? ["'unsafe-eval'"] : []),
      ]);
      expect(policy.get("connect-src")).toEqual(["'self'", ...(development ? ["ws:"] : [])]);
      expect(policy.get("default-src")).toEqual(["'self'"]);
      expect(policy.get("object-src")).toEqual(["'none'"]);
      expect(policy.get("base-uri")).toEqual(["'none'"]);
      expect(policy.get("form-action")).toEqual(["'self'"]);
      expect(policy.get("frame-ancestors")).toEqual(["'none'"]);

      const scripts = html.match(/<script\b[^>]*>/g) ?? [];
      expect(scripts.length).toBeGreaterThan(0);
      expect(scripts.filter((script) => !script.includes(`nonce="${String(nonce)}"`))).toEqual([]);

      expect(first.headers.get("x-content-type-options")).toBe("nosniff");
      expect(first.headers.get("x-frame-options")).toBe("DENY");
      expect(first.headers.get("referrer-policy")).toMatch(
        /^(strict-origin-when-cross-origin|no-referrer)$/,
      );
      for (const feature of ["camera", "microphone", "geolocation", "payment", "usb"])
        expect(first.headers.get("permissions-policy")).toContain(`${feature}=()`);
      expect(first.headers.get("cross-origin-opener-policy")).toBe("same-origin");
      expect(first.headers.get("cache-control")).toMatch(/no-store/);
      expect(first.headers.get("x-powered-by")).toBeNull();
    },
  );

  test("signing in gives a cookie that no script reads and no other site sends along", async () => {
    const own = await newContext();
    try {
      const page = await own.newPage();
      await page.goto("/sign-in", { waitUntil: "networkidle" });
      await page.getByText("I have a password").click();
      await page.getByLabel("E-mail", { exact: true }).fill(PEOPLE.admin);
      await page.getByLabel("Password", { exact: true }).fill(setting("E2E_DEMO_PASSWORD"));
      await page.getByRole("button", { name: "Sign in", exact: true }).click();
      await page.waitForURL("**/season");
      const cookies = await own.cookies();
      expect(cookies.find(({ name }) => name.endsWith("session-token"))).toMatchObject({
        httpOnly: true,
        sameSite: "Lax",
        path: "/",
        secure: base.startsWith("https:"),
        domain: new URL(base).hostname,
      });
      expect(await page.evaluate(() => document.cookie)).not.toContain("session");
    } finally {
      await own.close();
    }
  });
});
