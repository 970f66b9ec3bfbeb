import "server-only";
import { and, eq, isNull, max } from "drizzle-orm";
import type { Db, Tx } from "@/db/client";
import { numbers, productions, roles } from "@/db/schema";
import { AppError } from "@/lib/errors";
import type { NumberFields } from "@/lib/schemas/score";

/**
 * Locks the production until the transaction ends: whoever changes its score comes through here first, so that places,
 * labels and names stay one of a kind and two imports of one reading cannot both make a number.
 */
export async function lockScore(tx: Tx, productionId: string): Promise<void> {
  await tx
    .select({ id: productions.id })
    .from(productions)
    .where(eq(productions.id, productionId))
    .for("update");
}

type NumberRow = typeof numbers.$inferSelect;
type RoleRow = typeof roles.$inferSelect;

/** The production's number. Throws `not-found` for one that is removed or of another production. */
export async function numberIn(
  tx: Db | Tx,
  productionId: string,
  numberId: string,
): Promise<NumberRow> {
  const [row] = await tx
    .select()
    .from(numbers)
    .where(
      and(
        eq(numbers.id, numberId),
        eq(numbers.productionId, productionId),
        isNull(numbers.removedAt),
      ),
    );
  if (!row) throw new AppError("not-found");
  return row;
}

/** The production's role. Throws `not-found` for one that is removed or of another production. */
export async function roleIn(tx: Db | Tx, productionId: string, roleId: string): Promise<RoleRow> {
  const [row] = await tx
    .select()
    .from(roles)
    .where(
      and(eq(roles.id, roleId), eq(roles.productionId, productionId), isNull(roles.removedAt)),
    );
  if (!row) throw new AppError("not-found");
  return row;
}

const fold = (text: string): string => text.trim().replace(/\s+/g, " ").toLocaleLowerCase("en");

/** Throws `invalid`, beside the label's field, when another number of the production has this label. */
export async function assertLabelFree(
  tx: Tx,
  productionId: string,
  label: string,
  except: string | null,
): Promise<void> {
  const rows = await tx
    .select({ id: numbers.id, label: numbers.label, title: numbers.title })
    .from(numbers)
    .where(and(eq(numbers.productionId, productionId), isNull(numbers.removedAt)));
  const holder = rows.find((row) => row.id !== except && fold(row.label) === fold(label));
  if (holder) {
    throw new AppError("invalid", undefined, {
      fields: {
        label: `Number ${holder.label} is ${holder.title} already. Give this one another, such as ${holder.label}a.`,
      },
    });
  }
}

/** The id of the production's role of this name, or null. */
export async function roleNamed(
  tx: Tx,
  productionId: string,
  name: string,
): Promise<string | null> {
  const rows = await tx
    .select({ id: roles.id, name: roles.name })
    .from(roles)
    .where(and(eq(roles.productionId, productionId), isNull(roles.removedAt)));
  return rows.find((row) => fold(row.name) === fold(name))?.id ?? null;
}

export async function nextNumberPlace(tx: Tx, productionId: string): Promise<number> {
  const [row] = await tx
    .select({ last: max(numbers.place) })
    .from(numbers)
    .where(eq(numbers.productionId, productionId));
  return (row?.last ?? 0) + 1;
}

export async function nextRolePlace(tx: Tx, productionId: string): Promise<number> {
  const [row] = await tx
    .select({ last: max(roles.place) })
    .from(roles)
    .where(eq(roles.productionId, productionId));
  return (row?.last ?? 0) + 1;
}

/** What a form says of a number, as its row keeps it. */
export function numberColumns(fields: NumberFields) {
  return {
    label: fields.label,
    title: fields.title,
    keyName: fields.key?.name ?? null,
    keyFifths: fields.key?.fifths ?? fields.keyFifths,
    metre: fields.metre,
    tempo: fields.tempo,
    bars: fields.bars,
    seconds: fields.length,
  };
}
