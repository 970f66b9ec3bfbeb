import { Button } from "@/components/ui/button";
import type { Choice, GridRole } from "@/lib/client/casting";
import type { Wish } from "./use-choose";

type After = NonNullable<Wish["after"]>;
type Offer = { label: string; after: After };

const CAST: Offer = { label: "Cast", after: { state: "cast", kind: "principal" } };
const CONSIDER: Offer = { label: "Consider", after: { state: "considered", kind: "principal" } };
const COVER: Offer = { label: "Cover", after: { state: "cast", kind: "cover" } };
const ALTERNATE: Offer = { label: "Alternate", after: { state: "cast", kind: "alternate" } };
const SWING: Offer = { label: "Swing", after: { state: "cast", kind: "swing" } };

/** A part for one has covers and alternates; an ensemble has swings. */
const offersFor = (role: GridRole): Offer[] =>
  role.kind === "ensemble" ? [CAST, CONSIDER, SWING, COVER] : [CAST, CONSIDER, COVER, ALTERNATE];

/** The ways to choose a singer for a role; the one in force is pressed. */
export function ChooseButtons({
  role,
  choice,
  title,
  onChoose,
}: {
  role: GridRole;
  choice: Choice | null;
  title: string;
  onChoose: (after: After | null) => void;
}) {
  return (
    <div role="group" aria-label={`Choose ${title}`} className="flex flex-wrap gap-2">
      {offersFor(role).map(({ label, after }) => {
        const pressed = choice?.state === after.state && choice.kind === after.kind;
        return (
          <Button
            key={label}
            size="small"
            kind={pressed ? "primary" : "secondary"}
            aria-pressed={pressed}
            onClick={() => {
              if (!pressed) onChoose(after);
            }}
          >
            {label}
          </Button>
        );
      })}
      <Button
        size="small"
        kind="quiet"
        // Stays in its place, so that nothing moves under the finger.
        aria-disabled={choice === null}
        onClick={() => {
          if (choice) onChoose(null);
        }}
      >
        Take back
      </Button>
    </div>
  );
}
