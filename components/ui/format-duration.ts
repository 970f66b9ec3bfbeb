/** Whole minutes as people of the theatre write them: 45 → "45 min", 125 → "2 h 05", 120 → "2 h". */
export function formatDuration(minutes: number): string {
  const whole = Math.round(minutes);
  const hours = Math.floor(whole / 60);
  const rest = whole % 60;
  if (hours === 0) return `${String(rest)} min`;
  return rest === 0 ? `${String(hours)} h` : `${String(hours)} h ${String(rest).padStart(2, "0")}`;
}

/** Minutes of a day as a clock shows them: 1110 → "18:30"; past midnight goes on from 00:00. */
export function clock(minutesOfDay: number): string {
  const whole = ((Math.round(minutesOfDay) % 1440) + 1440) % 1440;
  return `${String(Math.floor(whole / 60)).padStart(2, "0")}:${String(whole % 60).padStart(2, "0")}`;
}
