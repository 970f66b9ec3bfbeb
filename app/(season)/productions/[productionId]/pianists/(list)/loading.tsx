import { Skeleton, SkeletonRows } from "@/components/ui/skeleton";

export default function Loading() {
  return (
    <div className="flex flex-col gap-6">
      <Skeleton className="h-11 w-64" />
      <SkeletonRows rows={8} label="Loading the pianists" />
    </div>
  );
}
