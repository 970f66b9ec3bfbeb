/** Said wherever ranges are weighed up: paper knows little of a voice. */
export function VoiceCaution({ minor = false }: { minor?: boolean }) {
  return (
    <div className="flex flex-col gap-2 border-t border-ink pt-3 text-sm text-ink-2">
      <p>
        A range on paper is not a voice. Never ask a singer to prove a note that hurts; let a voice
        teacher decide what is safe.
      </p>
      {minor && (
        <p>
          A young voice changes: no extremes are suggested here; ask with a guardian and a teacher.
        </p>
      )}
    </div>
  );
}
