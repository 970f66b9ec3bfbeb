import { Skeleton, SkeletonRows } from "@/components/ui/skeleton";

export default function PeopleLoading() {
  return (
    <div>
      <Skeleton className="h-11 w-40" />
      <Skeleton className="mt-2 mb-6 h-5 w-full max-w-md" />
      <SkeletonRows rows={8} label="The people are on their way" />
    </div>
  );
}
