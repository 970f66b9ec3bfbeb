/** One line of the running order at the door. A pause has no singer. Name, time and state are all there is of a singer. */
export type DoorItem = {
  id: string;
  kind: "singer" | "rest" | "lunch";
  startsAt: string;
  endsAt: string;
  signUpId: string | null;
  name: string | null;
  state: "not here yet" | "here" | "inside" | "heard" | "not coming" | null;
  /** When the singer was sent in. */
  inAt: string | null;
};

/** What the monitor's link shows: on its own day the running order, on others only when it opens. */
export type DoorView =
  | { open: false; notice: string }
  | {
      open: true;
      day: string;
      zone: string;
      now: string;
      slotMinutes: number;
      rooms: { id: string; name: string; items: DoorItem[] }[];
    };
