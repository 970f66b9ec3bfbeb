import "server-only";
import { createHash } from "node:crypto";
import { and, eq } from "drizzle-orm";
import { db } from "@/db/client";
import { newId } from "@/db/columns";
import { files, scoreParts, scores } from "@/db/schema";
import { AppError } from "@/lib/errors";
import { readScoreInWorker } from "@/lib/formats/musicxml/read-score-in-worker";
import { ScoreError } from "@/lib/formats/musicxml/score-error";
import type { ParsedScore, ScorePart } from "@/lib/formats/musicxml/types";
import type { Actor } from "@/lib/permissions/types";
import { partKeys } from "@/lib/score/part-keys";
import { readStoredFile, storeFile } from "@/lib/services/storage/storage";
import { recordAudit } from "../audit";
import { productionFor } from "../guard";
import { countTry } from "../rate-limit";
import { inTransaction } from "../transaction";

/** Reading takes a thread for seconds: a whole show fits, a loop does not. */
const READINGS = { name: "score-read", limit: 60, windowSeconds: 600 } as const;

export type UploadedScore = { bytes: Uint8Array; name: string; sha256: string | null };
export type KeptScore = {
  scoreId: string;
  fileId: string;
  sha256: string;
  bytes: number;
  title: string;
};

/**
 * Reads a score and keeps it: the file, the reading and its parts; no number and no line yet. Throws `wrong-kind`,
 * `too-large` or `refused` with what to do when it cannot be read, and then nothing is kept.
 */
export async function keepScore(
  actor: Actor,
  productionId: string,
  file: UploadedScore,
): Promise<KeptScore> {
  const scope = await productionFor(actor, productionId, "score:change");
  await countTry(READINGS, actor.userId);
  const arrived = createHash("sha256").update(file.bytes).digest("hex");
  if (file.sha256 !== null && file.sha256.toLowerCase() !== arrived) {
    throw new AppError(
      "refused",
      "The file did not arrive whole. Check the connection and choose it again.",
    );
  }
  const name = file.name.slice(0, 200) || "score.musicxml";
  const score = await parse(file.bytes, name);
  const stored = await storeFile(file.bytes);
  const fileId = newId();
  const scoreId = newId();
  const title = (score.movement ?? score.title ?? name).slice(0, 200);
  await inTransaction(async (tx) => {
    await tx.insert(files).values({
      id: fileId,
      companyId: scope.companyId,
      productionId: scope.id,
      kind: "score",
      mediaType:
        file.bytes[0] === 0x50
          ? "application/vnd.recordare.musicxml"
          : "application/vnd.recordare.musicxml+xml",
      name,
      uploadedBy: actor.userId,
      ...stored,
    });
    await tx.insert(scores).values({ id: scoreId, productionId: scope.id, fileId, title });
    await tx.insert(scoreParts).values(partRows(scoreId, score.parts));
    await recordAudit(tx, actor, {
      companyId: scope.companyId,
      productionId: scope.id,
      action: "score.read",
      subjectKind: "score",
      subjectId: scoreId,
      summary: `Read the score ${title}`,
      detail: { parts: score.parts.length, bytes: stored.bytes },
    });
  });
  return { scoreId, fileId, sha256: stored.sha256, bytes: stored.bytes, title };
}

async function parse(bytes: Uint8Array, name: string): Promise<ParsedScore> {
  try {
    return await readScoreInWorker(bytes, name);
  } catch (error) {
    if (error instanceof ScoreError) throw new AppError(error.kind, error.message);
    throw error;
  }
}

/** A quarter tone belongs to the key below as a lowest note, to the key above as a highest: nobody is promised too little. */
function boundsOf(part: ScorePart) {
  const optionalLow = part.lowWithOptional === null ? null : Math.floor(part.lowWithOptional.midi);
  const optionalHigh =
    part.highWithOptional === null ? null : Math.ceil(part.highWithOptional.midi);
  const low = part.low === null ? null : Math.floor(part.low.midi);
  const high = part.high === null ? null : Math.ceil(part.high.midi);
  return {
    low,
    high,
    lowSpelled: part.low?.spelling.slice(0, 8) ?? null,
    highSpelled: part.high?.spelling.slice(0, 8) ?? null,
    optionalLow: optionalLow !== null && low !== null && optionalLow < low ? optionalLow : null,
    optionalHigh:
      optionalHigh !== null && high !== null && optionalHigh > high ? optionalHigh : null,
  };
}

function partRows(
  scoreId: string,
  parts: readonly ScorePart[],
): (typeof scoreParts.$inferInsert)[] {
  const keys = partKeys(parts);
  return parts.map((part, place) => ({
    scoreId,
    partId: keys[place] ?? String(place),
    place,
    // A name set in two lines in the score is one name.
    name: part.name.replace(/\s+/g, " ").trim().slice(0, 160),
    vocal: part.vocal,
    ...boundsOf(part),
    histogram: (part.performed ?? part.written)?.histogram ?? null,
    warnings: part.warnings.map((warning) => warning.message),
  }));
}

type PartRow = typeof scoreParts.$inferSelect;

export type KeptReading = {
  id: string;
  title: string;
  version: number;
  fileName: string;
  /** The file read again: what a reading's rows do not hold (keys, metre, tempo, length, bars of the outermost notes). */
  score: ParsedScore;
  parts: (PartRow & { lowBar: string | null; highBar: string | null; quarters: number | null })[];
};

/** A reading of the production with its file read anew. Throws `not-found` for one of another production. Asks no permission: the caller has. */
export async function readingIn(productionId: string, scoreId: string): Promise<KeptReading> {
  const [row] = await db
    .select({
      id: scores.id,
      title: scores.title,
      version: scores.version,
      fileName: files.name,
      storageKey: files.storageKey,
    })
    .from(scores)
    .innerJoin(files, eq(files.id, scores.fileId))
    .where(and(eq(scores.id, scoreId), eq(scores.productionId, productionId)));
  if (!row) throw new AppError("not-found");
  const { storageKey, ...reading } = row;
  const [parts, score] = await Promise.all([
    db.select().from(scoreParts).where(eq(scoreParts.scoreId, row.id)).orderBy(scoreParts.place),
    readStoredFile(storageKey).then((bytes) => parse(bytes, row.fileName)),
  ]);
  return {
    ...reading,
    score,
    parts: parts.map((part) => {
      const read = score.parts[part.place];
      return {
        ...part,
        lowBar: read?.low?.bar.slice(0, 12) ?? null,
        highBar: read?.high?.bar.slice(0, 12) ?? null,
        quarters: (read?.performed ?? read?.written)?.quarters ?? null,
      };
    }),
  };
}
