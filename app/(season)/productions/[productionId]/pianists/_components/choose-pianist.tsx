"use client";

import { useRouter } from "next/navigation";
import { useState } from "react";
import { Field } from "@/components/ui/field";
import { PendingButton } from "@/components/ui/pending-button";
import { Select } from "@/components/ui/select";
import { assignCallPianist } from "../actions";

type Props = {
  productionId: string;
  callId: string;
  version: number;
  /** Names the call for those who listen: "Music call, 18:30". */
  call: string;
  current: string | null;
  pianists: readonly { personId: string; name: string }[];
};

/** Has somebody play for a call; a refusal stays beside the choice until it is changed. */
export function ChoosePianist({ productionId, callId, version, call, current, pianists }: Props) {
  const router = useRouter();
  const [personId, setPersonId] = useState(current ?? "");
  const [pending, setPending] = useState(false);
  const [error, setError] = useState<string | null>(null);

  async function assign() {
    setPending(true);
    setError(null);
    const result = await assignCallPianist({ productionId, callId, version, personId }).catch(
      () => null,
    );
    setPending(false);
    if (!result?.ok) setError(result?.error.message ?? "The server did not answer. Try again.");
    router.refresh();
  }

  return (
    <div className="flex flex-wrap items-end gap-2">
      <Field label={`Plays for ${call}`} labelHidden error={error ?? undefined} className="w-52">
        <Select value={personId} onChange={(event) => setPersonId(event.currentTarget.value)}>
          <option value="">Nobody</option>
          {pianists.map((pianist) => (
            <option key={pianist.personId} value={pianist.personId}>
              {pianist.name}
            </option>
          ))}
        </Select>
      </Field>
      <PendingButton
        pending={pending}
        aria-disabled={personId === (current ?? "") || undefined}
        onClick={() => personId !== (current ?? "") && void assign()}
      >
        Assign
      </PendingButton>
    </div>
  );
}
