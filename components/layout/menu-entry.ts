/** One line of a menu in the frame. Actions are server actions, or browser functions. */
export type MenuEntry =
  | { kind: "link"; label: string; href: string; note?: string; current?: boolean }
  | { kind: "action"; label: string; action: () => Promise<unknown> }
  | { kind: "mode" }
  | { kind: "heading"; label: string }
  | { kind: "line" };
