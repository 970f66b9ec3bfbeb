import { test } from "vitest";
import type { Stage } from "./stage";

/**
 * Steps that build on each other. When one fails, pictures are taken and the ones after it say so instead of
 * failing for reasons of their own.
 */
export function journey(stage: () => Stage): (name: string, walk: () => Promise<void>) => void {
  let broken: string | null = null;
  return (name, walk) => {
    test(name, async () => {
      if (broken !== null) throw new Error(`Not tried, because this failed before: ${broken}`);
      try {
        await walk();
      } catch (error) {
        broken = name;
        await stage().picture(name);
        throw error;
      }
    });
  };
}
