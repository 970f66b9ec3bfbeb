import { cx } from "@/components/ui/cx";

/** What is chosen, in words on smalt: solid for the one who sings it, dashed while only considered. */
export function ChoiceMark({
  look,
  children,
  className,
}: {
  look: "cast" | "beside" | "considered";
  children: string;
  className?: string;
}) {
  return (
    <span
      className={cx(
        "inline-flex items-center rounded-sm border px-1.5 text-xs leading-5 font-bold whitespace-nowrap",
        look === "cast" && "border-smalt bg-smalt text-paper",
        look === "beside" && "border-smalt bg-smalt-wash text-smalt",
        look === "considered" && "border-dashed border-smalt bg-sheet text-smalt",
        className,
      )}
    >
      {children}
    </span>
  );
}
