import { useId, type ComponentProps } from "react";
import { VerdictWords } from "@/components/casting/verdict-words";
import { CheckIcon } from "@/components/ui/icons";
import type { DraftRole, DraftSinger } from "@/lib/client/callbacks";

type Fit = DraftSinger["fits"][number];

/** The box for one singer in one role, its verdict under it; the whole cell is the target. */
export function TickCell({
  singer,
  role,
  fit,
  far,
  on,
  onChange,
  focus,
}: {
  singer: DraftSinger;
  role: DraftRole;
  fit: Fit;
  /** So far out that nobody weighs it up. */
  far: boolean;
  on: boolean;
  onChange: (on: boolean) => void;
  focus: Pick<ComponentProps<"input">, "tabIndex" | "onFocus">;
}) {
  const fitId = useId();
  return (
    <label className="flex h-full min-h-16 cursor-pointer flex-col items-start gap-1 px-3 py-2.5 has-checked:shadow-[inset_0_0_0_1px_var(--color-ink)] max-md:flex-row max-md:gap-3">
      <input
        type="checkbox"
        checked={on}
        aria-label={`${singer.name} for ${role.name}`}
        aria-describedby={fitId}
        onChange={(event) => onChange(event.currentTarget.checked)}
        className="grid size-6 shrink-0 appearance-none place-items-center rounded-[2px] border border-ink bg-sheet before:size-3 before:scale-0 before:bg-ink before:[clip-path:polygon(14%_44%,0_65%,40%_100%,100%_16%,84%_0,37%_68%)] checked:before:scale-100 md:size-5 forced-colors:appearance-auto"
        {...focus}
      />
      <span className="min-w-0">
        <span className="block text-sm leading-snug text-ink md:hidden">{role.name}</span>
        <span id={fitId}>
          <VerdictWords {...fit} quiet={far} className="block leading-snug" />
        </span>
      </span>
    </label>
  );
}

/** The same to look at only. */
export function MarkCell({
  role,
  fit,
  far,
  on,
}: {
  role: DraftRole;
  fit: Fit;
  far: boolean;
  on: boolean;
}) {
  return (
    <span className="flex min-h-16 flex-col items-start gap-1 px-2.5 py-2.5 max-md:flex-row max-md:gap-3">
      <span className="grid size-5 shrink-0 place-items-center">
        {on && (
          <>
            <CheckIcon />
            <span className="sr-only">called back</span>
          </>
        )}
      </span>
      <span className="min-w-0">
        <span className="block text-sm leading-snug text-ink md:hidden">{role.name}</span>
        <VerdictWords {...fit} quiet={far} className="block leading-snug" />
      </span>
    </span>
  );
}
