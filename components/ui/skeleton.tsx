import { cx } from "./cx";

/** One grey bar where something will stand; give it the size of what comes, so nothing jumps. */
export function Skeleton({ className }: { className?: string }) {
  return (
    <span
      aria-hidden="true"
      className={cx("block animate-breathe rounded-sm bg-bone", className ?? "h-5 w-full")}
    />
  );
}

/** Lines of a list or a table that is on its way; says once that it is loading. */
export function SkeletonRows({ rows = 6, label = "Loading" }: { rows?: number; label?: string }) {
  return (
    <div role="status" className="flex flex-col">
      <span className="sr-only">{label}</span>
      {Array.from({ length: rows }, (_, index) => (
        <div key={index} className="flex items-center gap-4 border-b border-rule py-3">
          <Skeleton className="h-5 w-14" />
          <Skeleton className={cx("h-5", index % 2 === 0 ? "w-2/5" : "w-1/3")} />
          <Skeleton className="ml-auto h-5 w-20" />
        </div>
      ))}
    </div>
  );
}
