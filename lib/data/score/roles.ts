import "server-only";
import { and, eq, sql } from "drizzle-orm";
import type { z } from "zod";
import type { Tx } from "@/db/client";
import { newId } from "@/db/columns";
import { roles } from "@/db/schema";
import { AppError } from "@/lib/errors";
import type { Actor } from "@/lib/permissions/types";
import type { addRoleSchema, changeRoleSchema, roleIdSchema } from "@/lib/schemas/score";
import { recordAudit } from "../audit";
import { productionFor } from "../guard";
import { inTransaction } from "../transaction";
import { lockScore, nextRolePlace, roleIn, roleNamed } from "./scope";

async function assertNameFree(
  tx: Tx,
  productionId: string,
  name: string,
  except: string | null,
): Promise<void> {
  const holder = await roleNamed(tx, productionId, name);
  if (holder === null || holder === except) return;
  throw new AppError("invalid", undefined, {
    fields: { name: "There is a role of this name already. Give this one another name." },
  });
}

/** Adds a role. Returns its id. */
export async function addRole(
  actor: Actor,
  input: z.output<typeof addRoleSchema>,
): Promise<string> {
  const { productionId, ...fields } = input;
  const scope = await productionFor(actor, productionId, "score:change");
  return inTransaction(async (tx) => {
    await lockScore(tx, scope.id);
    await assertNameFree(tx, scope.id, fields.name, null);
    const id = newId();
    await tx
      .insert(roles)
      .values({ id, productionId: scope.id, place: await nextRolePlace(tx, scope.id), ...fields });
    await recordAudit(tx, actor, {
      companyId: scope.companyId,
      productionId: scope.id,
      action: "role.add",
      subjectKind: "role",
      subjectId: id,
      summary: `Added the role ${fields.name}`,
    });
    return id;
  });
}

/** Changes a role. Throws `stale` when someone else changed it since `version` was read. */
export async function changeRole(
  actor: Actor,
  input: z.output<typeof changeRoleSchema>,
): Promise<void> {
  const { productionId, roleId, version, ...fields } = input;
  const scope = await productionFor(actor, productionId, "score:change");
  await inTransaction(async (tx) => {
    await lockScore(tx, scope.id);
    const before = await roleIn(tx, scope.id, roleId);
    await assertNameFree(tx, scope.id, fields.name, before.id);
    const [result] = await tx
      .update(roles)
      .set({ ...fields, version: sql`${roles.version} + 1` })
      .where(
        and(eq(roles.id, before.id), eq(roles.productionId, scope.id), eq(roles.version, version)),
      );
    if (result.affectedRows === 0) throw new AppError("stale");
    await recordAudit(tx, actor, {
      companyId: scope.companyId,
      productionId: scope.id,
      action: "role.change",
      subjectKind: "role",
      subjectId: before.id,
      summary: `Changed the role ${before.name}`,
      detail: {
        before: { name: before.name, needed: before.needed, covers: before.covers },
        after: { name: fields.name, needed: fields.needed, covers: fields.covers },
      },
    });
  });
}

/** Takes a role out; its lines and casting wait with it. `restoreRole` is the way back. */
export async function removeRole(
  actor: Actor,
  input: z.output<typeof roleIdSchema>,
): Promise<void> {
  const scope = await productionFor(actor, input.productionId, "score:change");
  await inTransaction(async (tx) => {
    await lockScore(tx, scope.id);
    const role = await roleIn(tx, scope.id, input.roleId);
    await tx.update(roles).set({ removedAt: new Date() }).where(eq(roles.id, role.id));
    await recordAudit(tx, actor, {
      companyId: scope.companyId,
      productionId: scope.id,
      action: "role.remove",
      subjectKind: "role",
      subjectId: role.id,
      summary: `Removed the role ${role.name}`,
    });
  });
}

/** Puts a removed role back. Throws `invalid` when its name has gone to another meanwhile. */
export async function restoreRole(
  actor: Actor,
  input: z.output<typeof roleIdSchema>,
): Promise<void> {
  const scope = await productionFor(actor, input.productionId, "score:change");
  await inTransaction(async (tx) => {
    await lockScore(tx, scope.id);
    const [role] = await tx
      .select({ id: roles.id, name: roles.name })
      .from(roles)
      .where(and(eq(roles.id, input.roleId), eq(roles.productionId, scope.id)));
    if (!role) throw new AppError("not-found");
    await assertNameFree(tx, scope.id, role.name, role.id);
    await tx.update(roles).set({ removedAt: null }).where(eq(roles.id, role.id));
    await recordAudit(tx, actor, {
      companyId: scope.companyId,
      productionId: scope.id,
      action: "role.restore",
      subjectKind: "role",
      subjectId: role.id,
      summary: `Put back the role ${role.name}`,
    });
  });
}
