/** What the fields hold: text as typed, and the rooms in use with their times. */
export type DayFields = {
  productionId: string;
  localDate: string;
  slotMinutes: string;
  restAfterMinutes: string;
  restMinutes: string;
  lunchMinutes: string;
  lunchFrom: string;
  lunchTo: string;
  hold: boolean;
  rooms: { roomId: string; opens: string; closes: string }[];
};
