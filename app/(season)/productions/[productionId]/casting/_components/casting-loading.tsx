import { Skeleton } from "@/components/ui/skeleton";

/** The shape of the casting grid while it is on its way. */
export function CastingLoading() {
  return (
    <div role="status">
      <span className="sr-only">The casting grid is on its way</span>
      <Skeleton className="h-11 w-56" />
      <Skeleton className="mt-2 mb-6 h-5 w-full max-w-xl" />
      <div className="grid gap-8 lg:grid-cols-[minmax(0,1fr)_18.75rem] xl:gap-12">
        <div className="border-y-2 border-ink bg-sheet">
          {Array.from({ length: 6 }, (_, row) => (
            <div
              key={row}
              className="flex h-28 items-center gap-4 border-b border-rule px-3 md:gap-8"
            >
              <Skeleton className="h-5 w-36" />
              <Skeleton className="h-16 w-14" />
              <Skeleton className="h-16 w-14" />
              <Skeleton className="h-16 w-14 max-md:hidden" />
              <Skeleton className="h-16 w-14 max-md:hidden" />
            </div>
          ))}
        </div>
        <div className="flex flex-col gap-3">
          <Skeleton className="h-8 w-40" />
          <Skeleton className="h-5 w-full" />
          <Skeleton className="h-5 w-4/5" />
        </div>
      </div>
    </div>
  );
}
