import { HistogramKeyboard } from "@/components/music/histogram-keyboard";
import { LineOnScale } from "@/components/music/line-on-scale";
import { PitchKeyboard } from "@/components/music/pitch-keyboard";
import { RangeBar } from "@/components/music/range-bar";
import { PageTitle, SectionTitle } from "@/components/layout/page-title";
import { RehearsalMark } from "@/components/layout/rehearsal-mark";
import { Table, Cell, ColumnHead, RowHead } from "@/components/ui/table";
import { Demo } from "./demo";
const roles = [{ n: "Maren", low: 58, high: 81, tessitura: { low: 65, high: 74 } }, { n: "Old Bet", low: 53, high: 74, tessitura: { low: 57, high: 64 } }, { n: "Harbour Master", low: 43, high: 65, tessitura: { low: 50, high: 57 } }];
const singers = [{ n: "Ottoline Marsh", low: 57, high: 84, comfortableLow: 60, comfortableHigh: 79 }, { n: "Wren Tallis", low: 55, high: 79, comfortableLow: 59, comfortableHigh: 74 }, { n: "Dele Fashanu-Price", low: 45, high: 71, comfortableLow: 48, comfortableHigh: 67 }];
export default function P() {
  return (
    <>
      <PageTitle title="Music" />
      <SectionTitle>Your range on file</SectionTitle>
      <PitchKeyboard label="Range on file" range={{ low: 55, high: 79, comfortableLow: 59, comfortableHigh: 74 }} />
      <div className="mt-6 max-w-md"><PitchKeyboard label="Range heard" from={48} to={84} range={{ low: 55, high: 79 }} /></div>
      <SectionTitle>What Maren sings</SectionTitle>
      <HistogramKeyboard label="What Maren sings" low={58} high={81} tessitura={{ low: 65, high: 74 }} histogram={{ "58": 2, "61": 6, "63": 12, "64": 5, "65": 26, "66": 8, "67": 45, "69": 54, "70": 33, "71": 19, "72": 50, "73": 7, "74": 38, "76": 16, "78": 8, "79": 5, "81": 2 }} />
      <SectionTitle>Pick</SectionTitle>
      <Demo />
      <SectionTitle>Casting</SectionTitle>
      <Table caption="Casting grid"><thead><tr><ColumnHead>Called back: 3</ColumnHead>{roles.map((r) => <ColumnHead key={r.n}>{r.n}</ColumnHead>)}</tr></thead>
        <tbody>{singers.map((s) => <tr key={s.n}><RowHead>{s.n}</RowHead>{roles.map((r) => { const a = Math.max(0, r.high - s.high), b = Math.max(0, s.low - r.low); const m = Math.max(a, b); return <Cell key={r.n}><RangeBar role={r} singer={s} verdict={m === 0 ? "fits" : m < 3 ? "stretch" : "out"} words={m === 0 ? "Fits" : a > 0 ? `${String(a)} short at top` : `${String(b)} short below`} /></Cell>; })}</tr>)}</tbody></Table>
      <SectionTitle>Score</SectionTitle>
      <Table caption="Score"><tbody><tr><RowHead><RehearsalMark>2</RehearsalMark> <span className="font-serif text-lg font-medium">Low Water</span></RowHead><Cell><LineOnScale low={62} high={76} tessitura={{ low: 67, high: 71 }} scale={{ low: 53, high: 81 }} /></Cell><Cell><LineOnScale low={53} high={65} tessitura={{ low: 57, high: 60 }} scale={{ low: 53, high: 81 }} /></Cell></tr></tbody></Table>
    </>
  );
}
