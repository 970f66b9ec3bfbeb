import { Notice } from "@/components/ui/notice";

/** The message of a whole form, read aloud when it appears; nothing when all is well. */
export function FormError({ message }: { message: string | null | undefined }) {
  // The place is there from the start: screen readers miss an alert that comes with its container.
  return (
    <div aria-live="assertive">
      {message ? <Notice tone="error" live={false} title={message} /> : null}
    </div>
  );
}
