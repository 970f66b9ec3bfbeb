import { beforeAll, beforeEach, describe, expect, test, vi } from "vitest";
import { DrizzleQueryError } from "drizzle-orm";
import { POST as rangeFit } from "@/app/api/v1/range-fit/route";
import { POST as vocalLines } from "@/app/api/v1/vocal-lines/route";
import { assertOwnOrigin } from "@/lib/auth/own-origin";
import { errorResponse } from "@/lib/auth/define-route";
import { log } from "@/lib/services/log";
import { as } from "../helpers/as";
import { makeWorld } from "../helpers/world";
import type { World } from "../helpers/world";

let world: World;
beforeAll(async () => {
  world = await makeWorld();
});
beforeEach(() => {
  as(world.people.md.userId);
});

const MEGABYTE = 1_048_576;

/** A body that says nothing of its length and goes on for as long as somebody reads, at most `most` megabytes. */
function endless(most: number) {
  const told = { megabytes: 0 };
  const body = new ReadableStream<Uint8Array>(
    {
      pull(controller) {
        if (told.megabytes >= most) {
          controller.close();
          return;
        }
        told.megabytes += 1;
        controller.enqueue(new Uint8Array(MEGABYTE).fill(0x20));
      },
    },
    { highWaterMark: 0 },
  );
  return { body, told };
}

const send = (body: ReadableStream<Uint8Array>, type: string): Request =>
  new Request("http://localhost:3000/api/v1", {
    method: "POST",
    body,
    headers: { "content-type": type, host: "localhost:3000" },
    duplex: "half",
  } as RequestInit);

describe("a body without end", () => {
  test("of JSON is read no further than its limit", async () => {
    const { body, told } = endless(40);
    expect((await rangeFit(send(body, "application/json"))).status).toBe(413);
    expect(told.megabytes).toBeLessThanOrEqual(3);
  });

  test("of a file is read no further than its limit", async () => {
    const { body, told } = endless(60);
    const answer = await vocalLines(send(body, "multipart/form-data; boundary=x"));
    expect(answer.status).toBe(413);
    expect(told.megabytes).toBeLessThanOrEqual(23);
  });
});

test("a page without an origin of its own writes nothing, also where the host is not said", () => {
  const request = new Request("http://localhost:3000/api/x", {
    method: "POST",
    headers: { origin: "null" },
  });
  expect(request.headers.get("host")).toBeNull();
  expect(() => assertOwnOrigin(request)).toThrow(/own pages/);
});

test("a query that failed is logged without the values it was sent", async () => {
  const seen = vi.spyOn(log, "error").mockImplementation(() => undefined);
  const cause = Object.assign(new Error("Duplicate entry 'wren@people.example' for key 'x'"), {
    errno: 1062,
    code: "ER_DUP_ENTRY",
  });
  const answer = errorResponse(
    new DrizzleQueryError("insert into `sessions` values (?, ?)", ["the-secret", "wren"], cause),
  );
  expect(answer.status).toBe(500);
  expect(await answer.text()).not.toContain("secret");
  const logged = JSON.stringify(seen.mock.calls);
  expect(logged).toContain("insert into `sessions`");
  expect(logged).toContain("ER_DUP_ENTRY");
  expect(logged).not.toMatch(/the-secret|wren/);
  seen.mockRestore();
});
