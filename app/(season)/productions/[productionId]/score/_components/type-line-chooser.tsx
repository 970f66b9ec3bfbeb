"use client";

import { useRouter } from "next/navigation";
import { useState } from "react";
import { Button } from "@/components/ui/button";
import { Field } from "@/components/ui/field";
import { Select } from "@/components/ui/select";
import type { ScoreRole } from "@/lib/score/score-view";
import { scoreHref } from "./selection";

type Props = { productionId: string; role: ScoreRole; numbers: { id: string; name: string }[] };

/** Chooses a number in which the role does not sing yet, to type its line. */
export function TypeLineChooser({ productionId, role, numbers }: Props) {
  const router = useRouter();
  const [chosen, setChosen] = useState(numbers[0]?.id ?? "");
  // The list shrinks as lines are typed: what was chosen may be gone from it.
  const numberId = numbers.some((number) => number.id === chosen) ? chosen : (numbers[0]?.id ?? "");
  if (numbers.length === 0) return null;
  return (
    <form
      className="flex items-end gap-3"
      onSubmit={(event) => {
        event.preventDefault();
        router.push(scoreHref(productionId, { role: role.id, number: numberId }, "#side"));
      }}
    >
      <Field label={`Type a line for ${role.name} in`} className="flex-1">
        <Select
          value={numberId}
          onChange={(event) => {
            setChosen(event.currentTarget.value);
          }}
        >
          {numbers.map((number) => (
            <option key={number.id} value={number.id}>
              {number.name}
            </option>
          ))}
        </Select>
      </Field>
      <Button type="submit">Type it</Button>
    </form>
  );
}
