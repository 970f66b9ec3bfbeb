import type { AppFrameProps } from "@/components/layout/app-frame";
import type { MenuEntry } from "@/components/layout/menu-entry";
import type { Actor } from "@/lib/permissions/types";

const initialsOf = (name: string): string =>
  name
    .split(/[\s-]+/)
    .map((part) => part[0] ?? "")
    .filter((letter) => /\p{L}/u.test(letter))
    .slice(0, 2)
    .join("")
    .toUpperCase();

/** The person and their menu, as the frame takes them. */
export function accountOf(
  actor: Actor,
  signOut: () => Promise<unknown>,
): NonNullable<AppFrameProps["account"]> {
  const entries: MenuEntry[] = [
    { kind: "heading", label: actor.name },
    { kind: "link", label: "My page", href: "/me" },
    { kind: "link", label: "Season", href: "/season" },
    { kind: "link", label: "Account", href: "/account" },
    { kind: "line" },
    { kind: "mode" },
    { kind: "line" },
    { kind: "action", label: "Sign out", action: signOut },
  ];
  return { name: actor.name, initials: initialsOf(actor.name) || "·", entries };
}
