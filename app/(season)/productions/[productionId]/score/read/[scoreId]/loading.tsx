import { Skeleton, SkeletonRows } from "@/components/ui/skeleton";

export default function ReadingLoading() {
  return (
    <>
      <Skeleton className="h-11 w-72" />
      <Skeleton className="mt-2 mb-6 h-5 w-full max-w-xl" />
      <SkeletonRows rows={5} label="The score is being read" />
    </>
  );
}
