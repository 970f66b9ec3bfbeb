import { ChoiceMark } from "@/components/casting/choice-mark";
import { choiceInWords, type Choice } from "@/lib/client/casting";

/** What is chosen in a cell; nothing where nothing is. */
export function ChoiceOfCell({ choice, className }: { choice: Choice | null; className?: string }) {
  if (!choice) return null;
  const look =
    choice.state === "considered" ? "considered" : choice.kind === "principal" ? "cast" : "beside";
  return (
    <ChoiceMark look={look} {...(className !== undefined && { className })}>
      {choiceInWords(choice)}
    </ChoiceMark>
  );
}
