"use client";

import { unstable_rethrow } from "next/navigation";
import { useState, type BaseSyntheticEvent } from "react";
import {
  useForm,
  type DefaultValues,
  type FieldValues,
  type Path,
  type Resolver,
  type UseFormReturn,
} from "react-hook-form";
import type { z } from "zod";
import { LOST_CONNECTION } from "./lost-connection";

/** What a server action gives back: the data, or a code and words for the person. */
export type FormResult<Data> =
  | { ok: true; data: Data }
  | { ok: false; error: { code: string; message: string; fields?: Record<string, string> } };

export type ActionFormOptions<Input extends FieldValues, Output, Data> = {
  /**
   * Fetches the schema the action itself parses with. It is fetched when there is something to check, so that a page is
   * not held up by it.
   */
  schema: () => Promise<z.ZodType<Output, Input>>;
  action: (input: Input) => Promise<FormResult<Data>>;
  defaultValues: DefaultValues<Input>;
  /** After success; the form keeps its values unless this resets it. */
  onDone?: (data: Data, form: UseFormReturn<Input, unknown, Output>) => void | Promise<void>;
};

export type ActionForm<Input extends FieldValues, Output, Data> = {
  form: UseFormReturn<Input, unknown, Output>;
  /** Give it to `<form onSubmit>`. */
  submit: (event?: BaseSyntheticEvent) => Promise<void>;
  pending: boolean;
  /** What stands in the way of the whole form; show it with FormError. */
  formError: string | null;
  /** What the last successful press gave back. */
  data: Data | null;
};

/**
 * Splits an action's messages into those with a field in the form and those without. `names` are
 * the form's top-level fields; a message for "tags.0" belongs to "tags".
 */
export function sortMessages(
  fields: Record<string, string>,
  names: readonly string[],
): { known: [string, string][]; other: string[] } {
  const entries = Object.entries(fields);
  const order = (path: string) => names.indexOf(path.split(".")[0] ?? "");
  return {
    known: entries.filter(([path]) => order(path) >= 0).toSorted(([a], [b]) => order(a) - order(b)),
    other: entries.filter(([path]) => order(path) < 0).map(([, message]) => message),
  };
}

/** Whether this is the router's own exception: a redirect, already on its way and no failure. */
function isRouters(error: unknown): boolean {
  try {
    unstable_rethrow(error);
    return false;
  } catch {
    return true;
  }
}

/** Checks with the schema once it is here. If it cannot be fetched, the action, which checks for itself, says what is wrong. */
function checkWith<Input extends FieldValues, Output>(
  load: () => Promise<z.ZodType<Output, Input>>,
): Resolver<Input, unknown, Output> {
  return async (values, context, options) => {
    let resolve: Resolver<Input, unknown, Output>;
    try {
      const [{ zodResolver }, schema] = await Promise.all([
        import("@hookform/resolvers/zod"),
        load(),
      ]);
      resolve = zodResolver(schema);
    } catch {
      return { values: values as unknown as Output, errors: {} };
    }
    return resolve(values, context, options);
  };
}

/**
 * A form whose one schema is checked in the browser and again by its server action. Whatever goes
 * wrong, what was typed stays: field messages go to their fields and the first of them gets the
 * focus; anything else becomes the form's own message.
 */
export function useActionForm<Input extends FieldValues, Output, Data>({
  schema,
  action,
  defaultValues,
  onDone,
}: ActionFormOptions<Input, Output, Data>): ActionForm<Input, Output, Data> {
  const form = useForm<Input, unknown, Output>({
    resolver: checkWith(schema),
    defaultValues,
    mode: "onTouched",
  });
  const [formError, setFormError] = useState<string | null>(null);
  const [data, setData] = useState<Data | null>(null);

  function show(error: { message: string; fields?: Record<string, string> }) {
    const { known, other } = sortMessages(error.fields ?? {}, Object.keys(form.getValues()));
    known.forEach(([path, message], index) => {
      form.setError(path as Path<Input>, { type: "server", message }, { shouldFocus: index === 0 });
    });
    setFormError(other.length > 0 ? other.join(" ") : error.message);
  }

  async function send() {
    setFormError(null);
    let result: FormResult<Data>;
    try {
      // The action parses for itself, so it gets what was typed, not what the schema made of it.
      result = await action(form.getValues());
    } catch (error) {
      setFormError(isRouters(error) ? null : LOST_CONNECTION);
      return;
    }
    if (!result.ok) {
      show(result.error);
      return;
    }
    setData(result.data);
    await onDone?.(result.data, form);
  }

  const { isSubmitting } = form.formState;
  const handle = form.handleSubmit(send);
  return {
    form,
    submit: async (event) => {
      if (isSubmitting) {
        event?.preventDefault();
        return;
      }
      await handle(event);
    },
    pending: isSubmitting,
    formError,
    data,
  };
}
