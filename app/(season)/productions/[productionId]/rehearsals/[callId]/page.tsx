import type { Metadata } from "next";
import Link from "next/link";
import { notFound } from "next/navigation";
import { LiveData } from "@/components/layout/live-data";
import { PageTitle } from "@/components/layout/page-title";
import { SideColumn } from "@/components/layout/side-column";
import { CallLadder } from "@/components/schedule/call-ladder";
import { Button } from "@/components/ui/button";
import { Chip } from "@/components/ui/chip";
import { Notice } from "@/components/ui/notice";
import { CALL_KIND_NAMES } from "@/lib/calls/call-kinds";
import { orNotFound } from "@/lib/auth/deny";
import { pageActor } from "@/lib/auth/get-actor";
import { readCall, readCallClashes } from "@/lib/data/calls/read";
import type { CallRead } from "@/lib/data/calls/read";
import { callAddressSchema } from "@/lib/schemas/calls";
import { fieldsOf } from "../_components/call-fields";
import { BringUpToDate, CallButtons } from "./_components/call-buttons";
import { WaitingAndChanges } from "./_components/call-side";
import { ladderRows } from "./_components/ladder-rows";
import { WhoCannotCome } from "./_components/who-cannot-come";

export const metadata: Metadata = { title: "Call" };

/** One call: its blocks in running order, who sings when and who waits, and who can't come. */
export default async function CallPage({
  params,
}: PageProps<"/productions/[productionId]/rehearsals/[callId]">) {
  const address = callAddressSchema.safeParse(await params);
  if (!address.success) notFound();
  const { productionId, callId } = address.data;
  const actor = await pageActor(`/productions/${productionId}/rehearsals/${callId}`);
  const call = await orNotFound(readCall(actor, address.data));
  const clashes =
    call.mayChange && call.state !== "cancelled"
      ? await readCallClashes(actor, address.data)
      : null;
  const title = `${call.title ?? CALL_KIND_NAMES[call.kind]}, ${call.day}`;
  const seen = { productionId, callId, version: call.version };
  return (
    <>
      <PageTitle
        title={title}
        sub={[
          call.span,
          call.room ?? "no room yet",
          call.pianist === null ? "no pianist" : `${call.pianist} at the piano`,
          countOf(call),
        ].join(" · ")}
        chips={
          call.state === "published" ? null : (
            <Chip tone={call.state === "draft" ? "info" : "clash"}>
              {call.state === "draft" ? "Draft" : "Cancelled"}
            </Chip>
          )
        }
        actions={
          <>
            {call.state === "published" && (
              <Button asChild>
                <Link href={`/productions/${productionId}/call-sheets/${call.localDate}`}>
                  Call sheet
                </Link>
              </Button>
            )}
            {call.mayChange && call.state !== "cancelled" && (
              <Button asChild>
                <Link href={`/productions/${productionId}/rehearsals/${callId}/change`}>
                  Change
                </Link>
              </Button>
            )}
            {call.mayChange && (
              <CallButtons {...seen} state={call.state} mayPublish={call.mayPublish} />
            )}
          </>
        }
      />
      <OutOfStep call={call} seen={seen} />
      {call.castHidden && !clashes ? (
        <Ladder call={call} label={title} />
      ) : (
        <SideColumn
          sideLabel="Waiting and clashes"
          side={
            <>
              {!call.castHidden && <WaitingAndChanges call={call} />}
              {clashes && (
                <LiveData>
                  <WhoCannotCome
                    {...seen}
                    fields={call.draft ? fieldsOf(call.draft) : null}
                    initial={clashes}
                  />
                </LiveData>
              )}
            </>
          }
        >
          <Ladder call={call} label={title} />
        </SideColumn>
      )}
    </>
  );
}

function countOf(call: CallRead): string {
  const numbers = call.blocks.filter((block) => block.kind === "number").length;
  if (numbers === 0)
    return `${String(call.blocks.length)} ${call.blocks.length === 1 ? "block" : "blocks"}`;
  return numbers === 1 ? "one number" : `${String(numbers)} numbers`;
}

function OutOfStep({
  call,
  seen,
}: {
  call: CallRead;
  seen: { productionId: string; callId: string; version: number };
}) {
  const { needed, notNeeded } = call.outOfStep;
  if (call.state === "cancelled" || needed.length + notNeeded.length === 0) return null;
  const parts = [
    needed.length > 0 ? `Needed now and not called: ${needed.join(", ")}.` : "",
    notNeeded.length > 0 ? `Called and not needed any more: ${notNeeded.join(", ")}.` : "",
  ];
  return (
    <Notice
      tone="caution"
      className="mb-6"
      title="The score or the casting has changed since."
      actions={<BringUpToDate {...seen} />}
    >
      {parts.filter(Boolean).join(" ")}
    </Notice>
  );
}

function Ladder({ call, label }: { call: CallRead; label: string }) {
  const [hours = 0, minutes = 0] = call.localTime.split(":").map(Number);
  const start = hours * 60 + minutes;
  const at = (offset: number) => start + offset;
  const rows = ladderRows(call.blocks);
  const leads = call.leader === null ? "" : `${call.leader} leads. `;
  return (
    <>
      {call.castHidden && call.state !== "published" && (
        <Notice className="mb-6" title="The cast list is not out yet.">
          Who is called by hand shows here; whom the score calls, once it is.
          {call.mayPublish ? "" : " Ask the music director to publish this call."}
        </Notice>
      )}
      <CallLadder
        label={label}
        blocks={call.blocks
          .filter((block) => block.kind !== "break")
          .map((block) => ({
            id: block.key,
            title: block.title,
            start: at(block.offset),
            minutes: block.minutes,
            ...(block.label !== null && { number: block.label }),
          }))}
        rows={rows}
        breaks={call.blocks
          .filter((block) => block.kind === "break")
          .map((block) => ({ start: at(block.offset), minutes: block.minutes }))}
      />
      <p className="mt-6 text-sm text-ink-2">
        {leads}
        {[call.room, call.venue, call.address]
          .filter((part) => part !== null && part !== "")
          .join(", ")}
      </p>
      <ul className="mt-2 text-sm text-ink-2">
        {rows.map(
          (row) =>
            row.crowd && (
              <li key={row.id}>
                {row.name}: {row.crowd.join(", ")}
              </li>
            ),
        )}
        {call.blocks
          .filter((block) => block.bars !== null || block.detail !== null)
          .map((block) => (
            <li key={block.key}>
              {block.title}:{" "}
              {[block.bars === null ? "" : `bars ${block.bars}`, block.detail ?? ""]
                .filter(Boolean)
                .join(", ")}
            </li>
          ))}
      </ul>
    </>
  );
}
