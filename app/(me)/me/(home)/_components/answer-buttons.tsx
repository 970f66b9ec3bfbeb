"use client";

import { useRouter } from "next/navigation";
import { useState, useTransition } from "react";
import { FormError } from "@/components/forms/form-error";
import { LOST_CONNECTION } from "@/components/forms/lost-connection";
import { PendingButton } from "@/components/ui/pending-button";
import { showToast } from "@/components/ui/toast-store";
import type { ActionResult } from "@/lib/errors";

export type Answer = {
  label: string;
  /** The act, bound to what it answers. */
  action: () => Promise<ActionResult<unknown>>;
  /** Said when it is done: "Confirmed." */
  said: string;
};

/** One or two thumb-sized answers, the first the one most people give. */
export function AnswerButtons({ answers }: { answers: readonly Answer[] }) {
  const router = useRouter();
  const [pending, startTransition] = useTransition();
  const [pressed, setPressed] = useState<string | null>(null);
  const [error, setError] = useState<string | null>(null);

  function give(answer: Answer) {
    if (pending) return;
    setPressed(answer.label);
    setError(null);
    startTransition(async () => {
      try {
        const result = await answer.action();
        if (!result.ok) {
          setError(result.error.message);
          return;
        }
        showToast({ title: answer.said });
        // The next decision, if there is one, comes up by itself.
        router.replace("/me");
      } catch {
        setError(LOST_CONNECTION);
      }
    });
  }

  return (
    <div className="mt-4 flex flex-col gap-3">
      <FormError message={error} />
      <div className="flex gap-2.5">
        {answers.map((answer, index) => (
          <PendingButton
            key={answer.label}
            type="button"
            kind={index === 0 ? "primary" : "secondary"}
            size="large"
            pending={pending && pressed === answer.label}
            pendingLabel="Sending your answer"
            className="flex-1"
            onClick={() => give(answer)}
          >
            {answer.label}
          </PendingButton>
        ))}
      </div>
    </div>
  );
}
