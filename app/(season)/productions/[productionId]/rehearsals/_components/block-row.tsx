"use client";

import { useFormContext } from "react-hook-form";
import { RehearsalMark } from "@/components/layout/rehearsal-mark";
import { Chip } from "@/components/ui/chip";
import { Field } from "@/components/ui/field";
import { CloseIcon } from "@/components/ui/icons";
import { IconButton } from "@/components/ui/icon-button";
import { Input } from "@/components/ui/input";
import { BLOCK_KIND_NAMES } from "@/lib/calls/call-kinds";
import type { CheckedBlock } from "@/lib/data/calls/check";
import type { CallChoices } from "@/lib/data/calls/choices";
import type { BlockFields, CallFields } from "./call-fields";

type Props = {
  index: number;
  count: number;
  block: BlockFields;
  number: CallChoices["numbers"][number] | undefined;
  check: CheckedBlock | undefined;
  onMove: (to: number) => void;
  onRemove: () => void;
};

/** One block: what it is, how long, who it calls, and the buttons that move it. */
export function BlockRow({ index, count, block, number, check, onMove, onRemove }: Props) {
  const { register, formState } = useFormContext<CallFields>();
  const errors = formState.errors.blocks?.[index];
  const name = number?.title ?? (block.title === "" ? BLOCK_KIND_NAMES[block.kind] : block.title);
  return (
    <li className="grid gap-x-4 gap-y-2 border-b border-rule py-3 sm:grid-cols-[minmax(0,1fr)_auto]">
      <div className="flex min-w-0 flex-col gap-2">
        <p className="flex flex-wrap items-baseline gap-x-3 gap-y-1">
          <span className="w-24 shrink-0 text-sm font-bold">
            {check ? `${check.from}–${check.to}` : ""}
          </span>
          {number && <RehearsalMark>{number.label}</RehearsalMark>}
          <span className="font-serif text-lg leading-tight">{name}</span>
        </p>
        <div className="flex flex-wrap gap-3">
          <Field label="Minutes" error={errors?.minutes?.message} className="w-24">
            <Input inputMode="numeric" {...register(`blocks.${index}.minutes`)} />
          </Field>
          {(block.kind === "scene" || block.kind === "warm_up") && (
            <Field label="Title" optional className="min-w-40 flex-1">
              <Input {...register(`blocks.${index}.title`)} />
            </Field>
          )}
          {block.kind === "number" && (
            <Field label="Bars" optional error={errors?.bars?.message} className="w-32">
              <Input placeholder="80–140" {...register(`blocks.${index}.bars`)} />
            </Field>
          )}
          {block.kind !== "break" && (
            <Field
              label="What of it"
              optional
              error={errors?.detail?.message}
              className="min-w-40 flex-1"
            >
              <Input
                placeholder="such as parts, then together"
                {...register(`blocks.${index}.detail`)}
              />
            </Field>
          )}
        </div>
        {errors?.numberId && (
          <p className="text-sm font-bold text-vermilion">{errors.numberId.message}</p>
        )}
        {check && block.kind !== "break" && <Called check={check} />}
      </div>
      <div className="flex items-start gap-1">
        <IconButton
          label={`Move ${name} earlier`}
          data-move="up"
          disabled={index === 0}
          onClick={() => onMove(index - 1)}
        >
          <span aria-hidden="true">↑</span>
        </IconButton>
        <IconButton
          label={`Move ${name} later`}
          data-move="down"
          disabled={index === count - 1}
          onClick={() => onMove(index + 1)}
        >
          <span aria-hidden="true">↓</span>
        </IconButton>
        <IconButton label={`Take ${name} out`} onClick={onRemove}>
          <CloseIcon />
        </IconButton>
      </div>
    </li>
  );
}

function Called({ check }: { check: CheckedBlock }) {
  const called = check.called.filter((person) => !person.excused);
  const excused = check.called.filter((person) => person.excused);
  return (
    <p className="text-sm text-ink-2">
      {called.length === 0
        ? "Nobody is called."
        : `${String(called.length)} called: ${called.map((person) => person.name).join(", ")}.`}
      {excused.length > 0 && ` Excused: ${excused.map((person) => person.name).join(", ")}.`}
      {check.uncastRoles.length > 0 && (
        <>
          {" "}
          <Chip tone="stretch">Not cast yet: {check.uncastRoles.join(", ")}</Chip>
        </>
      )}
    </p>
  );
}
