import { readFile } from "node:fs/promises";
import path from "node:path";
import type { Tx } from "@/db/client";
import { newId } from "@/db/columns";
import { files, numbers, roles, scoreParts, scores, vocalLines } from "@/db/schema";
import { lineOfPart } from "@/lib/formats/musicxml/line-of-part";
import { readScore } from "@/lib/formats/musicxml/read-score";
import { pitchName } from "@/lib/music/pitch-name";
import { storeFile } from "@/lib/services/storage/storage";
import { inventedHistogram } from "./voices";

export type RoleKind = "principal" | "supporting" | "ensemble";

/** Writes roles in order. Returns their ids by name. */
export async function addRoles(
  tx: Tx,
  productionId: string,
  list: [name: string, kind: RoleKind, needed?: number, covers?: number][],
): Promise<Record<string, string>> {
  const made: Record<string, string> = {};
  for (const [index, [name, kind, needed = 1, covers = 0]] of list.entries()) {
    const id = newId();
    made[name] = id;
    await tx
      .insert(roles)
      .values({ id, productionId, name, kind, needed, covers, place: index + 1 });
  }
  return made;
}

export type TypedNumber = {
  label: string;
  title: string;
  key: string;
  fifths: number;
  seconds: number;
  bars: number;
  tempo: number;
  /** Role → lowest and highest note it sings. */
  lines: Record<string, [low: number, high: number]>;
};

/** An invented number with lines as a music director would type them in. Returns the number's id. */
export async function addTypedNumber(
  tx: Tx,
  productionId: string,
  place: number,
  number: TypedNumber,
  roleIds: Record<string, string>,
): Promise<string> {
  const id = newId();
  await tx.insert(numbers).values({
    id,
    productionId,
    place,
    label: number.label,
    title: number.title,
    keyFifths: number.fifths,
    keyName: number.key,
    metre: "4/4",
    tempo: number.tempo,
    bars: number.bars,
    seconds: number.seconds,
  });
  for (const [name, [low, high]] of Object.entries(number.lines)) {
    const roleId = roleIds[name];
    if (!roleId) throw new Error(`The demo has no role ${name}.`);
    const quarters = Math.round((number.seconds / 60) * number.tempo * 0.45);
    const prefer = number.fifths < 0 ? "flat" : "sharp";
    await tx.insert(vocalLines).values({
      id: newId(),
      roleId,
      numberId: id,
      source: "typed",
      low,
      high,
      lowSpelled: pitchName(low, { prefer }),
      highSpelled: pitchName(high, { prefer }),
      histogram: inventedHistogram(low, high, quarters, place * 31 + low),
      quarters,
    });
  }
  return id;
}

/** A part for one role; "8vb" puts a part that is printed an octave high where it is sung. */
type PartFor = string | readonly [role: string, octave: "8vb"];

/** A number read from one of the public-domain scores, each named part going to a role. Returns the number's id. */
export async function addReadNumber(
  tx: Tx,
  production: { id: string; companyId: string },
  place: number,
  label: string,
  file: string,
  parts: Record<string, PartFor>,
  roleIds: Record<string, string>,
): Promise<string> {
  const bytes = await readFile(path.join(import.meta.dirname, "music", file));
  const score = readScore(bytes, file);
  const stored = await storeFile(bytes);
  const fileId = newId();
  const scoreId = newId();
  const numberId = newId();
  await tx.insert(files).values({
    id: fileId,
    companyId: production.companyId,
    productionId: production.id,
    name: file,
    kind: "score",
    mediaType: "application/vnd.recordare.musicxml",
    ...stored,
  });
  await tx
    .insert(scores)
    .values({ id: scoreId, productionId: production.id, fileId, title: score.title ?? file });
  const quarters = score.length.performed?.quarters ?? score.length.written.quarters;
  const minutes = score.length.performed?.minutes ?? score.length.written.minutes;
  await tx.insert(numbers).values({
    id: numberId,
    productionId: production.id,
    scoreId,
    place,
    label,
    title: score.movement ?? score.title ?? file,
    keyFifths: score.keys[0]?.fifths ?? null,
    metre: score.metre,
    tempo: score.tempo === null ? null : Math.round(score.tempo),
    bars: score.measures.written,
    seconds: Math.round(minutes === null ? (quarters / 90) * 60 : minutes * 60),
  });
  for (const [index, part] of score.parts.entries()) {
    const line = lineOfPart(part);
    const goesTo = Object.entries(parts).find(
      ([name]) => part.name === name || part.id === name,
    )?.[1];
    const role = typeof goesTo === "string" ? goesTo : goesTo?.[0];
    const shift = typeof goesTo === "object" ? -12 : 0;
    const partRow = newId();
    await tx.insert(scoreParts).values({
      id: partRow,
      scoreId,
      partId: part.id,
      place: index,
      name: part.name.slice(0, 160),
      vocal: part.vocal,
      octaveShift: shift,
      low: line?.low ?? null,
      high: line?.high ?? null,
      lowSpelled: part.low?.spelling ?? null,
      highSpelled: part.high?.spelling ?? null,
      histogram: line?.histogram ?? null,
      warnings: part.warnings.map((w) => w.message),
    });
    const roleId = role === undefined ? undefined : roleIds[role];
    if (roleId === undefined || !part.low || !part.high || !line) continue;
    const histogram = Object.fromEntries(
      Object.entries(line.histogram ?? {}).map(([pitch, sung]) => [
        String(Number(pitch) + shift),
        sung,
      ]),
    );
    await tx.insert(vocalLines).values({
      id: newId(),
      roleId,
      numberId,
      scorePartId: partRow,
      partKey: part.id,
      source: "read",
      low: line.low + shift,
      high: line.high + shift,
      lowSpelled: lowerOctave(part.low.spelling, shift),
      highSpelled: lowerOctave(part.high.spelling, shift),
      histogram,
      quarters: (part.performed ?? part.written)?.quarters ?? null,
      lowBar: part.low.bar.slice(0, 12),
      highBar: part.high.bar.slice(0, 12),
    });
  }
  return numberId;
}

function lowerOctave(spelling: string, shift: number): string {
  return spelling.replace(/-?\d+$/, (octave) => String(Number(octave) + shift / 12));
}
