import { Skeleton, SkeletonRows } from "@/components/ui/skeleton";

export default function SeasonLoading() {
  return (
    <div>
      <Skeleton className="h-11 w-56" />
      <Skeleton className="mt-2 mb-6 h-5 w-full max-w-2xl" />
      <div className="flex flex-col gap-10">
        <Skeleton className="h-[26rem] w-full max-md:order-2" />
        <SkeletonRows rows={4} label="The season is on its way" />
      </div>
    </div>
  );
}
