import ExcelJS from "exceljs";
import { afterAll, beforeAll, describe, expect, test, vi } from "vitest";
import { GET as getDoor } from "@/app/api/door/[token]/route";
import { GET as getDay } from "@/app/api/productions/[productionId]/auditions/[dayId]/route";
import { POST as postImport } from "@/app/api/productions/[productionId]/auditions/import/route";
import { GET as getTemplate } from "@/app/api/productions/[productionId]/auditions/template/route";
import { makeDoorLink } from "@/app/(season)/productions/[productionId]/auditions/actions";
import type { AuditionDayView } from "@/lib/auditions/day-view";
import type { ImportPreview } from "@/lib/auditions/import-preview";
import { as } from "../helpers/as";
import { makeDay, makeSignUps } from "../helpers/audition-day";
import { makeWorld } from "../helpers/world";
import type { World } from "../helpers/world";

let world: World;
let dayId: string;
beforeAll(async () => {
  // The days below lie ahead, whenever the tests run: only the date stands still, timers go on.
  vi.useFakeTimers({ toFake: ["Date"], now: new Date("2027-03-01T12:00:00Z") });
  world = await makeWorld();
  dayId = await makeDay(world, "2027-03-20");
  await makeSignUps(world, 3, "route", { phone: "0000 555 011" });
});
afterAll(() => {
  vi.useRealTimers();
});

const ORIGIN = "http://localhost:3000";
const context = <P>(params: P) => ({ params: Promise.resolve(params) });
const day = (productionId = world.productionId, id = dayId) =>
  getDay(new Request(`${ORIGIN}/x`), context({ productionId, dayId: id }));
const upload = (
  file: File | null,
  headers: Record<string, string> = {},
  productionId = world.productionId,
) => {
  const body = new FormData();
  if (file) body.set("file", file);
  return postImport(
    new Request(`${ORIGIN}/x`, {
      method: "POST",
      body,
      headers: { host: "localhost:3000", ...headers },
    }),
    context({ productionId }),
  );
};
const csv = (text: string, name = "singers.csv") => new File([text], name, { type: "text/csv" });

describe("the audition day", () => {
  test("answers those who may read auditions, without anyone's address", async () => {
    const p = world.people;
    for (const person of [
      p.md,
      p.assistant,
      p.stageManager,
      p.director,
      p.choreographer,
      p.producer,
    ]) {
      as(person.userId);
      const response = await day();
      expect(response.status, person.name).toBe(200);
      expect(response.headers.get("cache-control")).toContain("no-store");
      const text = await response.text();
      expect(text).not.toContain("@singers.example");
      expect(text).not.toContain("0000 555");
      expect((JSON.parse(text) as AuditionDayView).waiting).toHaveLength(3);
    }
    for (const person of [p.accompanist, p.actor, p.admin]) {
      as(person.userId);
      expect((await day()).status, person.name).toBe(403);
    }
  });

  test("is not there for another company, another production, or as nobody", async () => {
    as(world.people.outsiderMd.userId);
    expect((await day()).status).toBe(404);
    expect((await day(world.otherProductionId)).status).toBe(404);
    as(world.people.md.userId);
    expect((await day("nonsense")).status).toBe(404);
    expect((await day(world.productionId, "nonsense")).status).toBe(404);
    as(null);
    expect((await day()).status).toBe(401);
  });
});

describe("the import", () => {
  test("previews each row and lists the bad ones with reasons", async () => {
    as(world.people.md.userId);
    const response = await upload(
      csv(
        "Name,E-mail,Lowest note,Highest note\nAda Reed,ada@singers.example,A3,E5\n,nobody@singers.example,,\nBo Finch,not-an-address,,\nCy Ode,cy@singers.example,C9,C9\n",
      ),
    );
    expect(response.status).toBe(200);
    const preview = (await response.json()) as ImportPreview;
    expect(preview.rows.map((row) => [row.line, row.becomes])).toEqual([
      [2, "new person"],
      [3, "problem"],
      [4, "problem"],
      [5, "problem"],
    ]);
    expect(preview.rows[1]?.problems).toEqual([
      "The name is missing. Write the name the singer uses.",
    ]);
    expect(preview.rows[2]?.problems[0]).toContain("is not an e-mail address");
  });

  test("refuses no file, too large a file, other kinds, other sites and those who may not", async () => {
    as(world.people.md.userId);
    expect((await upload(null)).status).toBe(400);
    expect((await upload(csv("x".repeat(2 * 1024 * 1024 + 10)))).status).toBe(413);
    expect(
      (await upload(new File([new Uint8Array([0x89, 0x50, 0x4e, 0x47])], "list.xlsx"))).status,
    ).toBe(415);
    expect(
      (await upload(csv("Name,E-mail\na,a@b.example\n"), { origin: "https://elsewhere.example" }))
        .status,
    ).toBe(403);
    for (const person of [world.people.director, world.people.accompanist, world.people.actor]) {
      as(person.userId);
      expect((await upload(csv("Name,E-mail\na,a@b.example\n"))).status, person.name).toBe(403);
    }
    as(world.people.outsiderMd.userId);
    expect((await upload(csv("Name,E-mail\na,a@b.example\n"))).status).toBe(404);
    as(null);
    expect((await upload(csv("Name,E-mail\na,a@b.example\n"))).status).toBe(401);
  });

  test("gives out a form that it reads back, its example row refused", async () => {
    as(world.people.stageManager.userId);
    const response = await getTemplate(
      new Request(`${ORIGIN}/x`),
      context({ productionId: world.productionId }),
    );
    expect(response.headers.get("content-disposition")).toBe('attachment; filename="singers.xlsx"');
    const bytes = await response.arrayBuffer();
    const book = new ExcelJS.Workbook();
    await book.xlsx.load(bytes);
    expect(book.worksheets[0]?.getRow(1).getCell(1).text).toBe("Name");
    as(world.people.md.userId);
    const preview = (await (
      await upload(new File([bytes], "singers.xlsx"))
    ).json()) as ImportPreview;
    expect(preview.rows.map((row) => row.becomes)).toEqual(["problem"]);
    as(world.people.actor.userId);
    expect(
      (await getTemplate(new Request(`${ORIGIN}/x`), context({ productionId: world.productionId })))
        .status,
    ).toBe(403);
  });
});

describe("the door", () => {
  test("a wrong token is 404; a right one needs no sign-in", async () => {
    as(world.people.md.userId);
    const made = await makeDoorLink({ productionId: world.productionId, dayId });
    if (!made.ok) throw new Error(made.error.message);
    as(null);
    const door = (token: string) =>
      getDoor(
        new Request(`${ORIGIN}/x`, { headers: { "x-forwarded-for": "192.0.2.44" } }),
        context({ token }),
      );
    expect((await door("wrong")).status).toBe(404);
    const right = await door(made.data.link.split("/door/")[1] ?? "");
    expect(right.status).toBe(200);
    // It is 1 March: the answer says when the link opens.
    expect(await right.json()).toMatchObject({ open: false });
  });
});
