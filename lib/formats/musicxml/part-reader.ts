import { LIMITS } from "./limits";
import { newMeasure, type MeasureRecord } from "./measure-record";
import {
  add,
  compare,
  divide,
  parseDecimal,
  rational,
  subtract,
  ZERO,
  type Rational,
} from "./rational";
import { readPitch, type Transposition } from "./read-pitch";
import { readBarline, readDirectionSigns, readSound } from "./read-signs";
import { readTempo } from "./read-tempo";
import { readTime } from "./read-time";
import { ScoreError } from "./score-error";
import type { ScorePitch, ScoreWarning } from "./types";
import { typeQuarters } from "./type-quarters";
import { child, childText, type XmlElement } from "./xml-events";

const ONE = rational(1n);
const NO_SHIFT: Transposition = { chromatic: 0, diatonic: 0, octaves: 0 };
const SPOKEN_HEADS = new Set(["x", "circle-x", "cross"]);

/**
 * Whether a note is spoken: it has an x for a head, or no head but a word of its own. A note without
 * either is the hidden end of a held one, and sung. Common practice, no source.
 */
function isSpoken(note: XmlElement): boolean {
  const head = childText(note, "notehead") ?? "";
  return SPOKEN_HEADS.has(head) || (head === "none" && child(note, "lyric") !== undefined);
}

type Extremes = { notes: number; low: ScorePitch; high: ScorePitch };

function widen(extremes: Extremes | null, pitch: ScorePitch): Extremes {
  if (!extremes) return { notes: 1, low: pitch, high: pitch };
  return {
    notes: extremes.notes + 1,
    low: pitch.midi < extremes.low.midi ? pitch : extremes.low,
    high: pitch.midi > extremes.high.midi ? pitch : extremes.high,
  };
}

/** Reads one part bar by bar: give it the elements inside each `<measure>` in order. */
export class PartReader {
  readonly id: string;
  readonly measures: MeasureRecord[] = [];
  /** Notes that are sung; with those that may be left out; and those that are spoken. */
  sung: Extremes | null = null;
  withOptional: Extremes | null = null;
  spoken: Extremes | null = null;
  cues = 0;
  lyrics = 0;
  staves = 1;
  /** The first time signature as printed. */
  metre: string | null = null;
  readonly warnings = new Map<string, ScoreWarning>();

  private divisions: Rational | null = null;
  private nominal: Rational | null = null;
  private readonly shifts = new Map<string, Transposition>();
  private readonly octaveClefs = new Set<string>();
  private cursor = ZERO;
  private lastStart: Rational | null = null;

  constructor(id: string) {
    this.id = id;
  }

  beginMeasure(attributes: Record<string, string>): void {
    this.measures.push(newMeasure(attributes, this.nominal));
    this.cursor = ZERO;
    this.lastStart = null;
  }

  readElement(element: XmlElement): void {
    const measure = this.measures.at(-1);
    if (!measure) return;
    if (element.name === "note") this.readNote(element, measure);
    else if (element.name === "attributes") this.readAttributes(element, measure);
    else if (element.name === "backup") this.moveBack(this.duration(element, measure));
    else if (element.name === "forward") this.moveOn(this.duration(element, measure), measure);
    else if (element.name === "barline") readBarline(element, measure.signs);
    else if (element.name === "direction") this.readDirection(element, measure);
    else if (element.name === "sound") {
      readSound(element, measure.signs);
      this.addTempo(element, measure);
    }
  }

  warn(code: string, message: string): void {
    if (!this.warnings.has(code)) this.warnings.set(code, { code, message });
  }

  private readDirection(direction: XmlElement, measure: MeasureRecord): void {
    readDirectionSigns(direction, measure.signs);
    const sound = child(direction, "sound");
    if (sound) readSound(sound, measure.signs);
    this.addTempo(direction, measure);
  }

  private addTempo(element: XmlElement, measure: MeasureRecord): void {
    const quartersPerMinute = readTempo(element);
    if (quartersPerMinute !== null) measure.tempi.push({ at: this.cursor, quartersPerMinute });
  }

  private moveOn(by: Rational, measure: MeasureRecord): void {
    this.lastStart = this.cursor;
    this.cursor = add(this.cursor, by);
    if (compare(this.cursor, measure.length) > 0) measure.length = this.cursor;
  }

  private moveBack(by: Rational): void {
    this.cursor = subtract(this.cursor, by);
    this.lastStart = null;
    if (compare(this.cursor, ZERO) >= 0) return;
    this.cursor = ZERO;
    this.warn(
      "score.before-bar",
      "A voice begins before its bar; it was moved to the bar's beginning.",
    );
  }

  private duration(element: XmlElement, measure: MeasureRecord): Rational {
    const text = childText(element, "duration");
    const noDivisions = this.divisions === null || this.divisions.n === 0n;
    if (noDivisions) {
      this.warn(
        "score.no-divisions",
        "The file does not say how long its notes count; lengths are taken from the note values. Check the tessitura.",
      );
    }
    const byType = noDivisions && this.divisions !== null ? typeQuarters(element) : null;
    if (text === undefined) {
      this.warn("score.no-duration", "Some notes have no length; it was taken from their values.");
      return typeQuarters(element) ?? ZERO;
    }
    const duration = parseDecimal(text, LIMITS.durationDigits, LIMITS.durationDecimals);
    if (!duration) {
      throw new ScoreError(
        "score.bad-duration",
        `A note in bar ${measure.number.slice(0, 20)} has a length that is not a usable number. Check that bar in your notation program and export again.`,
      );
    }
    if (byType) return byType;
    return divide(duration, noDivisions ? ONE : (this.divisions ?? ONE));
  }

  private readAttributes(attributes: XmlElement, measure: MeasureRecord): void {
    const divisions = childText(attributes, "divisions");
    if (divisions !== undefined) {
      this.divisions =
        parseDecimal(divisions, LIMITS.durationDigits, LIMITS.durationDecimals) ?? ZERO;
    }
    this.staves = Math.max(this.staves, Number(childText(attributes, "staves") ?? "1") || 1);
    for (const element of attributes.children) {
      const staff = element.attributes["number"] ?? "";
      if (element.name === "transpose") this.readTransposition(element, staff);
      if (element.name === "clef") {
        const octaves = Number(childText(element, "clef-octave-change") ?? "0") || 0;
        if (octaves === 0) this.octaveClefs.delete(staff);
        else this.octaveClefs.add(staff);
      }
      if (element.name === "time") {
        const time = readTime(element);
        this.metre ??= time.shown;
        this.nominal = time.quarters;
        measure.nominal = time.quarters;
      }
    }
    for (const element of attributes.children) {
      const fifths = element.name === "key" ? Number(childText(element, "fifths")) : Number.NaN;
      if (!Number.isInteger(fifths)) continue;
      const { chromatic, diatonic } = this.shiftOf(element.attributes["number"] ?? "");
      // A transposition moves along the line of fifths by 7 for a semitone, less 12 for a step.
      measure.keys.push(fifths + 7 * chromatic - 12 * diatonic);
    }
    if (
      this.octaveClefs.size > 0 &&
      [...this.shifts.values()].some(({ octaves }) => octaves !== 0)
    ) {
      this.warn(
        "score.octave-doubled",
        "This part has both a clef with an 8 and an octave transposition; it may come out an octave off. Compare it with the printed score.",
      );
    }
  }

  private readTransposition(transpose: XmlElement, staff: string): void {
    const whole = (name: string) => Math.round(Number(childText(transpose, name) ?? "0")) || 0;
    const chromatic = whole("chromatic");
    const diatonic =
      childText(transpose, "diatonic") === undefined
        ? Math.round((chromatic * 7) / 12)
        : whole("diatonic");
    if (staff === "") this.shifts.clear();
    this.shifts.set(staff, { chromatic, diatonic, octaves: whole("octave-change") });
  }

  private shiftOf(staff: string): Transposition {
    return this.shifts.get(staff) ?? this.shifts.get("") ?? NO_SHIFT;
  }

  private readNote(note: XmlElement, measure: MeasureRecord): void {
    const grace = child(note, "grace") !== undefined;
    const chord = child(note, "chord") !== undefined;
    const length = grace ? ZERO : this.duration(note, measure);
    if (!grace) {
      if (chord && this.lastStart === null) {
        this.warn(
          "score.chord-first",
          "A chord note has no note before it; it was read as a note of its own.",
        );
      }
      if (chord && this.lastStart !== null) {
        const end = add(this.lastStart, length);
        if (compare(end, measure.length) > 0) measure.length = end;
      } else this.moveOn(length, measure);
    }
    if (child(note, "lyric")) this.lyrics += 1;
    const pitch = child(note, "pitch");
    if (!pitch || child(note, "rest")) return;
    const sounding = readPitch(pitch, this.shiftOf(childText(note, "staff") ?? ""));
    if (!sounding) {
      throw new ScoreError(
        "score.bad-pitch",
        `Bar ${measure.number.slice(0, 20)} has a note whose pitch does not exist. Check that bar in your notation program and export again.`,
      );
    }
    const at: ScorePitch = { ...sounding, bar: measure.number };
    if (isSpoken(note)) {
      this.spoken = widen(this.spoken, at);
      return;
    }
    this.withOptional = widen(this.withOptional, at);
    if (child(note, "cue")) {
      this.cues += 1;
      return;
    }
    this.sung = widen(this.sung, at);
    const tieStops = note.children.some(
      ({ name, attributes }) => name === "tie" && attributes["type"] === "stop",
    );
    if (!tieStops) measure.attacks += 1;
    if (length.n !== 0n) {
      measure.sung.set(at.midi, add(measure.sung.get(at.midi) ?? ZERO, length));
    }
  }
}
