import { DoorFrame } from "./_components/door-frame";

export default function DoorNotFound() {
  return (
    <DoorFrame note="">
      <h1 className="text-2xl">This link opens nothing</h1>
      <p className="mt-2 text-ink-2">
        It may have been replaced by a newer one, or ended. Ask the stage manager for today’s link.
      </p>
    </DoorFrame>
  );
}
