"use client";

import type { FieldErrors, UseFormRegister } from "react-hook-form";
import { Field } from "@/components/ui/field";
import { Input } from "@/components/ui/input";

/** What the fields of a number hold: text as typed. */
export type NumberFieldValues = {
  label: string;
  title: string;
  key: string;
  keyFifths: string;
  metre: string;
  tempo: string;
  bars: string;
  length: string;
};

type Props = {
  register: UseFormRegister<NumberFieldValues>;
  errors: FieldErrors<NumberFieldValues>;
  /** Says what the score shows, where the key is only a guess. */
  keyHint?: string;
};

/** The fields of a number, in a dialog or when a score is read. */
export function NumberFields({ register, errors, keyHint }: Props) {
  return (
    <>
      <div className="grid grid-cols-[6rem_minmax(0,1fr)] gap-4">
        <Field label="Number" error={errors.label?.message}>
          <Input autoComplete="off" {...register("label")} />
        </Field>
        <Field label="Title" error={errors.title?.message}>
          <Input autoComplete="off" {...register("title")} />
        </Field>
      </div>
      <div className="grid grid-cols-2 items-start gap-4 sm:grid-cols-3">
        <Field
          label="Key"
          optional
          error={errors.key?.message}
          hint={keyHint ?? "Small letters are minor"}
        >
          <Input autoComplete="off" {...register("key")} />
        </Field>
        <Field label="Metre" optional error={errors.metre?.message} hint="Such as 3/4">
          <Input autoComplete="off" {...register("metre")} />
        </Field>
        <Field label="Tempo" optional error={errors.tempo?.message} hint="Crotchets a minute">
          <Input inputMode="numeric" autoComplete="off" {...register("tempo")} />
        </Field>
        <Field label="Bars" optional error={errors.bars?.message}>
          <Input inputMode="numeric" autoComplete="off" {...register("bars")} />
        </Field>
        <Field label="Length" optional error={errors.length?.message}>
          <Input placeholder="3:20" autoComplete="off" {...register("length")} />
        </Field>
      </div>
    </>
  );
}
