"use client";

import { useRouter } from "next/navigation";
import { useState } from "react";
import { ActionForm } from "@/components/forms/action-form";
import { useActionForm } from "@/components/forms/use-action-form";
import { Button } from "@/components/ui/button";
import { Checkbox } from "@/components/ui/checkbox";
import { Dialog } from "@/components/ui/dialog";
import { Field } from "@/components/ui/field";
import { Input } from "@/components/ui/input";
import { showToast } from "@/components/ui/toast-store";
import { VisuallyHidden } from "@/components/ui/visually-hidden";
import { addRoom, changeRoom } from "../../actions";

type Room = { id: string; name: string; hasPiano: boolean };
type Venue = { id: string; name: string };

/** Adds a room to a venue, or changes the one given. */
export function RoomDialog({
  companyId,
  venue,
  room,
}: {
  companyId: string;
  venue: Venue;
  room?: Room;
}) {
  const [open, setOpen] = useState(false);
  const close = () => setOpen(false);
  return (
    <Dialog
      open={open}
      onOpenChange={setOpen}
      trigger={
        room ? (
          <Button kind="quiet" size="small">
            Change<VisuallyHidden> {`${room.name} at ${venue.name}`}</VisuallyHidden>
          </Button>
        ) : (
          <Button size="small">
            Add a room<VisuallyHidden> {`at ${venue.name}`}</VisuallyHidden>
          </Button>
        )
      }
      title={room ? `Change ${room.name}` : `Add a room at ${venue.name}`}
    >
      {room ? (
        <ChangeRoom companyId={companyId} room={room} onDone={close} />
      ) : (
        <AddRoom companyId={companyId} venueId={venue.id} onDone={close} />
      )}
    </Dialog>
  );
}

function AddRoom({
  companyId,
  venueId,
  onDone,
}: {
  companyId: string;
  venueId: string;
  onDone: () => void;
}) {
  const router = useRouter();
  const state = useActionForm({
    schema: () => import("@/lib/schemas/rooms").then((m) => m.addRoomSchema),
    action: addRoom,
    defaultValues: { companyId, venueId, name: "", hasPiano: true },
    onDone: (_, form) => {
      showToast({ title: `${form.getValues("name")} is added.` });
      onDone();
      router.refresh();
    },
  });
  const { register, formState } = state.form;
  return (
    <ActionForm state={state} submitLabel="Add the room">
      <Field label="Name" error={formState.errors.name?.message}>
        <Input maxLength={120} autoComplete="off" {...register("name")} />
      </Field>
      <Checkbox label="There is a piano in it" {...register("hasPiano")} />
    </ActionForm>
  );
}

function ChangeRoom({
  companyId,
  room,
  onDone,
}: {
  companyId: string;
  room: Room;
  onDone: () => void;
}) {
  const router = useRouter();
  const state = useActionForm({
    schema: () => import("@/lib/schemas/rooms").then((m) => m.changeRoomSchema),
    action: changeRoom,
    defaultValues: { companyId, roomId: room.id, name: room.name, hasPiano: room.hasPiano },
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
        <Input maxLength={120} autoComplete="off" {...register("name")} />
      </Field>
      <Checkbox label="There is a piano in it" {...register("hasPiano")} />
    </ActionForm>
  );
}
