import { Skeleton, SkeletonRows } from "@/components/ui/skeleton";

export default function ProductionLoading() {
  return (
    <div>
      <Skeleton className="h-11 w-72 max-w-full" />
      <Skeleton className="mt-2 mb-6 h-5 w-full max-w-xl" />
      <SkeletonRows rows={6} label="The production is on its way" />
    </div>
  );
}
