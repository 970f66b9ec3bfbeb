"use client";

import Link from "next/link";
import { LOST_CONNECTION } from "@/components/forms/lost-connection";
import { useId, useState, type ChangeEvent } from "react";
import { Button } from "@/components/ui/button";
import { Notice } from "@/components/ui/notice";
import { PendingButton } from "@/components/ui/pending-button";
import { Input } from "@/components/ui/input";
import type { ImportPreview } from "@/lib/auditions/import-preview";
import type { Imported } from "@/lib/data/auditions/import-singers";
import { importSingers } from "../../actions";
import { ImportTable } from "./import-table";

const people = (n: number): string => (n === 1 ? "1 singer" : `${String(n)} singers`);

async function askPreview(productionId: string, file: File): Promise<ImportPreview | string> {
  const body = new FormData();
  body.set("file", file);
  try {
    const response = await fetch(`/api/productions/${productionId}/auditions/import`, {
      method: "POST",
      body,
    });
    const answer = (await response.json()) as ImportPreview | { error: { message: string } };
    return "error" in answer ? answer.error.message : answer;
  } catch {
    return LOST_CONNECTION;
  }
}

/** Choose a file, look at what it says, and let the good rows in. */
export function ImportSingers({ productionId }: { productionId: string }) {
  const inputId = useId();
  const [preview, setPreview] = useState<ImportPreview | null>(null);
  const [problem, setProblem] = useState<string | null>(null);
  const [pending, setPending] = useState(false);
  const [done, setDone] = useState<Imported | null>(null);

  async function choose(event: ChangeEvent<HTMLInputElement>) {
    const file = event.currentTarget.files?.[0];
    if (!file) return;
    setPending(true);
    setProblem(null);
    setDone(null);
    const answer = await askPreview(productionId, file);
    setPending(false);
    if (typeof answer === "string") {
      setPreview(null);
      setProblem(answer);
    } else setPreview(answer);
  }

  const good =
    preview?.rows.filter((row) => row.becomes === "new person" || row.becomes === "known person") ??
    [];
  const bad = preview?.rows.filter((row) => row.becomes === "problem") ?? [];
  const already = preview?.rows.filter((row) => row.becomes === "signed up").length ?? 0;

  async function accept() {
    setPending(true);
    setProblem(null);
    const result = await importSingers({ productionId, rows: good.map((row) => row.values) }).catch(
      () => null,
    );
    setPending(false);
    if (result?.ok) setDone(result.data);
    else setProblem(result ? result.error.message : LOST_CONNECTION);
  }

  return (
    <div className="flex max-w-5xl flex-col gap-6">
      <div className="flex flex-wrap items-end gap-4">
        <div className="w-full max-w-md">
          <label htmlFor={inputId} className="text-sm font-bold">
            Spreadsheet, .xlsx or .csv
          </label>
          <p id={`${inputId}-hint`} className="mb-1 text-sm text-ink-2">
            Up to 2 MB, one singer a row, with the headings Name and E-mail at least.
          </p>
          <Input
            id={inputId}
            type="file"
            accept=".xlsx,.csv,.tsv,.txt"
            aria-describedby={`${inputId}-hint`}
            onChange={(event) => void choose(event)}
          />
        </div>
        <Button asChild>
          <a href={`/api/productions/${productionId}/auditions/template`} download>
            Download the empty form
          </a>
        </Button>
      </div>
      <div aria-live="polite" className="flex flex-col gap-3">
        {pending && !preview && <p className="text-ink-2">Reading the file…</p>}
        {problem !== null && <Notice tone="error" live={false} title={problem} />}
        {done && (
          <Notice
            tone="done"
            title={`${people(done.added)} signed up${done.newPeople > 0 ? `, ${String(done.newPeople)} of them new to the company` : ""}.`}
            actions={
              <Button asChild kind="primary">
                <Link href={`/productions/${productionId}/auditions`}>See the list</Link>
              </Button>
            }
          >
            {done.already > 0 && `${people(done.already)} on the list already stayed as they were.`}
          </Notice>
        )}
      </div>
      {preview && !done && (
        <>
          <div className="flex flex-wrap items-center justify-between gap-4 border-y border-rule py-3">
            <p>
              <strong>{people(good.length)}</strong> can go in
              {already > 0 && `, ${String(already)} on the list already`}
              {bad.length > 0 &&
                `, ${bad.length === 1 ? "1 row needs" : `${String(bad.length)} rows need`} another look`}
              .
            </p>
            <PendingButton
              kind="primary"
              pending={pending}
              disabled={good.length === 0}
              onClick={() => void accept()}
            >
              {`Sign up ${people(good.length)}`}
            </PendingButton>
          </div>
          {bad.length > 0 && (
            <Notice
              tone="caution"
              title={
                bad.length === 1
                  ? "One row is left out."
                  : `${String(bad.length)} rows are left out.`
              }
            >
              Put them right in the spreadsheet and choose it again later: nobody goes in twice.
            </Notice>
          )}
          {preview.unknownColumns.length > 0 && (
            <p className="text-sm text-ink-2">
              Left out, since these headings mean nothing here: {preview.unknownColumns.join(", ")}.
            </p>
          )}
          <ImportTable rows={preview.rows} />
        </>
      )}
    </div>
  );
}
