import type { Actor, PositionKind, Subject } from "./types";

/**
 * Every act that is asked about, with the positions in the production (or the company) that include it.
 * "member" stands for any open position in the production; "own" for the person whose row it is.
 */
const RULES = {
  "production:create": { company: ["company_admin", "music_director"] },
  "production:see": { production: ["member"], company: ["company_admin"] },
  "production:change": { production: ["music_director", "assistant_md"] },
  "score:read": {
    production: [
      "music_director",
      "assistant_md",
      "stage_manager",
      "director",
      "choreographer",
      "producer",
    ],
    company: ["company_admin"],
  },
  "score:change": { production: ["music_director", "assistant_md"] },
  "auditions:read": {
    production: [
      "music_director",
      "assistant_md",
      "stage_manager",
      "director",
      "choreographer",
      "producer",
    ],
  },
  "auditions:plan": { production: ["music_director", "assistant_md", "stage_manager"] },
  "sign-up:change": { production: ["music_director", "assistant_md", "stage_manager"], own: true },
  "door:run": { production: ["music_director", "assistant_md", "stage_manager"] },
  "range:hear": {
    production: ["music_director", "assistant_md", "director", "choreographer", "producer"],
  },
  "callbacks:draft": {
    production: ["music_director", "assistant_md", "director", "choreographer", "producer"],
  },
  "callbacks:read": {
    production: [
      "music_director",
      "assistant_md",
      "stage_manager",
      "director",
      "choreographer",
      "producer",
    ],
  },
  "callbacks:publish": { production: ["music_director", "assistant_md"] },
  "casting:see": {
    production: ["music_director", "assistant_md", "director", "choreographer", "producer"],
    oncePublished: ["stage_manager"],
  },
  "casting:choose": { production: ["music_director", "assistant_md"] },
  "calls:read": {
    production: [
      "music_director",
      "assistant_md",
      "stage_manager",
      "director",
      "choreographer",
      "producer",
    ],
    company: ["company_admin"],
  },
  "calls:change": { production: ["music_director", "assistant_md", "stage_manager"] },
  "conflicts:read": { production: ["music_director", "assistant_md", "stage_manager"], own: true },
  "conflicts:agree": { production: ["music_director", "assistant_md", "stage_manager"] },
  "sheets:issue": { production: ["music_director", "assistant_md", "stage_manager"] },
  "sheets:read": {
    production: [
      "music_director",
      "assistant_md",
      "stage_manager",
      "director",
      "choreographer",
      "producer",
    ],
    company: ["company_admin"],
  },
  "contacts:read": {
    production: ["music_director", "assistant_md", "stage_manager"],
    company: ["company_admin"],
  },
  "people:read": {
    production: [
      "music_director",
      "assistant_md",
      "stage_manager",
      "director",
      "choreographer",
      "producer",
    ],
    company: ["company_admin"],
  },
  "pianists:see": {
    production: ["music_director", "assistant_md", "stage_manager"],
    company: ["company_admin"],
  },
  "pianists:assign": { production: ["music_director", "assistant_md"] },
  "positions:manage": { production: ["music_director"], company: ["company_admin"] },
  "company:see": { company: ["member"] },
  "rooms:manage": {
    company: ["company_admin"],
    anyProduction: ["stage_manager", "music_director"],
  },
  "members:manage": { company: ["company_admin"] },
  "trail:read": {
    production: ["music_director", "assistant_md", "stage_manager"],
    company: ["company_admin"],
  },
  "own:change": { own: true },
} as const satisfies Record<string, Rule>;

type Rule = {
  /** Positions in the subject's production. */
  production?: readonly (PositionKind | "member")[];
  /** Positions in the subject's company itself; "member" is any position in it or in one of its productions. */
  company?: readonly (PositionKind | "member")[];
  /** Positions in the production that count once the cast list is out. */
  oncePublished?: readonly PositionKind[];
  /** Positions in any production of the company. */
  anyProduction?: readonly PositionKind[];
  own?: boolean;
};

export type Action = keyof typeof RULES;

export const ACTIONS = Object.keys(RULES) as Action[];

/**
 * Whether the actor may do this to the subject. Pure: it sees only what it is given.
 * Nobody (null) may do nothing. A position counts only in its own production and company.
 */
export function can(actor: Actor | null, action: Action, subject: Subject): boolean {
  if (!actor) return false;
  const rule: Rule = RULES[action];
  if (rule.own && subject.personId !== undefined) {
    if (actor.people.some((p) => p.id === subject.personId && p.companyId === subject.companyId))
      return true;
  }
  return actor.positions.some((position) => {
    if (position.companyId !== subject.companyId) return false;
    if (position.productionId === null) return holds(rule.company, position.kind);
    if (holds(rule.anyProduction, position.kind)) return true;
    if (rule.company?.includes("member") === true) return true;
    if (subject.productionId === undefined || position.productionId !== subject.productionId)
      return false;
    if (holds(rule.production, position.kind)) return true;
    return subject.castPublished === true && holds(rule.oncePublished, position.kind);
  });
}

function holds(
  list: readonly (PositionKind | "member")[] | undefined,
  kind: PositionKind,
): boolean {
  return list?.some((entry) => entry === "member" || entry === kind) ?? false;
}
