import { expect } from "vitest";
import type { Page } from "playwright-core";
import { PEOPLE } from "../helpers/demo-season";
import { CALL_DATE, SINGER, TITLE } from "../helpers/job";
import type { Job, Made } from "../helpers/job";
import { makeProduction, startCompany } from "../pages/productions";
import { signInByLink, signInWithPassword } from "../pages/sign-in";

/** Everyone who asks for the addresses of the production, the owner among them as the control. */
export const ASKERS = [
  "music director",
  "stage manager",
  "director at the table",
  "accompanist",
  "singer",
  "company admin",
  "singer of another production",
  "music director elsewhere",
  "nobody",
] as const;
type Asker = (typeof ASKERS)[number];

type Address = {
  path: string;
  /** Who gets it; all others are told that there is no such page, or to sign in. */
  may: readonly Asker[];
  /** An answer for programs, or a file: read without a page around it. */
  file?: true;
};

const MUSIC: Asker[] = ["music director"];
const PLANNERS: Asker[] = [...MUSIC, "stage manager"];
const TABLE: Asker[] = [...MUSIC, "director at the table"];
const TEAM: Asker[] = [...PLANNERS, "director at the table"];
const COMPANY: Asker[] = [...TEAM, "company admin"];

/**
 * Every page and download of the main job, with who gets it. Positions as "Who uses it, and what each must be able to do"
 * has them: the stage manager runs days and calls and sees no casting before it is out; the table hears, marks and sees the
 * grid; the company's admin hears nobody and sees no casting; accompanists and actors have pages of their own and none of
 * these.
 */
function addressesOf(made: Made): Address[] {
  const { production, day, call, issue } = made;
  const api = `/api${production}`;
  const id = (address: string): string => address.split("/").at(-1) ?? "";
  const page = (path: string, may: Asker[]): Address => ({ path, may });
  const file = (path: string, may: Asker[]): Address => ({ path, may, file: true });
  return [
    page(production, COMPANY),
    page(`${production}/score`, COMPANY),
    page(made.reading, MUSIC),
    page(`${production}/auditions`, TEAM),
    page(`${production}/auditions/new`, PLANNERS),
    page(`${production}/auditions/import`, PLANNERS),
    page(day, TEAM),
    page(`${day}/change`, PLANNERS),
    page(`${day}/running-order`, TEAM),
    page(`${production}/callbacks`, TEAM),
    page(`${production}/casting`, TABLE),
    page(`${production}/rehearsals`, COMPANY),
    page(`${production}/rehearsals/new`, PLANNERS),
    page(call, COMPANY),
    page(`${call}/change`, PLANNERS),
    page(`${production}/pianists`, [...PLANNERS, "company admin"]),
    page(`${production}/call-sheets`, COMPANY),
    page(`${production}/call-sheets/${CALL_DATE}`, COMPANY),
    page(issue, COMPANY),
    page(`${production}/people`, COMPANY),
    file(`${api}/auditions/template`, PLANNERS),
    file(`${api}/auditions/${id(day)}`, TEAM),
    file(`${api}/callbacks`, TEAM),
    file(`${api}/casting`, TABLE),
    file(`${api}/calls/${id(call)}/clashes`, PLANNERS),
    file(`${api}/call-sheets/${id(issue)}?format=xlsx`, COMPANY),
    file(`${api}/call-sheets/${id(issue)}?format=csv`, COMPANY),
    file(`${api}/call-sheets/${id(issue)}/acknowledgements`, PLANNERS),
  ];
}

/** What a refusal must not name: the singers, and to strangers the production itself. */
const PEOPLE_OF_IT = [SINGER.name, "Kalinda Morrow"];
const INSIDE: Asker[] = [
  "stage manager",
  "director at the table",
  "accompanist",
  "singer",
  "company admin",
];
const REFUSAL = /is not here|There is no such page/;

type Answer = {
  status: number;
  words: string;
  signIn: boolean;
  /** Whether the address led to the person's own page. */
  own: boolean;
};

async function ask(page: Page, { path, file }: Address): Promise<Answer> {
  if (file) {
    const response = await page.request.get(path, { maxRedirects: 0 });
    const status = response.status();
    const words = status === 200 ? "" : await response.text();
    return { status, words, signIn: status === 401, own: false };
  }
  const response = await page.goto(path, { waitUntil: "load" });
  const heading = page.getByRole("heading", { level: 1 });
  await heading.first().waitFor();
  return {
    status: response?.status() ?? 0,
    words: await page.locator("body").innerText(),
    signIn: new URL(page.url()).pathname === "/sign-in",
    own: new URL(page.url()).pathname === "/me",
  };
}

/**
 * Asks for every address as one person, and returns in words whatever is not as it should be: refused to those who may,
 * open to those who may not, or refused in words that still give something of the production away.
 */
async function wrongAnswers(page: Page, asker: Asker, made: Made): Promise<string[]> {
  const wrong: string[] = [];
  for (const address of addressesOf(made)) {
    const { status, words, signIn, own } = await ask(page, address);
    const what = `${address.path} as ${asker}: ${String(status)}`;
    if (address.may.includes(asker)) {
      if (status !== 200 || signIn || own) wrong.push(`refused ${what}`);
      continue;
    }
    // Those who sing or play in it are led from its address to their own page, which names it.
    const inside = INSIDE.includes(asker);
    if (inside && own && address.path === made.production) continue;
    // Somebody of the production knows that there is a grid, and a program may tell them that it is not for them.
    const refused =
      asker === "nobody" ? signIn : status === 404 || (inside && address.file && status === 403);
    if (!refused) wrong.push(`not refused as it should be ${what}`);
    if (!address.file && asker !== "nobody" && !REFUSAL.test(words))
      wrong.push(`no plain refusal ${what}`);
    const given = (inside ? PEOPLE_OF_IT : [TITLE, ...PEOPLE_OF_IT]).filter((secret) =>
      words.includes(secret),
    );
    if (given.length > 0) wrong.push(`gives away ${given.join(", ")}: ${what}`);
  }
  return wrong;
}

/** Sits each of the askers down: those of the journey where they are, the others anew. */
async function enter(job: Job, asker: Asker): Promise<Page> {
  const { stage, mailbox, md, phone } = job;
  if (asker === "music director") return md;
  if (asker === "singer") return phone;
  const desk = await stage.desk(asker);
  if (asker === "stage manager") await signInWithPassword(desk, PEOPLE.stageManager);
  if (asker === "director at the table") await signInWithPassword(desk, PEOPLE.director);
  if (asker === "accompanist") await signInWithPassword(desk, PEOPLE.osric);
  if (asker === "company admin") await signInWithPassword(desk, PEOPLE.admin);
  if (asker === "singer of another production") await signInWithPassword(desk, PEOPLE.teo);
  if (asker === "music director elsewhere") {
    await signInByLink(desk, `md.${Date.now().toString(36)}@elsewhere.example`, mailbox);
    await startCompany(desk, "Quayside Players");
    await makeProduction(desk, { title: "Somebody Else’s" });
  }
  return desk;
}

/** Every page and download of the main job, asked for by one person. */
export async function askForEverything(job: Job, asker: Asker): Promise<void> {
  const page = await enter(job, asker);
  expect(await wrongAnswers(page, asker, job.made)).toEqual([]);
}

/** The singer, who is let off, has no call sheet of that day. */
export async function otherSheets({ phone, made }: Job): Promise<void> {
  const own = `/me/call-sheets/${made.issue.split("/").at(-1) ?? ""}`;
  expect((await phone.goto(own))?.status()).toBe(404);
}

export async function complaints({ stage }: Job): Promise<void> {
  expect(stage.complaints).toEqual([]);
}
