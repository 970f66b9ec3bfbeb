"use client";

import { useWatch } from "react-hook-form";
import type { UseFormReturn } from "react-hook-form";
import { LineOnScale } from "@/components/music/line-on-scale";
import { Button } from "@/components/ui/button";
import { Field } from "@/components/ui/field";
import { Input } from "@/components/ui/input";
import { Notice } from "@/components/ui/notice";
import { Select } from "@/components/ui/select";
import { pitchName } from "@/lib/music/pitch-name";
import type { PitchSpan } from "@/lib/music/types";
import { ROLE_KIND_NAMES } from "@/lib/score/review-types";
import type { ReviewPart, ReviewRole } from "@/lib/score/review-types";
import { shiftOctaves } from "@/lib/score/shift-octaves";
import type { ReviewValues } from "./review-values";

type Props = {
  form: UseFormReturn<ReviewValues>;
  index: number;
  part: ReviewPart;
  roles: readonly ReviewRole[];
  scale: PitchSpan;
  /** Fifths of the score's first key, for spelling. */
  fifths: number;
};

/** One part of the score: what it sings, and what becomes of it. */
export function PartRow({ form, index, part, roles, scale, fifths }: Props) {
  const at = `parts.${index}` as const;
  const plan = useWatch({ control: form.control, name: at });
  const errors = form.formState.errors.parts?.[index];
  const line = shifted(part, plan.octaveShift);
  const shift = (octaves: number): void => {
    form.setValue(`${at}.octaveShift`, octaves, { shouldDirty: true });
  };
  return (
    <li className="flex flex-col gap-3 border-b border-rule py-4">
      <div className="grid grid-cols-1 items-start gap-x-6 gap-y-3 sm:grid-cols-[minmax(0,1fr)_minmax(0,1fr)]">
        <div className="min-w-0">
          <h3 className="text-lg leading-tight wrap-anywhere">{part.name}</h3>
          {line ? (
            <>
              <p className="text-sm text-ink-2">
                {line.lowSpelled} to {line.highSpelled}
                {line.tessitura &&
                  `, mostly ${pitchName(line.tessitura.low, { prefer: fifths })} to ${pitchName(line.tessitura.high, { prefer: fifths })}`}
                {!part.vocal && ". No words under its notes and no voice’s name"}.
              </p>
              <LineOnScale {...line} scale={scale} fifths={fifths} className="mt-2" />
            </>
          ) : (
            <p className="text-sm text-ink-2">No sung note with a pitch.</p>
          )}
        </div>
        <div className="flex min-w-0 flex-col gap-3">
          <Field label={`${part.name} becomes`} error={errors?.to?.message}>
            <Select {...form.register(`${at}.to`)} disabled={!line}>
              <option value="leave">nothing: leave it out</option>
              {line && <option value="new">a new role</option>}
              {line && roles.length > 0 && (
                <optgroup label="A role that stands already">
                  {roles.map((role) => (
                    <option key={role.id} value={role.id}>
                      {role.name}
                    </option>
                  ))}
                </optgroup>
              )}
            </Select>
          </Field>
          {plan.to === "new" && (
            <div className="grid grid-cols-[minmax(0,1fr)_minmax(0,9rem)] items-start gap-3">
              <Field label="The new role’s name" error={errors?.name?.message}>
                <Input autoComplete="off" {...form.register(`${at}.name`)} />
              </Field>
              <Field label="Kind" error={errors?.kind?.message}>
                <Select {...form.register(`${at}.kind`)}>
                  {Object.entries(ROLE_KIND_NAMES).map(([kind, name]) => (
                    <option key={kind} value={kind}>
                      {name}
                    </option>
                  ))}
                </Select>
              </Field>
            </div>
          )}
        </div>
      </div>
      {part.line && plan.to !== "leave" && (
        <Octave part={part} octaveShift={plan.octaveShift} shift={shift} />
      )}
      {part.warnings.length > 0 && <p className="text-sm text-ink-2">{part.warnings.join(" ")}</p>}
    </li>
  );
}

function shifted(part: ReviewPart, octaves: number) {
  if (!part.line) return null;
  const bare = { ...part.line, optionalLow: null, optionalHigh: null, histogram: null };
  const line = shiftOctaves(bare, octaves) ?? bare;
  const middle = part.line.tessitura;
  return {
    ...line,
    tessitura: middle && { low: middle.low + 12 * octaves, high: middle.high + 12 * octaves },
  };
}

function Octave({
  part,
  octaveShift,
  shift,
}: {
  part: ReviewPart;
  octaveShift: number;
  shift: (octaves: number) => void;
}) {
  const { looksOff } = part;
  if (octaveShift !== 0) {
    return (
      <p className="flex flex-wrap items-center gap-3 text-sm">
        <strong>
          {Math.abs(octaveShift) === 1 ? "An octave" : `${String(Math.abs(octaveShift))} octaves`}{" "}
          {octaveShift > 0 ? "above" : "below"} where it is written.
        </strong>
        <Button
          size="small"
          onClick={() => {
            shift(0);
          }}
        >
          As written
        </Button>
      </p>
    );
  }
  if (looksOff) {
    const high = looksOff.shift < 0;
    return (
      <Notice
        tone="caution"
        title={`${part.name} looks an octave ${high ? "high" : "low"}.`}
        actions={
          <Button
            size="small"
            onClick={() => {
              shift(looksOff.shift);
            }}
          >
            Put it an octave {high ? "down" : "up"}
          </Button>
        }
      >
        As written it lies mostly outside {looksOff.voice}’s range. A clef without its 8 does that.
        Compare it with the printed score.
      </Notice>
    );
  }
  return (
    <div className="flex flex-wrap gap-2">
      {([-1, 1] as const).map((by) => (
        <Button
          key={by}
          kind="quiet"
          size="small"
          onClick={() => {
            shift(by);
          }}
        >
          An octave {by > 0 ? "up" : "down"}
          <span className="sr-only"> for {part.name}</span>
        </Button>
      ))}
    </div>
  );
}
