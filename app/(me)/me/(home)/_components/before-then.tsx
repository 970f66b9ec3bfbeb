import Link from "next/link";
import { SectionTitle } from "@/components/layout/page-title";
import { Chip } from "@/components/ui/chip";
import type { OwnConflict } from "@/lib/data/conflicts";

/** What a company would like to know in good time. */
export function BeforeThen({ conflicts }: { conflicts: readonly OwnConflict[] }) {
  const declined = conflicts.filter((entry) =>
    entry.told.some((told) => told.state === "declined"),
  ).length;
  return (
    <section aria-labelledby="before-then">
      <SectionTitle id="before-then" ruled>
        Before then
      </SectionTitle>
      <Link
        href="/me/conflicts"
        className="flex min-h-11 items-center justify-between gap-4 border-b border-rule py-2.5"
      >
        <span>Tell us when you can’t come</span>
        <span className="flex shrink-0 flex-wrap justify-end gap-2">
          {declined > 0 && <Chip tone="clash">{declined} declined</Chip>}
          <Chip tone={conflicts.length > 0 ? "stretch" : "plain"}>
            {conflicts.length === 0
              ? "no dates"
              : conflicts.length === 1
                ? "1 date"
                : `${conflicts.length} dates`}
          </Chip>
        </span>
      </Link>
    </section>
  );
}
