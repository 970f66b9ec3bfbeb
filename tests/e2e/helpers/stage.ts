import { mkdirSync } from "node:fs";
import path from "node:path";
import { chromium } from "playwright-core";
import type { Browser, BrowserContext, BrowserContextOptions, Page } from "playwright-core";
import { setting } from "./demo-season";

/** Debian's Chromium, with nothing that calls home. */
const FLAGS = [
  "--no-sandbox",
  "--disable-gpu",
  "--disable-quic",
  "--no-first-run",
  "--disable-background-networking",
  "--disable-component-update",
  "--disable-sync",
];
const DESK = { viewport: { width: 1440, height: 900 } };
const PHONE = { viewport: { width: 390, height: 844 }, hasTouch: true, isMobile: true };
/** A development server makes each page when it is first asked for; a built one answers long before. */
const PATIENCE_MS = 60_000;

/** The people of a test, each at a browser of their own. */
export class Stage {
  private readonly browser: Browser;
  private readonly people = new Map<string, { context: BrowserContext; page: Page }>();
  /** What the browsers complained of, by person. */
  readonly complaints: string[] = [];

  private constructor(browser: Browser) {
    this.browser = browser;
  }

  static async open(): Promise<Stage> {
    const executablePath = setting("E2E_CHROMIUM");
    return new Stage(await chromium.launch({ executablePath, args: FLAGS }));
  }

  /** Somebody sits down at a desk. The clock of their machine is not the company's. */
  desk(name: string, options: BrowserContextOptions = {}): Promise<Page> {
    return this.enter(name, { ...DESK, ...options });
  }

  /** Somebody takes out their phone. */
  phone(name: string, options: BrowserContextOptions = {}): Promise<Page> {
    return this.enter(name, { ...PHONE, ...options });
  }

  private async enter(name: string, options: BrowserContextOptions): Promise<Page> {
    const context = await this.browser.newContext({
      baseURL: setting("E2E_BASE_URL"),
      locale: "en-GB",
      timezoneId: "America/New_York",
      reducedMotion: "reduce",
      ...options,
    });
    context.setDefaultTimeout(PATIENCE_MS);
    const page = await context.newPage();
    page.on("pageerror", (error) => this.complaints.push(`${name}: ${error.message}`));
    page.on("console", (message) => {
      // What was not found is the subject of tests of its own.
      if (message.type() === "error" && !message.text().startsWith("Failed to load resource"))
        this.complaints.push(`${name}: ${message.text()}`);
    });
    this.people.set(name, { context, page });
    return page;
  }

  /** A picture of what everybody sees, for whoever looks into a failure. */
  async picture(of: string): Promise<void> {
    const folder = setting("E2E_OUTPUT_DIR");
    mkdirSync(folder, { recursive: true });
    for (const [name, { page }] of this.people) {
      const file = `${of} ${name}`.toLowerCase().replaceAll(/[^a-z0-9]+/g, "-");
      await page
        .screenshot({ path: path.join(folder, `${file.slice(0, 100)}.png`) })
        .catch(() => undefined);
    }
  }

  close = (): Promise<void> => this.browser.close();
}
