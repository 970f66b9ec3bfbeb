import { EVERY_PERSON, EVERY_VIEWER } from "./demo-season";
import type { Person, Places, Viewer } from "./demo-season";

/** One page of the product, on one place of the demo season. */
export type PageRow = {
  /** The folder under `app/` whose `page.tsx` this is. */
  file: string;
  /** Tells rows of the same page apart. */
  of?: string;
  path: (places: Places) => string;
  may: readonly Viewer[];
  /** Who is led on instead, and where to. */
  leadsOn?: Partial<Record<Viewer, (places: Places) => string>>;
  /** By whose eyes it is looked at, one after another; empty where nobody ever sees it. */
  eyes: readonly Viewer[];
};

// Who may open what is written here by hand, from what each position of the demo's people is for (README.md), and not
// taken from lib/permissions: the table is the outside view that those rules are held against.
// The positions are the trade's; how far each of them sees is the product's own decision.

// At Lantern Street: The Tidewatcher and Marrow Street. Ilse is assistant of the first and nothing in the second; Cora
// is the company's admin.
const TABLE_OF_TIDEWATCHER = ["md", "assistant", "stageManager", "director"] as const;
const TABLE_OF_MARROW = ["md", "stageManager", "director"] as const;
const SINGS_OR_PLAYS_IN_MARROW = ["hanne", "osric", "wren", "teo"] as const;
// At the conservatory: A Fair at Candlemas, with Ilse as stage manager. Bram, Cora, Hanne, Teo and Imke are nobody there.
const TABLE_OF_CANDLEMAS = ["md", "assistant", "director"] as const;

const each = (people: readonly Person[], to: string) =>
  Object.fromEntries(people.map((person) => [person, () => to]));

const SEASON = "(season)";
const COMPANY = `${SEASON}/companies/[companyId]`;
const PRODUCTION = `${SEASON}/productions/[productionId]`;

/** Every page of the product. */
export const PAGES: readonly PageRow[] = [
  // Open to all.
  { file: "(public)", path: () => "/", may: EVERY_VIEWER, eyes: ["nobody", "md"] },
  {
    file: "(public)/sign-in",
    path: () => "/sign-in",
    may: ["nobody"],
    leadsOn: each(EVERY_PERSON, "/sign-in/done"),
    eyes: ["nobody"],
  },
  {
    file: "(public)/sign-in/sent",
    path: () => "/sign-in/sent",
    may: EVERY_VIEWER,
    eyes: ["nobody"],
  },
  {
    file: "(public)/sign-in/link",
    path: ({ signInLink }) => signInLink,
    may: EVERY_VIEWER,
    eyes: ["nobody"],
  },
  {
    file: "(public)/sign-in/done",
    path: () => "/sign-in/done",
    may: [],
    leadsOn: {
      ...each(["md", "assistant", "stageManager", "director", "admin"], "/season"),
      ...each(["hanne", "osric", "wren", "teo", "imke"], "/me"),
      nobody: () => "/sign-in?to=%2Fsign-in%2Fdone",
    },
    eyes: [],
  },
  {
    file: "(public)/invitation/[token]",
    path: ({ invitation }) => `/invitation/${invitation}`,
    may: EVERY_VIEWER,
    eyes: ["nobody"],
  },
  {
    file: "(room)/door/[token]",
    path: ({ doorPath }) => doorPath,
    may: EVERY_VIEWER,
    eyes: ["nobody"],
  },
  { file: "mailbox", path: () => "/mailbox", may: EVERY_VIEWER, eyes: ["nobody"] },
  {
    file: "mailbox/[messageId]",
    path: ({ message }) => `/mailbox/${message}`,
    may: EVERY_VIEWER,
    eyes: ["nobody"],
  },

  // Everyone's own.
  {
    file: "(me)/me/(home)",
    path: () => "/me",
    may: EVERY_PERSON,
    // A callback to answer, calls this week, somebody else's singers to play for.
    eyes: ["wren", "teo", "hanne"],
  },
  { file: "(me)/me/conflicts", path: () => "/me/conflicts", may: EVERY_PERSON, eyes: ["teo"] },
  { file: "(me)/me/range", path: () => "/me/range", may: EVERY_PERSON, eyes: ["wren"] },
  { file: "(me)/me/sessions", path: () => "/me/sessions", may: EVERY_PERSON, eyes: ["osric"] },
  {
    file: "(me)/me/call-sheets/[issueId]",
    path: ({ issue }) => `/me/call-sheets/${issue}`,
    // Those the sheet of that day is about: who leads the call, plays it and sings in it.
    may: ["md", "osric", "wren", "teo"],
    eyes: ["teo"],
  },
  { file: "(me)/account", path: () => "/account", may: EVERY_PERSON, eyes: ["md"] },

  // The season and its companies.
  // Imke has none: the page says so, and what to do.
  { file: `${SEASON}/season`, path: () => "/season", may: EVERY_PERSON, eyes: ["md", "imke"] },
  { file: `${SEASON}/companies/(all)`, path: () => "/companies", may: EVERY_PERSON, eyes: ["md"] },
  {
    file: `${SEASON}/companies/(all)/new`,
    path: () => "/companies/new",
    may: EVERY_PERSON,
    eyes: ["imke"],
  },
  {
    file: `${COMPANY}/(overview)`,
    path: ({ company }) => `/companies/${company}`,
    may: [...TABLE_OF_TIDEWATCHER, "admin"],
    eyes: ["admin"],
  },
  {
    file: `${COMPANY}/people`,
    path: ({ company }) => `/companies/${company}/people`,
    may: ["admin"],
    eyes: ["admin"],
  },
  {
    file: `${COMPANY}/rooms`,
    path: ({ company }) => `/companies/${company}/rooms`,
    may: ["md", "stageManager", "admin"],
    eyes: ["admin"],
  },
  {
    file: `${COMPANY}/trail`,
    path: ({ company }) => `/companies/${company}/trail`,
    may: ["md", "assistant", "stageManager", "admin"],
    eyes: ["admin"],
  },
  {
    file: `${SEASON}/productions/new`,
    path: () => "/productions/new",
    may: EVERY_PERSON,
    eyes: ["md"],
  },

  // A production.
  {
    file: `${PRODUCTION}/(overview)`,
    path: ({ marrow }) => `/productions/${marrow}`,
    may: [...TABLE_OF_MARROW, "admin"],
    leadsOn: each(SINGS_OR_PLAYS_IN_MARROW, "/me"),
    eyes: ["md"],
  },
  {
    file: `${PRODUCTION}/people`,
    path: ({ tidewatcher }) => `/productions/${tidewatcher}/people`,
    may: [...TABLE_OF_TIDEWATCHER, "admin"],
    eyes: ["md"],
  },
  {
    file: `${PRODUCTION}/score/(matrix)`,
    path: ({ tidewatcher }) => `/productions/${tidewatcher}/score`,
    may: [...TABLE_OF_TIDEWATCHER, "admin"],
    eyes: ["assistant"],
  },
  {
    file: `${PRODUCTION}/score/(matrix)`,
    of: "the second company",
    path: ({ candlemas }) => `/productions/${candlemas}/score`,
    may: TABLE_OF_CANDLEMAS,
    eyes: ["md"],
  },
  {
    file: `${PRODUCTION}/score/read/[scoreId]`,
    path: ({ marrow, score }) => `/productions/${marrow}/score/read/${score}`,
    may: ["md"],
    eyes: ["md"],
  },
  {
    file: `${PRODUCTION}/auditions/(list)`,
    path: ({ tidewatcher }) => `/productions/${tidewatcher}/auditions`,
    may: TABLE_OF_TIDEWATCHER,
    eyes: ["md"],
  },
  {
    file: `${PRODUCTION}/auditions/new`,
    path: ({ tidewatcher }) => `/productions/${tidewatcher}/auditions/new`,
    may: ["md", "assistant", "stageManager"],
    eyes: ["md"],
  },
  {
    file: `${PRODUCTION}/auditions/import`,
    path: ({ tidewatcher }) => `/productions/${tidewatcher}/auditions/import`,
    may: ["md", "assistant", "stageManager"],
    eyes: ["stageManager"],
  },
  {
    file: `${PRODUCTION}/auditions/[dayId]/(day)`,
    path: ({ tidewatcher, auditionDay }) => `/productions/${tidewatcher}/auditions/${auditionDay}`,
    may: TABLE_OF_TIDEWATCHER,
    eyes: ["md"],
  },
  {
    file: `${PRODUCTION}/auditions/[dayId]/change`,
    path: ({ tidewatcher, auditionDay }) =>
      `/productions/${tidewatcher}/auditions/${auditionDay}/change`,
    may: ["md", "assistant", "stageManager"],
    eyes: ["md"],
  },
  {
    file: `${PRODUCTION}/auditions/[dayId]/running-order`,
    path: ({ tidewatcher, auditionDay }) =>
      `/productions/${tidewatcher}/auditions/${auditionDay}/running-order`,
    may: TABLE_OF_TIDEWATCHER,
    eyes: ["stageManager"],
  },
  {
    file: `${PRODUCTION}/callbacks`,
    path: ({ tidewatcher }) => `/productions/${tidewatcher}/callbacks`,
    may: TABLE_OF_TIDEWATCHER,
    eyes: ["director"],
  },
  {
    file: `${PRODUCTION}/casting`,
    of: "before the list is out",
    path: ({ candlemas }) => `/productions/${candlemas}/casting`,
    // The stage manager (Ilse, here) sees the cast once it is out.
    may: ["md", "director"],
    eyes: ["md"],
  },
  {
    file: `${PRODUCTION}/casting`,
    of: "once the list is out",
    path: ({ marrow }) => `/productions/${marrow}/casting`,
    may: TABLE_OF_MARROW,
    eyes: ["stageManager"],
  },
  {
    file: `${PRODUCTION}/rehearsals/(list)`,
    path: ({ marrow }) => `/productions/${marrow}/rehearsals`,
    may: [...TABLE_OF_MARROW, "admin"],
    eyes: ["md"],
  },
  {
    file: `${PRODUCTION}/rehearsals/new`,
    path: ({ marrow }) => `/productions/${marrow}/rehearsals/new`,
    may: ["md", "stageManager"],
    eyes: ["md"],
  },
  {
    file: `${PRODUCTION}/rehearsals/[callId]`,
    path: ({ marrow, call }) => `/productions/${marrow}/rehearsals/${call}`,
    may: [...TABLE_OF_MARROW, "admin"],
    eyes: ["md"],
  },
  {
    file: `${PRODUCTION}/rehearsals/[callId]/change`,
    path: ({ marrow, call }) => `/productions/${marrow}/rehearsals/${call}/change`,
    may: ["md", "stageManager"],
    eyes: ["stageManager"],
  },
  {
    file: `${PRODUCTION}/pianists/(list)`,
    path: ({ marrow }) => `/productions/${marrow}/pianists`,
    may: ["md", "stageManager", "admin"],
    eyes: ["md"],
  },
  {
    file: `${PRODUCTION}/call-sheets/(list)`,
    path: ({ marrow }) => `/productions/${marrow}/call-sheets`,
    may: [...TABLE_OF_MARROW, "admin"],
    eyes: ["stageManager"],
  },
  {
    file: `${PRODUCTION}/call-sheets/[localDate]`,
    path: ({ marrow, callDay }) => `/productions/${marrow}/call-sheets/${callDay}`,
    may: [...TABLE_OF_MARROW, "admin"],
    eyes: ["stageManager"],
  },
  {
    file: `${PRODUCTION}/call-sheets/issues/[issueId]`,
    path: ({ marrow, issue }) => `/productions/${marrow}/call-sheets/issues/${issue}`,
    may: [...TABLE_OF_MARROW, "admin"],
    eyes: ["stageManager"],
  },
];
