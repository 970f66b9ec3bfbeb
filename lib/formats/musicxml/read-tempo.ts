import { toNumber } from "./rational";
import { valueQuarters } from "./type-quarters";
import { child, childText, type XmlElement } from "./xml-events";

/** Slower or faster than any music, so a mistake. */
const SLOWEST = 5;
const FASTEST = 1000;

function usable(quartersPerMinute: number): number | null {
  return quartersPerMinute >= SLOWEST && quartersPerMinute <= FASTEST ? quartersPerMinute : null;
}

/**
 * The tempo that a `<sound>` or `<direction>` element gives, in quarter notes a minute.
 * The sounding tempo goes before the printed one; null when there is neither.
 */
export function readTempo(element: XmlElement): number | null {
  const sound = element.name === "sound" ? element : child(element, "sound");
  const sounding = sound?.attributes["tempo"];
  if (sounding !== undefined) return usable(Number(sounding));
  for (const type of element.children) {
    const metronome = child(type, "metronome");
    if (type.name !== "direction-type" || !metronome) continue;
    const dots = metronome.children.filter(({ name }) => name === "beat-unit-dot").length;
    const unit = valueQuarters(childText(metronome, "beat-unit") ?? "", dots);
    const perMinute = /\d+(?:\.\d+)?/.exec(childText(metronome, "per-minute") ?? "")?.[0];
    if (unit && perMinute !== undefined) return usable(Number(perMinute) * toNumber(unit));
  }
  return null;
}
