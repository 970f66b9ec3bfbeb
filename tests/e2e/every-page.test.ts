import { once } from "node:events";
import { readdirSync } from "node:fs";
import { createServer } from "node:http";
import type { AddressInfo } from "node:net";
import path from "node:path";
import type { BrowserContext } from "playwright-core";
import { afterAll, beforeAll, describe, expect, test } from "vitest";
import {
  DemoDatabase,
  EVERY_VIEWER,
  PEOPLE,
  newestSignInMail,
  setting,
} from "./helpers/demo-season";
import type { Places, Sessions, Viewer } from "./helpers/demo-season";
import { lookAtPage } from "./helpers/look-at-page";
import { Stage } from "./helpers/stage";
import { PAGES } from "./helpers/table-of-pages";
import type { PageRow } from "./helpers/table-of-pages";
import { until } from "./helpers/until";
import { signInWithPassword } from "./pages/sign-in";
import { visit } from "./pages/visit";

const COOKIE = "authjs.session-token";
const base = setting("E2E_BASE_URL");

let database: DemoDatabase;
let stage: Stage;
/** One for all pages, so that what they share is fetched once; who is looking is a cookie in it. */
let context: BrowserContext;
let sessions: Sessions;
let places: Places;

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

/** A mail with a sign-in link; asked for at the page, unless one is in the mailbox. */
async function signInMail(): Promise<{ id: string; link: string }> {
  const there = newestSignInMail();
  if (there) return there;
  await lookAs("nobody");
  const page = await context.newPage();
  await visit(page, "/sign-in");
  await page.getByLabel("Your e-mail").fill(PEOPLE.imke);
  await page.keyboard.press("Enter");
  await page.waitForURL("**/sign-in/sent");
  await page.close();
  return until(newestSignInMail, { what: "the mail with the link" });
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
  await visit(page, `/productions/${marrow}/call-sheets/${callDay}`);
  await page.getByRole("button", { name: "Issue 1", exact: true }).click();
  const issue = await until(() => database.issueOf(marrow, callDay), { what: "the issue" });
  await page.close();
  return issue;
}

beforeAll(async () => {
  database = await DemoDatabase.open();
  stage = await Stage.open();
  context = (await stage.desk("every page")).context();
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
  await stage?.close();
  await database?.takeBack(places?.invitation ?? "");
  await database?.close();
});

/** What no page of the product may be like. */
const WRONG = `<!doctype html><title>Page</title><body style="overflow-x: hidden; margin: 0">
<h1>One</h1><h1>Two</h1><input style="outline: none"><p style="color: #aaa">pale</p>
<div style="width: 900px">wide</div><script>document.title = "Changed";</script>`;

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
      const signsIn = viewer === "nobody" && Boolean(asked) && address === asked;
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
    ([, { file, eyes }]) => /\[\w+Id\]/.test(file) && !eyes.includes("nobody"),
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
        const response = await ask(
          variant,
          inside === undefined ? (row.eyes[0] ?? "nobody") : "md",
        );
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
  const seen = rows.flatMap(([name, row]) =>
    row.eyes.map((viewer) => [`${name} as ${viewer} has it`, row, viewer] as const),
  );

  test.for(seen)("%s", async ([, row, viewer]) => {
    await lookAs(viewer);
    const url = new URL(row.path(places), base).href;
    expect(await lookAtPage(context, { url, status: 200 })).toEqual([]);
  });

  test("finds what is wrong with a page that has everything wrong", async () => {
    const server = createServer((_request, response) => {
      response.setHeader("content-security-policy", "script-src 'none'").end(WRONG);
    }).listen(0, "127.0.0.1");
    await once(server, "listening");
    const url = `http://127.0.0.1:${(server.address() as AddressInfo).port}/`;
    const found = (await lookAtPage(context, { url, status: 404 })).join("\n");
    server.close();
    for (const words of [
      "answered 200",
      "lamp mode",
      "axe (lamp mode, 1440) color-contrast",
      "axe (day mode, 390) label",
      "axe (day mode, 1440) html-has-lang",
      "Content Security Policy",
      "scrolls sideways at 360: 900 wide",
      "BODY has overflow-x: hidden",
      "2 first headings",
      'the title "Page"',
      "the first Tab does not show",
      "which skips nothing",
    ])
      expect(found).toContain(words);
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
    const page = await stage.desk("Cora Finch");
    await signInWithPassword(page, PEOPLE.admin);
    const cookies = await page.context().cookies();
    expect(cookies.find(({ name }) => name.endsWith("session-token"))).toMatchObject({
      httpOnly: true,
      sameSite: "Lax",
      path: "/",
      secure: base.startsWith("https:"),
      domain: new URL(base).hostname,
    });
    expect(await page.evaluate(() => document.cookie)).not.toContain("session");
  });
});
