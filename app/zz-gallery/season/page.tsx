import { PageTitle } from "@/components/layout/page-title";
import { Chip } from "@/components/ui/chip";
import { Button } from "@/components/ui/button";
import { SeasonStaves } from "@/components/schedule/season-staves";
import type { EventKind } from "@/components/schedule/note-shape";
const d = (n: number) => new Date(Date.UTC(2027, 2, 8 + n)).toISOString().slice(0, 10);
const mk = (id: string, list: [EventKind, number, number][]) => list.map(([kind, day, min], i) => ({ id: `${id}${String(i)}`, kind, localDate: d(day), minutesOfDay: min, label: `${kind} in Room 2` }));
export default function P() {
  return (
    <>
      <PageTitle title="Spring season" sub="Four productions, two companies. Each stave is a production, each bar a week; the five lines run from morning (top) to late evening." chips={<><Chip tone="clash">2 clashes</Chip><Chip tone="stretch">1 short rest</Chip></>} actions={<><Button>Print the season</Button><Button kind="primary">New production</Button></>} />
      <SeasonStaves label="Spring season" today={d(3)}
        weeks={Array.from({ length: 9 }, (_, i) => ({ number: 10 + i, start: d(i * 7), label: new Intl.DateTimeFormat("en-GB", { day: "numeric", month: "short", timeZone: "UTC" }).format(new Date(`${d(i * 7)}T00:00Z`)) }))}
        groups={[
          { label: "Lantern Street Theatre", productions: [
            { id: "t", title: "The Tidewatcher", sub: "Auditions 20–21 Mar", href: "/x", events: mk("t", [["audition", 12, 840], ["audition", 13, 840], ["callback", 16, 620], ["music", 18, 840], ["music", 22, 620], ["music", 23, 1110], ["staging", 29, 780], ["staging", 30, 840], ["orchestra", 50, 620]]) },
            { id: "m", title: "Marrow Street", sub: "Opens 2 Apr", href: "/y", events: mk("m", [["orchestra", 1, 620], ["orchestra", 2, 620], ["orchestra", 12, 840], ["tech", 16, 620], ["tech", 17, 1110], ["performance", 20, 1170], ["performance", 22, 1170]]) },
          ] },
          { label: "Fenmoor Conservatory", productions: [{ id: "f", title: "A Fair at Candlemas", sub: "Callbacks 13 Mar", events: mk("f", [["callback", 6, 900], ["staging", 12, 840], ["staging", 13, 840], ["music", 13, 1110]]) }] },
          { label: "Coaching", productions: [{ id: "r", title: "Singers’ run-throughs", sub: "12 booked", tone: "smalt", events: mk("r", [["music", 3, 600], ["music", 2, 1200], ["music", 8, 620]]) }] },
        ]}
        clashes={[{ localDate: d(13), minutesOfDay: 840, productionIds: ["t", "f"], label: "You are at the piano for The Tidewatcher and called to Candlemas" }, { localDate: d(30), minutesOfDay: 840, productionIds: ["t", "f"], label: "Short rest" }]} />
    </>
  );
}
