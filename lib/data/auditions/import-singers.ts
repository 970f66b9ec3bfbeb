import "server-only";
import { and, eq, inArray } from "drizzle-orm";
import type { z } from "zod";
import { db } from "@/db/client";
import { people, signUps } from "@/db/schema";
import { AppError } from "@/lib/errors";
import { readSingersSheet } from "@/lib/formats/xlsx/read-singers-sheet";
import { singersTemplate } from "@/lib/formats/xlsx/singers-template";
import type { SingerRow } from "@/lib/formats/xlsx/types";
import type { ImportPreview, ImportRow } from "@/lib/auditions/import-preview";
import type { Actor } from "@/lib/permissions/types";
import { singerRowSchema } from "@/lib/schemas/auditions";
import type { importSingersSchema, SingerRowInput } from "@/lib/schemas/auditions";
import { recordAudit } from "../audit";
import { productionFor } from "../guard";
import { duplicateKey, inTransaction } from "../transaction";
import { nextPlace, takeSignUp } from "./sign-ups";

/**
 * Reads a list of singers and says what each row would become; writes nothing. Throws `too-large`, `wrong-kind` or
 * `refused` with what to do when the file cannot be read.
 */
export async function previewImport(
  actor: Actor,
  productionId: string,
  file: { bytes: Uint8Array; name: string },
): Promise<ImportPreview> {
  const scope = await productionFor(actor, productionId, "auditions:plan");
  const sheet = await readSingersSheet(file.bytes, file.name);
  const [problem] = sheet.problems;
  if (problem) {
    const code =
      problem.code === "too-large"
        ? "too-large"
        : problem.code === "not-a-spreadsheet"
          ? "wrong-kind"
          : "refused";
    throw new AppError(code, problem.message);
  }
  const rows = sheet.rows.map(checkRow);
  const emails = rows.flatMap((row) =>
    row.problems.length === 0 && row.values.email ? [row.values.email.trim().toLowerCase()] : [],
  );
  const known =
    emails.length === 0
      ? []
      : await db
          .select({ email: people.email, name: people.name, signUpId: signUps.id })
          .from(people)
          .leftJoin(
            signUps,
            and(eq(signUps.personId, people.id), eq(signUps.productionId, scope.id)),
          )
          .where(and(eq(people.companyId, scope.companyId), inArray(people.email, emails)));
  const byEmail = new Map(known.map((person) => [person.email, person]));
  return {
    unknownColumns: sheet.unknownColumns,
    rows: rows.map((row) => {
      const person = byEmail.get(row.values.email.trim().toLowerCase());
      const becomes =
        row.problems.length > 0
          ? "problem"
          : !person
            ? "new person"
            : person.signUpId === null
              ? "known person"
              : "signed up";
      return {
        ...row,
        becomes,
        knownAs:
          becomes === "problem" || !person || person.name === row.values.name ? null : person.name,
      };
    }),
  };
}

/** The row as it would be saved, checked by the very schema that saving uses. */
function checkRow(row: SingerRow): Omit<ImportRow, "becomes" | "knownAs"> {
  const { low, high, role, ...rest } = row.values;
  const values: SingerRowInput = {
    ...rest,
    asksFor: role ?? null,
    low: low?.midi ?? null,
    high: high?.midi ?? null,
  };
  const problems = row.problems.map((problem) => problem.message);
  if (problems.length === 0) {
    const parsed = singerRowSchema.safeParse(values);
    if (!parsed.success) problems.push(...parsed.error.issues.map((issue) => issue.message));
  }
  return { line: row.line, values, problems };
}

export type Imported = { added: number; newPeople: number; already: number };

/** Signs up the rows that were accepted, in their order. Whoever is signed up already is left as they are, so that a second time adds nobody. */
export async function importSingers(
  actor: Actor,
  input: z.output<typeof importSingersSchema>,
): Promise<Imported> {
  const scope = await productionFor(actor, input.productionId, "auditions:plan");
  try {
    return await inTransaction(async (tx) => {
      let place = await nextPlace(tx, scope.id);
      const done: Imported = { added: 0, newPeople: 0, already: 0 };
      for (const row of input.rows) {
        const taken = await takeSignUp(tx, actor, scope, row, place);
        if (taken.already) {
          done.already += 1;
          continue;
        }
        place += 1;
        done.added += 1;
        if (taken.newPerson) done.newPeople += 1;
      }
      if (done.added > 0) {
        await recordAudit(tx, actor, {
          companyId: scope.companyId,
          productionId: scope.id,
          action: "sign-up.import",
          subjectKind: "production",
          subjectId: scope.id,
          summary: `Imported ${String(done.added)} singers`,
          detail: done,
        });
      }
      return done;
    });
  } catch (error) {
    if (duplicateKey(error) !== null)
      throw new AppError(
        "stale",
        "Someone else added one of these people at the same moment. Import again: nobody goes in twice.",
      );
    throw error;
  }
}

/** The empty form for a list of singers, for those who may import one. */
export async function importTemplate(actor: Actor, productionId: string): Promise<Uint8Array> {
  await productionFor(actor, productionId, "auditions:plan");
  return singersTemplate();
}
