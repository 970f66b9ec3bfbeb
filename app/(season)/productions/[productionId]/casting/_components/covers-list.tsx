import { SectionTitle } from "@/components/layout/page-title";
import { Chip } from "@/components/ui/chip";
import { countCovers, type CoverCount, type Grid } from "@/lib/client/casting";

function CoverChip({ fit, stretch }: CoverCount) {
  if (fit > 0) return <Chip tone="fits">{fit} could cover</Chip>;
  if (stretch > 0) return <Chip tone="stretch">{stretch}, at a stretch</Chip>;
  return <Chip tone="clash">none</Chip>;
}

/** For each role of one person, how many others could cover it by range. */
export function CoversList({ grid }: { grid: Grid }) {
  const covers = countCovers(grid);
  if (covers.length === 0) return null;
  return (
    <section>
      <SectionTitle ruled>Covers</SectionTitle>
      <ul>
        {covers.map((cover) => (
          <li
            key={cover.roleId}
            className="flex items-start justify-between gap-3 border-b border-rule py-2 text-sm"
          >
            <span className="min-w-0">
              {cover.role}
              {cover.named.length > 0 && (
                <span className="block text-xs text-ink-2">named: {cover.named.join(", ")}</span>
              )}
            </span>
            <CoverChip {...cover} />
          </li>
        ))}
      </ul>
      <p className="mt-2 text-xs text-ink-2">By range alone, besides whoever sings the role.</p>
    </section>
  );
}
