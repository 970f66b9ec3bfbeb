import { Skeleton, SkeletonRows } from "@/components/ui/skeleton";

export default function CompanyLoading() {
  return (
    <div>
      <Skeleton className="h-11 w-64 max-w-full" />
      <Skeleton className="mt-2 mb-6 h-5 w-full max-w-md" />
      <SkeletonRows rows={4} label="The productions are on their way" />
    </div>
  );
}
