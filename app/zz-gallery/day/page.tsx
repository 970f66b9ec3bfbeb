import { PageTitle, SectionTitle } from "@/components/layout/page-title";
import { CallLadder } from "@/components/schedule/call-ladder";
import { DayColumns } from "@/components/schedule/day-columns";
const slots = (r: string, from: number, n: number) => Array.from({ length: n }, (_, i) => ({ id: `${r}${String(from)}-${String(i)}`, start: from + i * 8, end: from + i * 8 + 8, name: ["Ottoline Marsh", "Kit Abara", "Dele Fashanu-Price"][i % 3] ?? "" }));
const c = (m: number) => `${String(Math.floor(m / 60)).padStart(2, "0")}:${String(m % 60).padStart(2, "0")}`;
export default function P() {
  return (
    <>
      <PageTitle title="Saturday 20 March" sub="Two rooms, 55 singers" />
      <DayColumns label="Saturday 20 March" from={600} to={780} now={656}
        rooms={[
          { id: "a", label: "Room A", slots: [...slots("a", 600, 10), ...slots("a", 690, 5)], rests: [{ id: "ra", start: 680, end: 690, label: "Pianist rests 10 min" }, { id: "rl", start: 730, end: 780, label: "Lunch" }], pianists: [{ id: "pa", start: 600, end: 730, label: "Hanne Briscoe" }] },
          { id: "b", label: "Room B", slots: slots("b", 615, 12), rests: [], pianists: [{ id: "pb", start: 615, end: 680, label: "Osric Dlamini", tone: "verdigris" as const }, { id: "pn", start: 690, end: 760, label: "no pianist", tone: "clash" as const }] },
        ]}
        renderSlot={(s) => <button type="button" className="flex size-full items-center gap-2 border border-ink bg-sheet px-2 text-left text-xs leading-none"><b>{c(s.start)}</b> {s.name} <span className="ml-auto text-ink-2">16 bars</span></button>} />
      <SectionTitle>Music call</SectionTitle>
      <CallLadder label="Music call" breaks={[{ start: 1185, minutes: 15 }]}
        blocks={[{ id: "1", number: "13", title: "Bet’s Ledger", start: 1110, minutes: 25 }, { id: "2", number: "7", title: "What the Gulls Know", start: 1135, minutes: 20 }, { id: "3", number: "4", title: "Tide Table", start: 1155, minutes: 30 }, { id: "4", number: "18", title: "Lamps Out", start: 1200, minutes: 20 }, { id: "5", number: "12", title: "Harbour Reel", start: 1220, minutes: 40 }, { id: "6", number: "9", title: "The Ness Light", start: 1260, minutes: 45 }]}
        rows={[{ id: "m", name: "Maren", sub: "W. Tallis", blockIds: ["2", "3", "4", "6"] }, { id: "b", name: "Old Bet", sub: "S. Roque", blockIds: ["1", "2", "4"] }, { id: "e", name: "Ensemble", sub: "14 singers", blockIds: ["3", "4", "5"] }]} />
    </>
  );
}
