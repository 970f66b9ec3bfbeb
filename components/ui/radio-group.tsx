import type { ComponentProps, ReactNode } from "react";
import { FieldGroup } from "./field";
import { cx } from "./cx";

export type RadioOption = { value: string; label: ReactNode; note?: ReactNode; disabled?: boolean };

export type RadioGroupProps = Omit<
  ComponentProps<"input">,
  "type" | "children" | "value" | "defaultValue" | "id"
> & {
  legend: ReactNode;
  name: string;
  options: readonly RadioOption[];
  /** The chosen value where the parent holds it (then give onChange too). */
  value?: string | null;
  defaultValue?: string;
  hint?: ReactNode;
  error?: ReactNode;
  /** "list": one under the other. "squares": a row of small squares, for marks such as 1 to 5. */
  look?: "list" | "squares";
};

/** One answer of several, on the browser's own radio buttons. Spread `register(name)` onto it. */
export function RadioGroup({
  legend,
  options,
  value,
  defaultValue,
  hint,
  error,
  look = "list",
  className,
  ...input
}: RadioGroupProps) {
  return (
    <FieldGroup
      legend={legend}
      {...(hint !== undefined && { hint })}
      {...(error !== undefined && { error })}
      {...(className !== undefined && { className })}
    >
      <div className={look === "squares" ? "flex flex-wrap gap-1.5" : "flex flex-col"}>
        {options.map((option) => {
          const chosen =
            value === undefined
              ? { defaultChecked: option.value === defaultValue }
              : { checked: option.value === value };
          const given = value === undefined && defaultValue === undefined ? {} : chosen;
          return look === "squares" ? (
            <label
              key={option.value}
              className="relative grid size-11 place-items-center rounded-sm border border-ink bg-sheet text-sm text-ink has-checked:bg-ink has-checked:font-bold has-checked:text-paper has-focus-visible:outline-2 has-focus-visible:outline-offset-2 has-focus-visible:outline-smalt has-disabled:opacity-55 md:size-8"
            >
              <input
                type="radio"
                value={option.value}
                disabled={option.disabled}
                className="absolute inset-0 size-full cursor-pointer opacity-0"
                {...given}
                {...input}
              />
              {option.label}
            </label>
          ) : (
            <label
              key={option.value}
              className="flex min-h-11 items-start gap-3 py-2 text-ink has-disabled:opacity-55 md:min-h-8 md:py-1"
            >
              <input
                type="radio"
                value={option.value}
                disabled={option.disabled}
                className={cx(
                  "mt-0.5 grid size-6 shrink-0 appearance-none place-items-center rounded-full border border-ink bg-sheet md:size-5",
                  "before:size-2.5 before:scale-0 before:rounded-full before:bg-ink checked:before:scale-100 forced-colors:appearance-auto",
                )}
                {...given}
                {...input}
              />
              <span className="min-w-0">
                {option.label}
                {option.note && <span className="block text-sm text-ink-2">{option.note}</span>}
              </span>
            </label>
          );
        })}
      </div>
    </FieldGroup>
  );
}
