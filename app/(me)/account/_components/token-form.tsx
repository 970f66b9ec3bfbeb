"use client";

import { ActionForm } from "@/components/forms/action-form";
import { useActionForm } from "@/components/forms/use-action-form";
import { Button } from "@/components/ui/button";
import { Field } from "@/components/ui/field";
import { Input } from "@/components/ui/input";
import { Notice } from "@/components/ui/notice";
import { showToast } from "@/components/ui/toast-store";
import { createToken } from "../actions";

async function copy(token: string): Promise<void> {
  try {
    await navigator.clipboard.writeText(token);
    showToast({ title: "Copied." });
  } catch {
    showToast({
      title: "The browser did not allow it: select the token and copy it.",
      tone: "error",
    });
  }
}

/** Makes a token and shows it, this once. */
export function TokenForm() {
  const state = useActionForm({
    schema: () => import("@/lib/schemas/account").then((m) => m.createTokenSchema),
    action: createToken,
    defaultValues: { label: "" },
    onDone: (_data, form) => form.reset(),
  });
  const { register, formState } = state.form;
  return (
    <>
      {state.data !== null && (
        <Notice
          tone="done"
          live
          title="Copy it now: it is shown this once."
          className="mb-4"
          actions={
            <Button
              size="small"
              onClick={() => {
                if (state.data !== null) void copy(state.data.token);
              }}
            >
              Copy the token
            </Button>
          }
        >
          <code className="mt-1 block break-all select-all">{state.data.token}</code>
        </Notice>
      )}
      <ActionForm state={state} submitLabel="Make a token">
        <Field
          label="What is it for?"
          hint="For instance: the spreadsheet on my laptop"
          error={formState.errors.label?.message}
        >
          <Input autoComplete="off" {...register("label")} />
        </Field>
      </ActionForm>
    </>
  );
}
