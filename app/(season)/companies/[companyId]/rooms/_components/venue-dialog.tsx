"use client";

import { useRouter } from "next/navigation";
import { useState } from "react";
import { ActionForm } from "@/components/forms/action-form";
import { useActionForm } from "@/components/forms/use-action-form";
import { Button } from "@/components/ui/button";
import { Dialog } from "@/components/ui/dialog";
import { Field } from "@/components/ui/field";
import { Input } from "@/components/ui/input";
import { showToast } from "@/components/ui/toast-store";
import { VisuallyHidden } from "@/components/ui/visually-hidden";
import { addVenue, changeVenue } from "../../actions";

type Venue = { id: string; name: string; address: string };

/** Adds a venue, or changes the one given. */
export function VenueDialog({ companyId, venue }: { companyId: string; venue?: Venue }) {
  const [open, setOpen] = useState(false);
  return (
    <Dialog
      open={open}
      onOpenChange={setOpen}
      trigger={
        venue ? (
          <Button kind="quiet" size="small">
            Change<VisuallyHidden> {venue.name}</VisuallyHidden>
          </Button>
        ) : (
          <Button kind="primary">Add a venue</Button>
        )
      }
      title={venue ? `Change ${venue.name}` : "Add a venue"}
    >
      {venue ? (
        <ChangeVenue companyId={companyId} venue={venue} onDone={() => setOpen(false)} />
      ) : (
        <AddVenue companyId={companyId} onDone={() => setOpen(false)} />
      )}
    </Dialog>
  );
}

function AddVenue({ companyId, onDone }: { companyId: string; onDone: () => void }) {
  const router = useRouter();
  const state = useActionForm({
    schema: () => import("@/lib/schemas/rooms").then((m) => m.addVenueSchema),
    action: addVenue,
    defaultValues: { companyId, name: "", address: "" },
    onDone: (_, form) => {
      showToast({ title: `${form.getValues("name")} is added.` });
      onDone();
      router.refresh();
    },
  });
  const { register, formState } = state.form;
  return (
    <ActionForm state={state} submitLabel="Add the venue">
      <Field label="Name" error={formState.errors.name?.message}>
        <Input maxLength={160} autoComplete="off" {...register("name")} />
      </Field>
      <Field label="Address" optional error={formState.errors.address?.message}>
        <Input maxLength={255} autoComplete="off" {...register("address")} />
      </Field>
    </ActionForm>
  );
}

function ChangeVenue({
  companyId,
  venue,
  onDone,
}: {
  companyId: string;
  venue: Venue;
  onDone: () => void;
}) {
  const router = useRouter();
  const state = useActionForm({
    schema: () => import("@/lib/schemas/rooms").then((m) => m.changeVenueSchema),
    action: changeVenue,
    defaultValues: { companyId, venueId: venue.id, name: venue.name, address: venue.address },
    onDone: (_, form) => {
      showToast({ title: `${form.getValues("name")} is changed.` });
      onDone();
      router.refresh();
    },
  });
  const { register, formState } = state.form;
  return (
    <ActionForm state={state} submitLabel="Save">
      <Field label="Name" error={formState.errors.name?.message}>
        <Input maxLength={160} autoComplete="off" {...register("name")} />
      </Field>
      <Field label="Address" optional error={formState.errors.address?.message}>
        <Input maxLength={255} autoComplete="off" {...register("address")} />
      </Field>
    </ActionForm>
  );
}
