/** A value as it arrives from a route: its dates are ISO text. */
export type AsJson<T> = T extends Date
  ? string
  : T extends readonly (infer Item)[]
    ? AsJson<Item>[]
    : T extends object
      ? { [Key in keyof T]: AsJson<T[Key]> }
      : T;

/**
 * A value that a page read itself, in the form the route would have sent it, so that the browser
 * goes on from the one with the other. In: anything JSON can hold, and dates.
 */
export function asJson<T>(value: T): AsJson<T> {
  return JSON.parse(JSON.stringify(value)) as AsJson<T>;
}
