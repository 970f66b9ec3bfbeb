"use client";

import { useState } from "react";
import { useFormContext, useWatch } from "react-hook-form";
import { SectionTitle } from "@/components/layout/page-title";
import { Button } from "@/components/ui/button";
import { Field } from "@/components/ui/field";
import { CloseIcon } from "@/components/ui/icons";
import { IconButton } from "@/components/ui/icon-button";
import { Input } from "@/components/ui/input";
import { Select } from "@/components/ui/select";
import { BLOCK_KIND_NAMES } from "@/lib/calls/call-kinds";
import type { CallCheck } from "@/lib/data/calls/check";
import type { CallChoices } from "@/lib/data/calls/choices";
import type { CallFields, HandFields } from "./call-fields";

/** Who is called extra and who is excused, each with the reason. */
export function HandChanges({ choices, check }: { choices: CallChoices; check: CallCheck | null }) {
  const { control, getValues, setValue, formState } = useFormContext<CallFields>();
  const [hand, blocks] = useWatch({ control, name: ["hand", "blocks"] });
  const [act, setAct] = useState<HandFields["act"]>("call");
  const [personId, setPersonId] = useState("");
  const [key, setKey] = useState("");
  const [reason, setReason] = useState("");
  const [missing, setMissing] = useState(false);

  const needed = new Map(
    (check?.blocks ?? []).flatMap((block) =>
      block.called.map((person) => [person.personId, person.name]),
    ),
  );
  const offered =
    act === "call"
      ? choices.people.filter(({ id }) => !needed.has(id))
      : [...needed].map(([id, name]) => ({ id, name }));
  const nameOf = (id: string) =>
    choices.people.find((person) => person.id === id)?.name ?? needed.get(id) ?? "Somebody";
  const blockName = (blockKey: string) => {
    const block = blocks.find((one) => one.key === blockKey);
    if (!block) return "";
    const number = choices.numbers.find(({ id }) => id === block.numberId);
    return number ? `${number.label} ${number.title}` : block.title || BLOCK_KIND_NAMES[block.kind];
  };

  function write(next: HandFields[]) {
    setValue("hand", next, { shouldDirty: true });
  }

  function add() {
    if (personId === "" || reason.trim() === "") {
      setMissing(true);
      return;
    }
    write([
      ...getValues("hand"),
      { personId, act, reason: reason.trim(), keys: key === "" ? [] : [key] },
    ]);
    setPersonId("");
    setReason("");
    setMissing(false);
  }

  return (
    <section aria-labelledby="by-hand">
      <SectionTitle id="by-hand" ruled>
        Changed by hand
      </SectionTitle>
      {hand.length === 0 ? (
        <p className="border-b border-rule py-3 text-sm text-ink-2">
          Nothing: the call follows the score and the casting.
        </p>
      ) : (
        <ul>
          {hand.map((change, index) => (
            <li
              key={`${change.act} ${change.personId} ${String(index)}`}
              className="flex items-start justify-between gap-3 border-b border-rule py-2 text-sm"
            >
              <span className="min-w-0 pt-1">
                <strong>{nameOf(change.personId)}</strong> is{" "}
                {change.act === "call" ? "called" : "excused"}
                {change.keys.length === 0
                  ? ""
                  : ` for ${change.keys.map(blockName).filter(Boolean).join(", ")}`}
                : {change.reason}
              </span>
              <IconButton
                label={`Take back: ${nameOf(change.personId)}`}
                onClick={() => write(hand.filter((_, place) => place !== index))}
              >
                <CloseIcon />
              </IconButton>
            </li>
          ))}
        </ul>
      )}
      {formState.errors.hand && (
        <p role="alert" className="mt-2 text-sm font-bold text-vermilion">
          {formState.errors.hand.message ?? "Each change needs a reason."}
        </p>
      )}
      {(check?.covers.length ?? 0) > 0 && (
        <div className="mt-3 flex flex-wrap items-center gap-2 text-sm">
          <span className="text-ink-2">Covers who could come:</span>
          {check?.covers.map((cover) => (
            <Button
              key={`${cover.personId} ${cover.role}`}
              size="small"
              onClick={() =>
                write([
                  ...getValues("hand"),
                  {
                    personId: cover.personId,
                    act: "call",
                    reason: `Cover of ${cover.role}`,
                    keys: cover.keys,
                  },
                ])
              }
            >
              Call {cover.name} for {cover.role}
            </Button>
          ))}
        </div>
      )}
      <div className="mt-4 grid items-end gap-3 sm:grid-cols-2 xl:grid-cols-5">
        <Field label="Change">
          <Select
            value={act}
            onChange={(event) => {
              setAct(event.currentTarget.value === "excuse" ? "excuse" : "call");
              setPersonId("");
            }}
          >
            <option value="call">Call someone extra</option>
            <option value="excuse">Excuse someone</option>
          </Select>
        </Field>
        <Field label="Person" error={missing && personId === "" ? "Choose a person." : undefined}>
          <Select value={personId} onChange={(event) => setPersonId(event.currentTarget.value)}>
            <option value="">Choose</option>
            {offered.map((person) => (
              <option key={person.id} value={person.id}>
                {person.name}
              </option>
            ))}
          </Select>
        </Field>
        <Field label="For">
          <Select value={key} onChange={(event) => setKey(event.currentTarget.value)}>
            <option value="">The whole call</option>
            {blocks
              .filter((block) => block.kind !== "break")
              .map((block) => (
                <option key={block.key} value={block.key}>
                  {blockName(block.key)}
                </option>
              ))}
          </Select>
        </Field>
        <Field
          label="Reason"
          error={missing && reason.trim() === "" ? "Write a reason." : undefined}
        >
          <Input
            value={reason}
            maxLength={200}
            onChange={(event) => setReason(event.currentTarget.value)}
          />
        </Field>
        <Button onClick={add}>Add the change</Button>
      </div>
    </section>
  );
}
