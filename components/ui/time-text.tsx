export type TimeTextProps = {
  /** The instant, as a Date or ISO text. */
  at: Date | string;
  /** IANA zone to show it in: the company's, or the venue's. */
  timeZone: string;
  /** BCP 47, the person's; English as in Britain unless told. */
  locale?: string;
  /** "time" 18:40 · "day" Tue 23 Mar · "date" Tuesday 23 March · "both" Tue 23 Mar, 18:40. */
  show?: "time" | "day" | "date" | "both";
  className?: string;
};

const formats = {
  time: { hour: "2-digit", minute: "2-digit", hourCycle: "h23" },
  day: { weekday: "short", day: "numeric", month: "short" },
  date: { weekday: "long", day: "numeric", month: "long" },
} satisfies Record<string, Intl.DateTimeFormatOptions>;

/** An instant as people read it, in a given zone, so that server and browser write the same. */
export function TimeText({
  at,
  timeZone,
  locale = "en-GB",
  show = "time",
  className,
}: TimeTextProps) {
  const date = typeof at === "string" ? new Date(at) : at;
  const write = (kind: keyof typeof formats) =>
    // Without the comma that English puts after the weekday.
    new Intl.DateTimeFormat(locale, { ...formats[kind], timeZone }).format(date).replace(/, /, " ");
  return (
    <time dateTime={date.toISOString()} {...(className !== undefined && { className })}>
      {show === "both" ? `${write("day")}, ${write("time")}` : write(show)}
    </time>
  );
}
