import { Skeleton } from "@/components/ui/skeleton";

export default function ScoreLoading() {
  return (
    <div role="status">
      <span className="sr-only">The score is on its way</span>
      <Skeleton className="h-11 w-40" />
      <Skeleton className="mt-2 mb-6 h-5 w-full max-w-xl" />
      <div className="grid gap-8 lg:grid-cols-[minmax(0,1fr)_20rem] xl:grid-cols-[minmax(0,1fr)_27.5rem] xl:gap-10">
        <div className="border-y-2 border-ink bg-sheet">
          {Array.from({ length: 9 }, (_, row) => (
            <div key={row} className="flex h-12 items-center gap-6 border-b border-rule px-3">
              <Skeleton className="h-6 w-6" />
              <Skeleton className="h-5 w-40" />
              <Skeleton className="h-3 w-16" />
              <Skeleton className="h-3 w-16 max-md:hidden" />
            </div>
          ))}
        </div>
        <div className="flex flex-col gap-3">
          <Skeleton className="h-8 w-48" />
          <Skeleton className="h-5 w-full" />
          <Skeleton className="h-40 w-full" />
        </div>
      </div>
    </div>
  );
}
