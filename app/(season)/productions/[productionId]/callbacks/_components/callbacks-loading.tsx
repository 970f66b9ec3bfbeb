import { Skeleton, SkeletonRows } from "@/components/ui/skeleton";

/** The shape of the callback list while it is on its way. */
export function CallbacksLoading() {
  return (
    <div>
      <Skeleton className="h-11 w-48" />
      <Skeleton className="mt-2 mb-6 h-5 w-full max-w-md" />
      <SkeletonRows rows={8} label="The callback list is on its way" />
    </div>
  );
}
