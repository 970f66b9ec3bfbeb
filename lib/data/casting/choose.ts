import "server-only";
import { and, eq, isNull, sql } from "drizzle-orm";
import type { z } from "zod";
import { choices, people, positions, productions, roles } from "@/db/schema";
import { recordAudit } from "@/lib/data/audit";
import { productionFor } from "@/lib/data/guard";
import { duplicateKey, inTransaction } from "@/lib/data/transaction";
import { AppError } from "@/lib/errors";
import type { Actor } from "@/lib/permissions/types";
import type { chooseSchema, publishCastSchema } from "@/lib/schemas/casting";

/**
 * Considers or casts a singer in a role, or takes the choice back. A part for one person takes one principal: the one who
 * has it is named. Throws `stale` when someone else changed the choice since `version` was read.
 */
export async function choose(actor: Actor, input: z.output<typeof chooseSchema>): Promise<void> {
  const scope = await productionFor(actor, input.productionId, "casting:choose");
  try {
    await inTransaction(async (tx) => {
      // The role's row is what two people casting it at once have to share.
      const [role] = await tx
        .select({ id: roles.id, name: roles.name, needed: roles.needed })
        .from(roles)
        .where(
          and(
            eq(roles.id, input.roleId),
            eq(roles.productionId, scope.id),
            isNull(roles.removedAt),
          ),
        )
        .for("update");
      const [person] = await tx
        .select({ name: people.name })
        .from(people)
        .innerJoin(
          positions,
          and(
            eq(positions.personId, people.id),
            eq(positions.productionId, scope.id),
            eq(positions.kind, "actor"),
            isNull(positions.endedAt),
          ),
        )
        .where(and(eq(people.id, input.personId), eq(people.companyId, scope.companyId)));
      if (!role || !person) throw new AppError("not-found");
      const all = await tx
        .select({
          id: choices.id,
          personId: choices.personId,
          name: people.name,
          state: choices.state,
          kind: choices.kind,
          version: choices.version,
        })
        .from(choices)
        .innerJoin(people, eq(people.id, choices.personId))
        .where(eq(choices.roleId, role.id));
      const present = all.find((choice) => choice.personId === input.personId);
      if ((present?.version ?? 0) !== input.version) {
        throw new AppError(
          "stale",
          `${person.name} as ${role.name} was changed by someone else: now ${present ? present.state : "not chosen"}. Look again, then choose.`,
        );
      }
      if (input.state === "cast" && input.kind === "principal") {
        const principals = all.filter(
          (c) => c.state === "cast" && c.kind === "principal" && c.personId !== input.personId,
        );
        if (principals.length >= role.needed) {
          const holders = principals.map((c) => c.name).join(", ");
          throw new AppError(
            "taken",
            `${role.name} is cast: ${holders}. Take that back first, or make ${person.name} a cover or an alternate.`,
          );
        }
      }
      if (input.state === "none") {
        if (present) await tx.delete(choices).where(eq(choices.id, present.id));
      } else if (present) {
        await tx
          .update(choices)
          .set({
            state: input.state,
            kind: input.kind,
            chosenBy: actor.userId,
            chosenAt: new Date(),
            version: sql`${choices.version} + 1`,
          })
          .where(eq(choices.id, present.id));
      } else {
        await tx.insert(choices).values({
          productionId: scope.id,
          roleId: role.id,
          personId: input.personId,
          state: input.state,
          kind: input.kind,
          chosenBy: actor.userId,
        });
      }
      await recordAudit(tx, actor, {
        companyId: scope.companyId,
        productionId: scope.id,
        action: "casting.choose",
        subjectKind: "role",
        subjectId: role.id,
        summary: `${person.name} as ${role.name}: ${input.state === "none" ? "taken back" : `${input.state} (${input.kind})`}`,
        detail: {
          before: present ? { state: present.state, kind: present.kind } : null,
          after: input.state === "none" ? null : { state: input.state, kind: input.kind },
        },
      });
    });
  } catch (error) {
    if (duplicateKey(error) !== null) throw new AppError("stale");
    throw error;
  }
}

/** Publishes the cast list (from then on the stage manager sees the grid), or takes it back. */
export async function publishCast(
  actor: Actor,
  input: z.output<typeof publishCastSchema>,
): Promise<void> {
  const scope = await productionFor(actor, input.productionId, "casting:choose");
  await inTransaction(async (tx) => {
    const cast = await tx
      .select({ id: choices.id })
      .from(choices)
      .where(and(eq(choices.productionId, scope.id), eq(choices.state, "cast")))
      .limit(1);
    if (input.published && cast.length === 0)
      throw new AppError("refused", "Nobody is cast yet. Cast someone, then publish.");
    await tx
      .update(productions)
      .set({ castPublishedAt: input.published ? new Date() : null })
      .where(eq(productions.id, scope.id));
    await recordAudit(tx, actor, {
      companyId: scope.companyId,
      productionId: scope.id,
      action: "casting.publish",
      subjectKind: "production",
      subjectId: scope.id,
      summary: input.published ? "Published the cast list" : "Took the cast list back",
    });
  });
}
