"use client";

import { useRef, useState, type KeyboardEvent } from "react";
import type { AuditionDayView, ItemOnDay } from "@/lib/auditions/day-view";
import { clock } from "@/lib/format-dates";

const singable = (item: ItemOnDay): boolean => item.kind === "slot" || item.kind === "hold";

type Options = {
  day: AuditionDayView;
  mayMove: boolean;
  onDrop: (signUpId: string, slotId: string) => void;
};

export type SlotKeys = {
  /** The singer who is picked up. */
  carrying: { signUpId: string; name: string } | null;
  /** The slot in the tab order. */
  current: string | null;
  /** What a screen reader is told. */
  spoken: string;
  pickUp: (signUpId: string, name: string, goTo?: string | null) => void;
  letGo: () => void;
  /** A press on a slot: picks up who sings there, or drops who is carried. */
  press: (item: ItemOnDay) => void;
  onKeyDown: (event: KeyboardEvent<HTMLElement>, item: ItemOnDay) => void;
  register: (slotId: string, element: HTMLElement | null) => void;
};

/**
 * Slots by keyboard, and by one press after another: Enter picks a singer up, arrow keys choose the target, Enter drops,
 * Escape leaves everything as it was. Only one slot is in the tab order.
 */
export function useSlotKeys({ day, mayMove, onDrop }: Options): SlotKeys {
  const elements = useRef(new Map<string, HTMLElement>());
  const [carrying, setCarrying] = useState<{ signUpId: string; name: string } | null>(null);
  const [focused, setFocused] = useState<string | null>(null);
  const [spoken, setSpoken] = useState("");
  const columns = day.rooms.map((room) => room.items.filter(singable));
  const all = columns.flat();
  const current = all.some((item) => item.id === focused) ? focused : (all[0]?.id ?? null);

  function goTo(slotId: string) {
    setFocused(slotId);
    elements.current.get(slotId)?.focus();
  }

  function pickUp(signUpId: string, name: string, target?: string | null) {
    if (!mayMove) return;
    setCarrying({ signUpId, name });
    setSpoken(
      `${name} picked up. Arrow keys choose a slot, Enter drops, Escape leaves everything as it was.`,
    );
    if (target) goTo(target);
  }

  function letGo() {
    if (carrying) setSpoken(`${carrying.name} stays where they were.`);
    setCarrying(null);
  }

  function press(item: ItemOnDay) {
    setFocused(item.id);
    if (!carrying) {
      if (item.singer) pickUp(item.singer.signUpId, item.singer.name);
      return;
    }
    setCarrying(null);
    if (item.singer?.signUpId === carrying.signUpId) {
      setSpoken(`${carrying.name} stays where they were.`);
      return;
    }
    setSpoken(
      item.singer
        ? `${carrying.name} and ${item.singer.name} change places.`
        : `${carrying.name} goes to ${clock(new Date(item.startsAt), day.zone)}.`,
    );
    onDrop(carrying.signUpId, item.id);
  }

  function neighbour(item: ItemOnDay, key: string): ItemOnDay | undefined {
    const column = columns.findIndex((items) => items.includes(item));
    const items = columns[column] ?? [];
    const index = items.indexOf(item);
    const aside = (step: number): ItemOnDay | undefined => {
      const other = columns[column + step];
      const at = new Date(item.startsAt).getTime();
      const away = (o: ItemOnDay): number => Math.abs(new Date(o.startsAt).getTime() - at);
      return other?.reduce<ItemOnDay | undefined>(
        (best, o) => (best === undefined || away(o) < away(best) ? o : best),
        undefined,
      );
    };
    switch (key) {
      case "ArrowDown":
        return items[index + 1];
      case "ArrowUp":
        return items[index - 1];
      case "ArrowRight":
        return aside(1);
      case "ArrowLeft":
        return aside(-1);
      case "Home":
        return items[0];
      case "End":
        return items.at(-1);
      default:
        return undefined;
    }
  }

  function onKeyDown(event: KeyboardEvent<HTMLElement>, item: ItemOnDay) {
    if (event.key === "Escape" && carrying) {
      event.preventDefault();
      letGo();
      return;
    }
    const next = neighbour(item, event.key);
    if (!next) return;
    event.preventDefault();
    goTo(next.id);
  }

  return {
    carrying,
    current,
    spoken,
    pickUp,
    letGo,
    press,
    onKeyDown,
    register: (slotId, element) => {
      if (element) elements.current.set(slotId, element);
      else elements.current.delete(slotId);
    },
  };
}
