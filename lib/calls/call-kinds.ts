/** The trade's name of each kind of call, for people to read; the order is the order of lists. */
export const CALL_KIND_NAMES = {
  music: "Music call",
  staging: "Staging",
  choreography: "Choreography",
  orchestra: "Band call",
  sitzprobe: "Sitzprobe",
  wandelprobe: "Wandelprobe",
  tech: "Tech",
  dress: "Dress",
  put_in: "Put-in",
  brush_up: "Brush-up",
  performance: "Performance",
} as const;

/** The same inside a sentence: "is called to a music call". */
export const CALL_PHRASES: Record<keyof typeof CALL_KIND_NAMES, string> = {
  music: "a music call",
  staging: "staging",
  choreography: "choreography",
  orchestra: "a band call",
  sitzprobe: "a sitzprobe",
  wandelprobe: "a wandelprobe",
  tech: "tech",
  dress: "a dress rehearsal",
  put_in: "a put-in",
  brush_up: "a brush-up",
  performance: "a performance",
};

export type CallKind = keyof typeof CALL_KIND_NAMES;

export const CALL_KINDS = Object.keys(CALL_KIND_NAMES) as [CallKind, ...CallKind[]];

/** What a block that is not a number is called when it has no title of its own. */
export const BLOCK_KIND_NAMES = {
  number: "Number",
  scene: "Scene",
  warm_up: "Warm-up",
  break: "Break",
} as const;

export type BlockKind = keyof typeof BLOCK_KIND_NAMES;

export const BLOCK_KINDS = Object.keys(BLOCK_KIND_NAMES) as [BlockKind, ...BlockKind[]];
