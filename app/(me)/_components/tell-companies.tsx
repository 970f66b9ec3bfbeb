"use client";

import type { UseFormRegisterReturn } from "react-hook-form";
import { Checkbox } from "@/components/ui/checkbox";
import { FieldGroup } from "@/components/ui/field";

/** A company's record of the person, as a form names it. */
export type Told = { personId: string; company: string };

export type TellCompaniesProps = {
  records: readonly Told[];
  register: UseFormRegisterReturn;
  error?: string | undefined;
};

/** Which of a person's companies a form writes to; with only one there is nothing to choose. */
export function TellCompanies({ records, register, error }: TellCompaniesProps) {
  if (records.length < 2)
    return error === undefined ? null : <p className="text-sm font-bold text-vermilion">{error}</p>;
  return (
    <FieldGroup legend="Tell" {...(error !== undefined && { error })}>
      {records.map((record) => (
        <Checkbox
          key={record.personId}
          label={record.company}
          value={record.personId}
          {...register}
        />
      ))}
    </FieldGroup>
  );
}
