"use client";

import { useRouter } from "next/navigation";
import { useState, useTransition } from "react";
import type { Route } from "next";
import { Dialog } from "@/components/ui/dialog";
import { Field } from "@/components/ui/field";
import { Input } from "@/components/ui/input";
import { PendingButton } from "@/components/ui/pending-button";
import { uploadScore } from "@/lib/client/score";
import type { LazyDialogProps } from "./lazy-dialog-button";

type Props = LazyDialogProps & { productionId: string };

/** Sends a score to be read. What it would change is shown next, before anything changes. */
export default function ReadScoreDialog({ productionId, ...dialog }: Props) {
  const router = useRouter();
  const [file, setFile] = useState<File | null>(null);
  const [problem, setProblem] = useState<string | null>(null);
  const [sending, setSending] = useState(false);
  const [leaving, startLeaving] = useTransition();

  async function send() {
    if (!file) {
      setProblem("Choose a .musicxml, .xml or .mxl file first.");
      return;
    }
    setSending(true);
    setProblem(null);
    try {
      const { scoreId } = await uploadScore(productionId, file);
      startLeaving(() => {
        router.push(`/productions/${productionId}/score/read/${scoreId}` as Route);
      });
    } catch (error) {
      setProblem(
        error instanceof Error ? error.message : "The file could not be sent. Try it again.",
      );
    } finally {
      setSending(false);
    }
  }

  return (
    <Dialog
      {...dialog}
      title="Read a score"
      description="One number as your notation program exports it: MusicXML, up to 20 MB. You see what it will change before it does."
    >
      <form
        noValidate
        className="flex flex-col gap-4"
        onSubmit={(event) => {
          event.preventDefault();
          if (!sending && !leaving) void send();
        }}
      >
        <Field
          label="File"
          hint=".musicxml, .xml or .mxl"
          error={problem ? <span role="alert">{problem}</span> : undefined}
        >
          <Input
            type="file"
            accept=".musicxml,.xml,.mxl,application/vnd.recordare.musicxml,application/vnd.recordare.musicxml+xml"
            onChange={(event) => {
              setFile(event.currentTarget.files?.[0] ?? null);
              setProblem(null);
            }}
          />
        </Field>
        <div>
          <PendingButton kind="primary" pending={sending || leaving} pendingLabel="Reading">
            {problem && file ? "Try it again" : "Read it"}
          </PendingButton>
        </div>
      </form>
    </Dialog>
  );
}
