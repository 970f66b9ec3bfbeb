import Link from "next/link";
import { PageTitle, SectionTitle } from "@/components/layout/page-title";
import { RehearsalMark } from "@/components/layout/rehearsal-mark";
import { SideColumn } from "@/components/layout/side-column";
import { Button } from "@/components/ui/button";
import { Chip } from "@/components/ui/chip";
import { Field } from "@/components/ui/field";
import { Input } from "@/components/ui/input";
import { Notice } from "@/components/ui/notice";
import { Select } from "@/components/ui/select";
import { Textarea } from "@/components/ui/textarea";

export default function Page() {
  return (
    <>
      <PageTitle title="Casting grid" sub="Ranges of each role come from the vocal book. The solid part of a bar is where most of the singing lies."
        chips={<><Chip tone="clash">2 clashes</Chip><Chip tone="stretch">1 short rest</Chip></>}
        actions={<><Button>Export to spreadsheet</Button><Button kind="primary" asChild><Link href="/">Propose a cast</Link></Button></>} />
      <SideColumn sideLabel="About the choice" side={<section><SectionTitle ruled>Covers</SectionTitle><p className="py-2 flex justify-between">Maren <Chip tone="fits">2 could cover</Chip></p><Notice tone="caution" title="Ansel looks an octave high.">The part is printed in treble clef without the 8. <a className="text-link" href="#x">Put it an octave down</a></Notice></section>}>
        <div className="grid gap-4 max-w-lg">
          <p><RehearsalMark>12</RehearsalMark> <cite>The Ness Light</cite>, bars 61–64, B♭3 to A5, F♯. Nguyễn Őry Čapek</p>
          <Field label="Your e-mail" hint="We send a link." error="That is not an e-mail address: it needs an @."><Input type="email" placeholder="name@example.org" /></Field>
          <Field label="Room" optional><Select><option>Room 1</option></Select></Field>
          <Field label="Notes"><Textarea defaultValue="Top is there" /></Field>
          <div className="flex flex-wrap gap-2"><Button kind="quiet">Quiet</Button><Button kind="danger">Delete</Button><Button size="small">Small</Button><Button size="large" kind="primary">Large</Button><Button disabled>Off</Button></div>
          <div className="flex flex-wrap gap-2"><Chip tone="info">info</Chip><Chip>plain</Chip><Chip tone="fits">Fits</Chip></div>
          <Notice tone="error" title="The slot is taken.">Choose another.</Notice><Notice tone="done" title="Saved.">12:27</Notice><Notice title="Note.">Sign-up closes Thursday.</Notice>
        </div>
      </SideColumn>
    </>
  );
}
