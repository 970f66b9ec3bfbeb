import { createHash } from "node:crypto";
import { readFileSync } from "node:fs";
import path from "node:path";
import { eq } from "drizzle-orm";
import { POST } from "@/app/api/productions/[productionId]/score/route";
import { db } from "@/db/client";
import * as t from "@/db/schema";
import { addNumber, addRole } from "@/app/(season)/productions/[productionId]/score/actions";
import { loadActor } from "@/lib/data/actor";
import type { Actor } from "@/lib/permissions/types";
import { as } from "./as";

const MUSIC = path.resolve(import.meta.dirname, "../fixtures/music");

/** A fixture's bytes; `tests/fixtures/music/README.md` names source and licence of each folder. */
export function music(name: string): Uint8Array<ArrayBuffer> {
  return new Uint8Array(readFileSync(path.join(MUSIC, name)));
}

export const LONG_DAY = "works/sullivan-the-long-day-closes.mxl";

/** Sends a file to the route as a browser's form does. */
export function upload(
  productionId: string,
  bytes: Uint8Array<ArrayBuffer>,
  fileName: string,
  fields: Record<string, string> = {},
): Promise<Response> {
  const form = new FormData();
  form.set("file", new Blob([bytes]), fileName);
  for (const [name, value] of Object.entries(fields)) form.set(name, value);
  const request = new Request(`http://localhost:3000/api/productions/${productionId}/score`, {
    method: "POST",
    body: form,
    headers: { "sec-fetch-site": "same-origin" },
  });
  return POST(request, { params: Promise.resolve({ productionId }) });
}

export const sha256 = (bytes: Uint8Array): string =>
  createHash("sha256").update(bytes).digest("hex");

export type Kept = {
  scoreId: string;
  fileId: string;
  sha256: string;
  bytes: number;
  title: string;
};

/** Reads and keeps a fixture as this person; throws when refused. */
export async function keep(userId: string, productionId: string, name = LONG_DAY): Promise<Kept> {
  as(userId);
  const bytes = music(name);
  const response = await upload(productionId, bytes, path.basename(name), {
    sha256: sha256(bytes),
  });
  if (!response.ok) throw new Error(await response.text());
  return (await response.json()) as Kept;
}

/** The parts of a reading in their order. */
export function partsOf(scoreId: string) {
  return db
    .select()
    .from(t.scoreParts)
    .where(eq(t.scoreParts.scoreId, scoreId))
    .orderBy(t.scoreParts.place);
}

/** What the review form sends for a new number, with these parts as they are told. */
export function confirmation(
  productionId: string,
  scoreId: string,
  parts: { scorePartId: string; to: string; name?: string; octaveShift?: number }[],
  extra: object = {},
) {
  return {
    productionId,
    scoreId,
    numberId: "",
    label: "1",
    title: "The Long Day Closes",
    key: "E",
    keyFifths: "4",
    metre: "3/4",
    tempo: "66",
    bars: "67",
    length: "3:03",
    parts: parts.map((part) => ({ octaveShift: 0, name: "", ...part })),
    ...extra,
  };
}

/** The data of an action's answer; throws when it was refused. */
export async function data<T>(
  result: Promise<{ ok: true; data: T } | { ok: false; error: { message: string } }>,
): Promise<T> {
  const answer = await result;
  if (!answer.ok) throw new Error(JSON.stringify(answer.error));
  return answer.data;
}

/** What the form of a number sends. */
export const numberInput = (productionId: string, label: string, title = `Number ${label}`) => ({
  productionId,
  label,
  title,
  key: "d",
  metre: "3/4",
  tempo: "96",
  bars: "40",
  length: "2:10",
});

/** What the form of a role sends. */
export const roleInput = (productionId: string, name: string) => ({
  productionId,
  name,
  kind: "principal" as const,
  needed: "1",
  covers: "1",
  about: "",
});

/** Adds a number as whoever is asking; its id. */
export async function makeNumber(productionId: string, label: string): Promise<string> {
  return (await data(addNumber(numberInput(productionId, label)))).numberId;
}

/** Adds a role as whoever is asking; its id. */
export async function makeRole(productionId: string, name: string): Promise<string> {
  return (await data(addRole(roleInput(productionId, name)))).roleId;
}

/** Everyone's lines in a number, in the order they were written. */
export function linesIn(numberId: string) {
  return db
    .select({
      id: t.vocalLines.id,
      role: t.roles.name,
      roleId: t.roles.id,
      source: t.vocalLines.source,
      low: t.vocalLines.lowSpelled,
      high: t.vocalLines.highSpelled,
    })
    .from(t.vocalLines)
    .innerJoin(t.roles, eq(t.roles.id, t.vocalLines.roleId))
    .where(eq(t.vocalLines.numberId, numberId))
    .orderBy(t.vocalLines.id);
}

/** The login as the data layer knows it. */
export async function actorOf(userId: string): Promise<Actor> {
  const actor = await loadActor(userId);
  if (!actor) throw new Error("no such login");
  return actor;
}
