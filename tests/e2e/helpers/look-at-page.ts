import { AxeBuilder } from "@axe-core/playwright";
import type { BrowserContext, Page } from "playwright-core";

/** WCAG 2.0, 2.1 and 2.2, levels A and AA, by axe's names for them (axe-core 4.x, doc/API.md, "axe-core tags"). */
const WCAG = ["wcag2a", "wcag2aa", "wcag21a", "wcag21aa", "wcag22aa"];
/** The overlay that the development server adds; it is not part of the product, and goes before anything is looked at. */
const NOT_OURS = "nextjs-portal";

const DESK = { width: 1440, height: 900 };
const PHONE = { width: 390, height: 844 };
const NARROW = { width: 360, height: 780 };

/** What a page is expected to be. */
export type Expected = {
  url: string;
  /** 200 for all but the page that says there is no such page. */
  status: number;
};

/**
 * Opens a page as a person would, in both modes and at three widths, and returns in words everything that is wrong with
 * it: none when it is as it should be.
 */
export async function lookAtPage(context: BrowserContext, expected: Expected): Promise<string[]> {
  const page = await context.newPage();
  const wrong: string[] = [];
  try {
    const noise = listen(page, expected);
    await setMode(context, expected.url, "lamp");
    await page.setViewportSize(DESK);
    wrong.push(...(await open(page, expected, "lamp")));
    wrong.push(...(await axe(page, "lamp mode, 1440")));

    await setMode(context, expected.url, "day");
    await page.setViewportSize(PHONE);
    wrong.push(...(await open(page, expected, "day")));
    wrong.push(...(await axe(page, "day mode, 390")));
    await page.setViewportSize(NARROW);
    wrong.push(...(await sideways(page)));
    await page.setViewportSize(DESK);
    wrong.push(...(await axe(page, "day mode, 1440")));
    wrong.push(...(await headed(page)));
    wrong.push(...(await byKeyboard(page)));
    wrong.push(...noise);
  } finally {
    await page.close();
  }
  return [...new Set(wrong)];
}

/** Errors the browser tells of while the page is open: the list grows by itself. */
function listen(page: Page, { url, status }: Expected): string[] {
  const noise: string[] = [];
  page.on("console", (message) => {
    const { url: source } = message.location();
    // The browser reports the answer of a page that is not there as an error; that answer is what was asked for.
    const itself = status !== 200 && source === url && message.text().includes(String(status));
    if (message.type() === "error" && !itself) noise.push(`console: ${message.text()} (${source})`);
  });
  page.on("pageerror", (error) => noise.push(`script error: ${error.message}`));
  return noise;
}

async function setMode(context: BrowserContext, url: string, mode: "day" | "lamp"): Promise<void> {
  await context.addCookies([{ name: "mode", value: mode, url: new URL("/", url).href }]);
}

async function open(page: Page, { url, status }: Expected, mode: string): Promise<string[]> {
  const response = await page.goto(url, { waitUntil: "load" });
  await page.waitForFunction(() => document.querySelector('main [aria-busy="true"]') === null);
  await page.locator(NOT_OURS).evaluateAll((overlays) => overlays.forEach((one) => one.remove()));
  const wrong: string[] = [];
  if (response?.status() !== status) wrong.push(`answered ${String(response?.status())}`);
  if (page.url() !== url) wrong.push(`led on to ${page.url()}`);
  const shown = await page.evaluate(() => document.documentElement.dataset["mode"]);
  if (shown !== mode) wrong.push(`is in ${String(shown)} mode when asked for ${mode} mode`);
  return wrong;
}

async function axe(page: Page, where: string): Promise<string[]> {
  // Without frames of other origins the older way finds the same, and needs no second page for it.
  const { violations, passes } = await new AxeBuilder({ page })
    .setLegacyMode(true)
    .options({ resultTypes: ["violations"] })
    .withTags(WCAG)
    .analyze();
  if (passes.length === 0) return [`axe (${where}) had nothing to look at`];
  return violations.map(({ id, help, nodes }) => {
    const first = nodes
      .slice(0, 3)
      .map(
        (node) =>
          `${node.target.join(" ")}: ${String(node.failureSummary?.split("\n")[1]?.trim())}`,
      );
    return `axe (${where}) ${id}: ${help}. ${nodes.length} times: ${first.join(" | ")}`;
  });
}

/** At 360 px nothing may stick out. What hides the sticking out would hide it from this check too, and from people. */
async function sideways(page: Page): Promise<string[]> {
  return page.evaluate(() => {
    const wrong: string[] = [];
    for (const element of [document.documentElement, document.body]) {
      const { overflowX } = getComputedStyle(element);
      if (overflowX !== "visible") wrong.push(`${element.tagName} has overflow-x: ${overflowX}`);
    }
    const width = document.scrollingElement?.scrollWidth ?? 0;
    if (width > innerWidth) {
      const widest = [...document.querySelectorAll("body *")]
        .filter((element) => element.getBoundingClientRect().right > innerWidth + 0.5)
        .slice(-3)
        .map(
          (element) =>
            `<${element.tagName.toLowerCase()} class="${element.getAttribute("class") ?? ""}">`,
        );
      wrong.push(`scrolls sideways at ${innerWidth}: ${width} wide, by ${widest.join(", ")}`);
    }
    return wrong;
  });
}

async function headed(page: Page): Promise<string[]> {
  const wrong: string[] = [];
  const headings = await page.locator("h1").allInnerTexts();
  if (headings.length !== 1)
    wrong.push(`has ${headings.length} first headings: ${headings.join(" / ")}`);
  else if (headings[0]?.trim() === "") wrong.push("has an empty first heading");
  const title = await page.title();
  if (!/^\S.* · Cembalo$|^Cembalo: \S/.test(title)) wrong.push(`has the title "${title}"`);
  return wrong;
}

type Focus = { what: string; skip: boolean; inMain: boolean; isMain: boolean; seen: boolean };

const focus = (page: Page): Promise<Focus | null> =>
  page.evaluate(() => {
    const element = document.activeElement;
    if (!element || element === document.body) return null;
    const box = element.getBoundingClientRect();
    const style = getComputedStyle(element);
    const outlined = style.outlineStyle !== "none" && parseFloat(style.outlineWidth) >= 2;
    const inView =
      box.width > 1 &&
      box.height > 1 &&
      box.bottom > 0 &&
      box.right > 0 &&
      box.top < innerHeight &&
      box.left < innerWidth;
    return {
      what: `<${element.tagName.toLowerCase()}> "${(element.textContent || element.getAttribute("aria-label") || "").trim().slice(0, 40)}"`,
      skip: element.getAttribute("href") === "#content",
      inMain: element.closest("main") !== null,
      isMain: element.id === "content",
      seen: inView && element.matches(":focus-visible") && (outlined || style.boxShadow !== "none"),
    };
  });

/**
 * The first Tab shows where it is: on the link that skips the header (which must then do so), or in the content itself
 * where there is no header to skip. WCAG 2.2: 2.4.1 Bypass Blocks, 2.4.7 Focus Visible.
 */
async function byKeyboard(page: Page): Promise<string[]> {
  const wrong: string[] = [];
  const press = async (key: string): Promise<Focus | null> => {
    await page.keyboard.press(key);
    return focus(page);
  };
  const first = await press("Tab");
  if (!first) {
    const stops = await page.locator("a[href], button, input, select, textarea, summary").count();
    return stops === 0 ? [] : ["the first Tab leads nowhere"];
  }
  if (!first.seen) wrong.push(`the first Tab does not show on ${first.what}`);
  if (first.inMain) return wrong;
  if (!first.skip) return [...wrong, `the first Tab is on ${first.what}, which skips nothing`];
  const main = await press("Enter");
  if (main?.isMain !== true) return [...wrong, `the skip link leads to ${main?.what ?? "nowhere"}`];
  const next = await press("Tab");
  if (next?.inMain && !next.seen) wrong.push(`focus does not show on ${next.what}`);
  return wrong;
}
