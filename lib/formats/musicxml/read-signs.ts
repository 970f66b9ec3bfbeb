import type { RoadSigns } from "./measure-record";
import { child, childText, type XmlElement } from "./xml-events";

const JUMP_WORDS = /^\W*(?:d\.\s*c\.|d\.\s*s\.|dc al|ds al|da\s?capo|dal\s?segno)/i;
const FINE_WORD = /^\W*fine\W*$/i;
const TO_CODA_WORDS = /^\W*to\s+coda\W*$/i;

/** Enters a `<barline>` into the bar's signs. */
export function readBarline(barline: XmlElement, signs: RoadSigns): void {
  const repeat = child(barline, "repeat");
  if (repeat?.attributes["direction"] === "forward") signs.forward = true;
  if (repeat?.attributes["direction"] === "backward") {
    const times = repeat.attributes["times"] ?? "2";
    signs.backward = /^\d{1,9}$/.test(times) ? Math.max(1, Number(times)) : 2;
  }
  const ending = child(barline, "ending");
  if (ending?.attributes["type"] === "start") signs.endingStart = ending.attributes["number"] ?? "";
  else if (ending) signs.endingStop = true;
  signs.segno ??= barline.attributes["segno"] ?? (child(barline, "segno") ? "" : null);
  signs.coda ??= barline.attributes["coda"] ?? (child(barline, "coda") ? "" : null);
}

/** Enters a `<sound>` element, on its own or in a direction, into the bar's signs. */
export function readSound(sound: XmlElement, signs: RoadSigns): void {
  const { segno, coda, tocoda, dalsegno, dacapo, fine } = sound.attributes;
  if (sound.attributes["forward-repeat"] === "yes") signs.forward = true;
  signs.segno = segno ?? signs.segno;
  signs.coda = coda ?? signs.coda;
  signs.toCoda = tocoda ?? signs.toCoda;
  signs.dalSegno = dalsegno ?? signs.dalSegno;
  if (dacapo === "yes") signs.daCapo = true;
  if (fine !== undefined && fine !== "no") signs.fine = true;
}

/** Enters what a direction shows (segno, coda, words) into the bar's signs. */
export function readDirectionSigns(direction: XmlElement, signs: RoadSigns): void {
  for (const type of direction.children) {
    if (type.name !== "direction-type") continue;
    if (child(type, "segno")) signs.segno ??= "";
    if (child(type, "coda")) signs.coda ??= "";
    const words = (childText(type, "words") ?? "").replace(/<[^>]*>/g, "");
    if (FINE_WORD.test(words)) signs.fine = true;
    if (TO_CODA_WORDS.test(words)) signs.toCoda ??= "";
    if (JUMP_WORDS.test(words)) signs.jumpInWords = true;
  }
}
