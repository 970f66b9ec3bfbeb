import * as Slot from "radix-ui/slot";
import type { ReactElement, ReactNode } from "react";
import { useId } from "react";
import { cx } from "./cx";

export type FieldProps = {
  label: ReactNode;
  /** One control: Input, Textarea, Select or anything that takes id and aria attributes. */
  children: ReactElement;
  hint?: ReactNode;
  /** What is wrong and what to do; shown under the control and read with it. */
  error?: ReactNode;
  /** Says "(optional)" after the label; mark the few, not the many. */
  optional?: boolean;
  /** Keeps the label for screen readers only. */
  labelHidden?: boolean;
  id?: string;
  className?: string;
};

/** A label, one control, a hint and an error, wired together by ids. */
export function Field({
  label,
  children,
  hint,
  error,
  optional = false,
  labelHidden = false,
  id,
  className,
}: FieldProps) {
  const made = useId();
  const controlId = id ?? made;
  const hintId = `${controlId}-hint`;
  const errorId = `${controlId}-error`;
  const wrong = error !== undefined && error !== null && error !== false && error !== "";
  const describedBy = [hint ? hintId : "", wrong ? errorId : ""].filter(Boolean).join(" ");
  return (
    <div className={cx("flex min-w-0 flex-col gap-1", className)}>
      <label
        htmlFor={controlId}
        className={cx("text-sm font-bold text-ink", labelHidden && "sr-only")}
      >
        {label}
        {optional && <span className="font-normal text-ink-2"> (optional)</span>}
      </label>
      {hint && (
        <p id={hintId} className="text-sm text-ink-2">
          {hint}
        </p>
      )}
      <Slot.Root
        id={controlId}
        {...(describedBy !== "" && { "aria-describedby": describedBy })}
        {...(wrong && { "aria-invalid": true })}
      >
        {children}
      </Slot.Root>
      {wrong && (
        <p id={errorId} className="text-sm font-bold text-vermilion">
          {error}
        </p>
      )}
    </div>
  );
}

export type FieldGroupProps = {
  legend: ReactNode;
  children: ReactNode;
  hint?: ReactNode;
  error?: ReactNode;
  className?: string;
};

/** Several controls under one question: a fieldset whose legend, hint and error belong together. */
export function FieldGroup({ legend, children, hint, error, className }: FieldGroupProps) {
  const id = useId();
  const wrong = error !== undefined && error !== null && error !== false && error !== "";
  const describedBy = [hint ? `${id}-hint` : "", wrong ? `${id}-error` : ""]
    .filter(Boolean)
    .join(" ");
  return (
    <fieldset
      className={cx("flex min-w-0 flex-col gap-2", className)}
      {...(describedBy !== "" && { "aria-describedby": describedBy })}
    >
      <legend className="mb-1 text-sm font-bold text-ink">{legend}</legend>
      {hint && (
        <p id={`${id}-hint`} className="text-sm text-ink-2">
          {hint}
        </p>
      )}
      {children}
      {wrong && (
        <p id={`${id}-error`} className="text-sm font-bold text-vermilion">
          {error}
        </p>
      )}
    </fieldset>
  );
}
