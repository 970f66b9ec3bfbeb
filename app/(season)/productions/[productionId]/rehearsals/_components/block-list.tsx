"use client";

import { useRef, useState } from "react";
import { useFormContext, useWatch } from "react-hook-form";
import { SectionTitle } from "@/components/layout/page-title";
import { Button } from "@/components/ui/button";
import { Field } from "@/components/ui/field";
import { Select } from "@/components/ui/select";
import type { CallChoices } from "@/lib/data/calls/choices";
import type { CallCheck } from "@/lib/data/calls/check";
import { BlockRow } from "./block-row";
import type { BlockFields, CallFields } from "./call-fields";
import { newBlock } from "./call-fields";

/** The blocks of a call in running order: added from the score, and moved with buttons that a keyboard reaches. */
export function BlockList({ choices, check }: { choices: CallChoices; check: CallCheck | null }) {
  const { control, getValues, setValue, formState } = useFormContext<CallFields>();
  const blocks = useWatch({ control, name: "blocks" });
  const [chosen, setChosen] = useState("");
  const [said, setSaid] = useState("");
  const list = useRef<HTMLOListElement>(null);
  const { blocks: errors } = formState.errors;
  const error = errors?.message ?? errors?.root?.message;

  function write(next: BlockFields[], message: string) {
    setValue("blocks", next, { shouldDirty: true, shouldValidate: formState.isSubmitted });
    setSaid(message);
  }

  function add(kind: BlockFields["kind"], numberId = "") {
    const now = getValues("blocks");
    write([...now, newBlock(now, kind, numberId)], `Added as block ${String(now.length + 1)}.`);
  }

  function move(from: number, to: number) {
    const next = [...getValues("blocks")];
    const [block] = next.splice(from, 1);
    if (!block) return;
    next.splice(to, 0, block);
    write(next, `Now block ${String(to + 1)} of ${String(next.length)}.`);
    // The button goes with its block: it keeps the focus, or hands it to its neighbour at the end of the list.
    requestAnimationFrame(() => {
      const row = list.current?.children[to];
      const button = row?.querySelector<HTMLButtonElement>(
        `[data-move="${to < from ? "up" : "down"}"]:not(:disabled), [data-move]:not(:disabled)`,
      );
      button?.focus();
    });
  }

  return (
    <section aria-labelledby="blocks">
      <SectionTitle id="blocks" ruled>
        Blocks
      </SectionTitle>
      {blocks.length === 0 && (
        <p className="border-b border-rule py-4 text-ink-2">
          Add numbers from the score in the order you want them. Who is needed follows from who
          sings in each.
        </p>
      )}
      <ol ref={list} className="flex flex-col">
        {blocks.map((block, index) => (
          <BlockRow
            key={block.key}
            index={index}
            count={blocks.length}
            block={block}
            number={choices.numbers.find(({ id }) => id === block.numberId)}
            check={check?.blocks.find(({ key }) => key === block.key)}
            onMove={(to) => move(index, to)}
            onRemove={() =>
              write(
                blocks.filter(({ key }) => key !== block.key),
                "Taken out.",
              )
            }
          />
        ))}
      </ol>
      <p role="status" className="sr-only">
        {said}
      </p>
      {error !== undefined && (
        <p role="alert" className="mt-2 text-sm font-bold text-vermilion">
          {error}
        </p>
      )}
      <div className="mt-4 flex flex-wrap items-end gap-3">
        <Field label="Number" className="w-full max-w-xs">
          <Select value={chosen} onChange={(event) => setChosen(event.currentTarget.value)}>
            <option value="">Choose from the score</option>
            {choices.numbers.map((number) => (
              <option key={number.id} value={number.id}>
                {number.label} {number.title}
              </option>
            ))}
          </Select>
        </Field>
        <Button
          aria-disabled={chosen === ""}
          onClick={() => {
            if (chosen === "") return;
            add("number", chosen);
            setChosen("");
          }}
        >
          Add the number
        </Button>
        <Button onClick={() => add("scene")}>Add a scene</Button>
        <Button onClick={() => add("warm_up")}>Add a warm-up</Button>
        <Button onClick={() => add("break")}>Add a break</Button>
      </div>
      {choices.numbers.length === 0 && (
        <p className="mt-2 text-sm text-ink-2">
          The score has no numbers yet: add them there first.
        </p>
      )}
    </section>
  );
}
