/**
 * Elapsed minutes from one instant to another, negative when `to` is earlier. Not rounded: a half
 * minute is 0.5. Instants, not wall clocks: an hour that the clocks skip is not counted.
 */
export function minutesBetween(from: Date, to: Date): number {
  return (to.getTime() - from.getTime()) / 60_000;
}
