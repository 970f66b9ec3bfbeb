import type { RichWorld } from "./rich-world";

/** Everyone who might ask: each position of the first production, others of the company, another company, a stranger, nobody. */
export const PERSONAS = {
  md: (w: RichWorld) => w.people.md.userId,
  assistant: (w: RichWorld) => w.people.assistant.userId,
  stageManager: (w: RichWorld) => w.people.stageManager.userId,
  director: (w: RichWorld) => w.people.director.userId,
  choreographer: (w: RichWorld) => w.people.choreographer.userId,
  producer: (w: RichWorld) => w.people.producer.userId,
  accompanist: (w: RichWorld) => w.people.accompanist.userId,
  actor: (w: RichWorld) => w.people.actor.userId,
  otherActor: (w: RichWorld) => w.people.otherActor.userId,
  admin: (w: RichWorld) => w.people.admin.userId,
  siblingMd: (w: RichWorld) => w.people.siblingMd.userId,
  outsiderMd: (w: RichWorld) => w.people.outsiderMd.userId,
  outsiderAdmin: (w: RichWorld) => w.people.outsiderAdmin.userId,
  stranger: (w: RichWorld) => w.strangerId,
  nobody: (): string | null => null,
} satisfies Record<string, (w: RichWorld) => string | null>;

export type Persona = keyof typeof PERSONAS;

export const MUSIC: Persona[] = ["md", "assistant"];
export const TABLE: Persona[] = ["director", "choreographer", "producer"];
export const PLANNERS: Persona[] = ["md", "assistant", "stageManager"];
export const SIGNED_IN = (Object.keys(PERSONAS) as Persona[]).filter(
  (persona) => persona !== "nobody",
);
