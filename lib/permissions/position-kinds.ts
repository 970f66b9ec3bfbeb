/** What a person can do in a production or a company; the order is the order of lists. */
export const POSITION_KINDS = [
  "music_director",
  "assistant_md",
  "stage_manager",
  "director",
  "choreographer",
  "producer",
  "accompanist",
  "actor",
  "company_admin",
] as const;

/** The trade's name of each position, for people to read. */
export const POSITION_NAMES: Record<(typeof POSITION_KINDS)[number], string> = {
  music_director: "Music director",
  assistant_md: "Assistant music director",
  stage_manager: "Stage manager",
  director: "Director",
  choreographer: "Choreographer",
  producer: "Producer",
  accompanist: "Accompanist",
  actor: "Actor",
  company_admin: "Company admin",
};
