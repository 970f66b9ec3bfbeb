import type { ComponentProps, ReactNode } from "react";
import { useId } from "react";
import { cx } from "./cx";

export type CheckboxProps = Omit<ComponentProps<"input">, "type"> & {
  label: ReactNode;
  /** A second line under the label, read as its description. */
  note?: ReactNode;
};

/** A box to tick with its label; the whole line is the target. */
export function Checkbox({ label, note, className, id, ...rest }: CheckboxProps) {
  const made = useId();
  const boxId = id ?? made;
  return (
    <div className={cx("flex min-h-11 items-start gap-3 py-2 md:min-h-8 md:py-1", className)}>
      <input
        type="checkbox"
        id={boxId}
        {...(note ? { "aria-describedby": `${boxId}-note` } : {})}
        className={cx(
          "mt-0.5 grid size-6 shrink-0 appearance-none place-items-center rounded-[2px] border border-ink bg-sheet md:size-5",
          "before:size-3 before:scale-0 before:bg-ink before:[clip-path:polygon(14%_44%,0_65%,40%_100%,100%_16%,84%_0,37%_68%)] checked:before:scale-100 indeterminate:before:scale-100 indeterminate:before:[clip-path:inset(40%_0)]",
          "disabled:opacity-55 aria-invalid:border-2 aria-invalid:border-vermilion forced-colors:appearance-auto",
        )}
        {...rest}
      />
      <div className="min-w-0">
        <label htmlFor={boxId} className="block text-base font-normal text-ink">
          {label}
        </label>
        {note && (
          <p id={`${boxId}-note`} className="text-sm text-ink-2">
            {note}
          </p>
        )}
      </div>
    </div>
  );
}
