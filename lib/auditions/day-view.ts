export type SignUpState = "listed" | "invited" | "confirmed" | "declined" | "withdrawn";

/** A singer as the audition day shows them. No address, no telephone. */
export type SingerOnDay = {
  signUpId: string;
  version: number;
  personId: string;
  name: string;
  pronouns: string | null;
  minor: boolean;
  state: SignUpState;
  song: string | null;
  bars: number | null;
  asksFor: string | null;
  notBefore: string | null;
  notAfter: string | null;
  range: { low: number; high: number; kind: "claimed" | "heard" } | null;
  /** What the door recorded: here, in the room, out again. */
  attendance: "here" | "in" | "out" | null;
};

export type ItemOnDay = {
  id: string;
  kind: "slot" | "hold" | "rest" | "lunch";
  /** Instants as ISO text, as they travel to the browser. */
  startsAt: string;
  endsAt: string;
  singer: SingerOnDay | null;
};

export type PianistOnDay = {
  id: string;
  personId: string;
  name: string;
  startsAt: string;
  endsAt: string;
};

export type RoomOnDay = {
  id: string;
  roomId: string;
  name: string;
  venue: string;
  opensAt: string;
  closesAt: string;
  items: ItemOnDay[];
  pianists: PianistOnDay[];
};

/** One audition day: what the page shows and the browser reads again while one looks. */
export type AuditionDayView = {
  id: string;
  productionId: string;
  localDate: string;
  zone: string;
  version: number;
  slotMinutes: number;
  restAfterMinutes: number;
  restMinutes: number;
  lunchMinutes: number;
  lunchFrom: string | null;
  lunchTo: string | null;
  hold: boolean;
  /** Whether a monitor's link is out. */
  doorLink: boolean;
  rooms: RoomOnDay[];
  /** Sign-ups of the production that have no slot on any day. */
  waiting: SingerOnDay[];
  /** What the reader may do here; the server asks again. */
  may: { plan: boolean; assign: boolean; hear: boolean; door: boolean };
};
