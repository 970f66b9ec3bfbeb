import type { Persona } from "../personas";
import type { RichWorld } from "../rich-world";

/** Who may pass an action or a route, and with what it is tried: an input that is right for those who may. */
export type Door = { may: Persona[] | "anyone" } & (
  | { input: (w: RichWorld) => unknown }
  | { request: (w: RichWorld) => { request: () => Request; params: Record<string, string> } }
);

export type Doors = Record<string, Door>;

export const ORIGIN = "http://localhost:3000";

/** A route read with GET. */
export function reads(
  may: Door["may"],
  url: string,
  params: (w: RichWorld) => Record<string, string> = () => ({}),
): Door {
  return { may, request: (w) => ({ request: () => new Request(ORIGIN + url), params: params(w) }) };
}

/** A route that takes a file in the form field "file". */
export function takesFile(
  may: Door["may"],
  url: string,
  file: () => File,
  params: (w: RichWorld) => Record<string, string>,
): Door {
  return {
    may,
    request: (w) => ({
      request: () => {
        const form = new FormData();
        form.set("file", file());
        return new Request(ORIGIN + url, { method: "POST", body: form });
      },
      params: params(w),
    }),
  };
}
