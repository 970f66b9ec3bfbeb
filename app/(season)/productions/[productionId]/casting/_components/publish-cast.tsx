"use client";

import { useQueryClient } from "@tanstack/react-query";
import { Button } from "@/components/ui/button";
import { Confirm } from "@/components/ui/confirm";
import { showToast } from "@/components/ui/toast-store";
import { castingQuery, openRoles, type Grid } from "@/lib/client/casting";
import { orRefuse } from "@/lib/client/refusal";
import { publishCast } from "../actions";

/** Lets the cast list out, or takes it back; asks once. */
export function PublishCast({ productionId, grid }: { productionId: string; grid: Grid }) {
  const client = useQueryClient();
  const open = openRoles(grid);

  async function publish(published: boolean) {
    try {
      await orRefuse(publishCast({ productionId, published }));
      showToast({
        title: published ? "The cast list is out." : "The cast list is taken back.",
      });
      return { ok: true };
    } catch (error) {
      showToast({ tone: "error", title: error instanceof Error ? error.message : String(error) });
      return { ok: false };
    } finally {
      await client.invalidateQueries({ queryKey: castingQuery(productionId).queryKey });
    }
  }

  if (grid.castPublished) {
    return (
      <Confirm
        trigger={<Button>Take the cast list back</Button>}
        title="Take the cast list back?"
        confirmLabel="Take it back"
        cancelLabel="Leave it out"
        onConfirm={() => publish(false)}
      >
        <p>
          The stage manager no longer sees the grid. What is chosen stays as it is, and the list can
          go out again at any time.
        </p>
      </Confirm>
    );
  }
  return (
    <Confirm
      trigger={<Button kind="primary">Publish the cast list</Button>}
      title="Publish the cast list?"
      confirmLabel="Publish"
      confirmKind="primary"
      cancelLabel="Not yet"
      onConfirm={() => publish(true)}
    >
      <p>From then on the stage manager sees the grid too. It can be taken back.</p>
      {open.length > 0 && (
        <p className="mt-2">Not cast yet: {open.map((role) => role.name).join(", ")}.</p>
      )}
    </Confirm>
  );
}
