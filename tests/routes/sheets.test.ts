import ExcelJS from "exceljs";
import { eq } from "drizzle-orm";
import { beforeAll, describe, expect, test } from "vitest";
import { GET as acknowledged } from "@/app/api/productions/[productionId]/call-sheets/[issueId]/acknowledgements/route";
import { GET as download } from "@/app/api/productions/[productionId]/call-sheets/[issueId]/route";
import { issueSheet } from "@/app/(season)/productions/[productionId]/call-sheets/actions";
import {
  createCall,
  publishCall,
} from "@/app/(season)/productions/[productionId]/rehearsals/actions";
import { db } from "@/db/client";
import { newId } from "@/db/columns";
import * as t from "@/db/schema";
import { readSheetDay } from "@/lib/data/sheets/issues";
import { as } from "../helpers/as";
import { actorOf, callForm, makeRehearsalWorld } from "../helpers/rehearsal-world";
import type { RehearsalWorld } from "../helpers/rehearsal-world";

let world: RehearsalWorld;
let issueId: string;

beforeAll(async () => {
  world = await makeRehearsalWorld();
  await db
    .update(t.productions)
    .set({ title: "Évariste “the” Tide/Watcher" })
    .where(eq(t.productions.id, world.productionId));
  await db.update(t.roles).set({ name: "=SUM(A1)" }).where(eq(t.roles.id, world.roles.maren));
  await db
    .update(t.people)
    .set({ name: "=SUM(A1)" })
    .where(eq(t.people.id, world.people.otherActor.personId));
  as(world.people.md.userId);
  const made = await createCall(
    callForm(world, {
      hand: [{ personId: world.cover.personId, act: "call", reason: "=SUM(A1)", keys: ["b1"] }],
    }),
  );
  if (!made.ok) throw new Error(JSON.stringify(made.error));
  await publishCall({
    productionId: world.productionId,
    callId: made.data.callId,
    version: 1,
    despite: true,
  });
  const { seen } = await readSheetDay(await actorOf(world.people.md.userId), {
    productionId: world.productionId,
    localDate: "2027-04-06",
  });
  const issued = await issueSheet({
    productionId: world.productionId,
    localDate: "2027-04-06",
    seen,
    notes: "=1+1\n@home\n+44",
  });
  if (!issued.ok) throw new Error(JSON.stringify(issued.error));
  issueId = issued.data.issueId;
});

const get = (query = "", productionId = world.productionId, id = issueId) =>
  download(
    new Request(`http://localhost:3000/api/productions/${productionId}/call-sheets/${id}${query}`),
    { params: Promise.resolve({ productionId, issueId: id }) },
  );

async function opened(response: Response): Promise<ExcelJS.Worksheet> {
  const workbook = new ExcelJS.Workbook();
  await workbook.xlsx.load(await response.arrayBuffer());
  const [page] = workbook.worksheets;
  if (!page) throw new Error("no page");
  return page;
}

describe("an issue as a file", () => {
  test("the spreadsheet has everyone's name and no formula", async () => {
    as(world.people.stageManager.userId);
    const response = await get();
    expect(response.status).toBe(200);
    expect(response.headers.get("x-content-type-options")).toBe("nosniff");
    // RFC 6266 for the header, RFC 8187 for the encoded name.
    expect(response.headers.get("content-disposition")).toBe(
      `attachment; filename="Evariste _the_ Tide Watcher 2027-04-06, issue 1.xlsx"; filename*=UTF-8''%C3%89variste%20%E2%80%9Cthe%E2%80%9D%20Tide%20Watcher%202027-04-06%2C%20issue%201.xlsx`,
    );
    const page = await opened(response);
    const cells: ExcelJS.Cell[] = [];
    page.eachRow((row) => {
      row.eachCell((cell) => cells.push(cell));
    });
    expect(cells.filter((cell) => cell.type === ExcelJS.ValueType.Formula)).toEqual([]);
    const text = cells.map((cell) => cell.text).join("\n");
    for (const word of [
      "Wren Tallis, Imke Dorne",
      "=SUM(A1)",
      "Low Water",
      "Hanne Briscoe",
      "=1+1",
      "@home",
      "+44",
    ])
      expect(text).toContain(word);
  });

  test("prints on the company's paper unless another is asked for", async () => {
    as(world.people.stageManager.userId);
    // ECMA-376 Part 1, 18.3.1.63: 1 is Letter, 9 is A4.
    expect(Number((await opened(await get())).pageSetup.paperSize)).toBe(9);
    expect(Number((await opened(await get("?paper=Letter"))).pageSetup.paperSize)).toBe(1);
    expect((await get("?paper=Foolscap")).status).toBe(400);
  });

  test("the comma-separated file guards what a spreadsheet would work out", async () => {
    as(world.people.stageManager.userId);
    const response = await get("?format=csv");
    expect(response.headers.get("content-type")).toBe("text/csv; charset=utf-8");
    const text = await response.text();
    expect(text).toContain("Low Water");
    // ASVS 5.0.0, 1.2.10: no field of an export begins with = + - @.
    expect(text).not.toMatch(/(^|,)"?[=+\-@]/m);
  });

  test("the table reads it; strangers find nothing; nobody signed out", async () => {
    as(world.people.director.userId);
    expect((await get()).status).toBe(200);
    for (const [person, productionId] of [
      [world.people.siblingMd, world.productionId],
      [world.people.siblingMd, world.siblingProductionId],
      [world.people.outsiderMd, world.productionId],
      [world.people.outsiderMd, world.otherProductionId],
    ] as const) {
      as(person.userId);
      expect((await get("", productionId)).status).toBe(404);
    }
    for (const person of [world.people.actor, world.people.accompanist]) {
      as(person.userId);
      expect((await get()).status).toBe(403);
    }
    as(null);
    expect((await get()).status).toBe(401);
    as(world.people.stageManager.userId);
    expect((await get("", world.productionId, newId())).status).toBe(404);
    expect((await get("", world.productionId, "nonsense")).status).toBe(404);
  });
});

test("who has acknowledged is for those who issue", async () => {
  const ask = () =>
    acknowledged(new Request("http://localhost:3000/"), {
      params: Promise.resolve({ productionId: world.productionId, issueId }),
    });
  as(world.people.stageManager.userId);
  const response = await ask();
  expect(response.status).toBe(200);
  expect(await response.json()).toHaveLength(5);
  as(world.people.director.userId);
  expect((await ask()).status).toBe(403);
  as(world.people.outsiderMd.userId);
  expect((await ask()).status).toBe(404);
});
