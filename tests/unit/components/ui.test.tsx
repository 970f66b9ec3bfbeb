import { renderToStaticMarkup } from "react-dom/server";
import { describe, expect, test } from "vitest";
import { LOST_CONNECTION } from "@/components/forms/lost-connection";
import { sortMessages } from "@/components/forms/use-action-form";
import { FormError } from "@/components/forms/form-error";
import { keyInUse } from "@/components/layout/keys-nav";
import { readMode } from "@/components/layout/mode";
import { Button } from "@/components/ui/button";
import { Field, FieldGroup } from "@/components/ui/field";
import { clock, formatDuration } from "@/components/ui/format-duration";
import { Input } from "@/components/ui/input";
import { RadioGroup } from "@/components/ui/radio-group";
import { TimeText } from "@/components/ui/time-text";
import { currentToasts, dropToast, showToast, watchToasts } from "@/components/ui/toast-store";

describe("a field", () => {
  test("ties label, hint and error to its control", () => {
    const html = renderToStaticMarkup(
      <Field id="mail" label="Your e-mail" hint="We send a link." error="It needs an @.">
        <Input type="email" />
      </Field>,
    );
    expect(html).toContain('<label for="mail"');
    expect(html).toMatch(/<input[^>]*id="mail"/);
    expect(html).toMatch(/<input[^>]*aria-describedby="mail-hint mail-error"/);
    expect(html).toMatch(/<input[^>]*aria-invalid="true"/);
    expect(html).toMatch(/id="mail-error"[^>]*>It needs an @\.</);
  });

  test("says nothing of an error while there is none", () => {
    const html = renderToStaticMarkup(
      <Field label="Title" error={undefined}>
        <Input />
      </Field>,
    );
    expect(html).not.toContain("aria-invalid=");
    expect(html).not.toContain("aria-describedby=");
  });

  test("a group ties its error to the fieldset", () => {
    const html = renderToStaticMarkup(
      <FieldGroup legend="Voice" error="Choose one.">
        <Input />
      </FieldGroup>,
    );
    const id = /<fieldset[^>]*aria-describedby="([^"]+)"/.exec(html)?.[1];
    expect(id).toBeDefined();
    expect(html).toContain(`<p id="${String(id)}"`);
  });
});

test("radio buttons checked by their parent show its value and no other", () => {
  const html = renderToStaticMarkup(
    <RadioGroup
      legend="Text"
      name="text"
      look="squares"
      value="4"
      onChange={() => undefined}
      options={["3", "4", "5"].map((value) => ({ value, label: value }))}
    />,
  );
  expect(html.match(/checked=""/g)).toHaveLength(1);
  expect(html).toMatch(/<input[^>]*value="4"[^>]*checked=""|<input[^>]*checked=""[^>]*value="4"/);
});

test("a button never sends a form unless told, and gives its looks to a link", () => {
  expect(renderToStaticMarkup(<Button>Save</Button>)).toContain('type="button"');
  const link = renderToStaticMarkup(
    <Button asChild kind="primary">
      <a href="/people">People</a>
    </Button>,
  );
  expect(link).toMatch(/^<a [^>]*bg-ink/);
  expect(link).not.toContain("<button");
});

describe("the key in use", () => {
  const items = [
    { href: "/productions/1", label: "Overview", exact: true },
    { href: "/productions/1/score", label: "Score" },
    { href: "/productions/1/auditions", label: "Auditions" },
  ];

  test.each([
    ["/productions/1", "Overview"],
    ["/productions/1/score", "Score"],
    ["/productions/1/auditions/7/door", "Auditions"],
  ])("%s presses %s", (path, label) => {
    expect(keyInUse(items, path)?.label).toBe(label);
  });

  test("a longer name that only begins alike presses nothing", () => {
    expect(keyInUse(items, "/productions/1/scores")).toBeUndefined();
    expect(keyInUse(items, "/productions/2/score")).toBeUndefined();
  });
});

test("an unknown mode in the cookie is the day", () => {
  expect(readMode("lamp")).toBe("lamp");
  for (const value of [undefined, "", "night", "LAMP", '"><script>']) {
    expect(readMode(value)).toBe("day");
  }
});

describe("an action's messages", () => {
  test("go to their fields in the form's order; those without a field to the form", () => {
    const { known, other } = sortMessages(
      { "rooms.0.name": "Name it.", form: "The day is past.", title: "Write one." },
      ["title", "rooms"],
    );
    expect(known).toEqual([
      ["title", "Write one."],
      ["rooms.0.name", "Name it."],
    ]);
    expect(other).toEqual(["The day is past."]);
  });

  test("a form's message is announced, and its place is there before it comes", () => {
    expect(renderToStaticMarkup(<FormError message={null} />)).toContain("aria-live");
    expect(renderToStaticMarkup(<FormError message={LOST_CONNECTION} />)).toContain(
      "Nothing was lost: check the connection and press again.",
    );
  });
});

describe("times and lengths", () => {
  test.each([
    [45, "45 min"],
    [60, "1 h"],
    [125, "2 h 05"],
    [0, "0 min"],
    [61, "1 h 01"],
  ])("%i minutes", (minutes, written) => {
    expect(formatDuration(minutes)).toBe(written);
  });

  test("a clock past midnight goes on from 00:00", () => {
    expect(clock(1110)).toBe("18:30");
    expect(clock(1450)).toBe("00:10");
    expect(clock(-30)).toBe("23:30");
  });

  test("an instant is written in the zone it is given, on both sides of a clock change", () => {
    // Central European summer time begins on 28 March 2027 at 01:00 UTC (IANA tz database).
    const write = (at: string) =>
      renderToStaticMarkup(<TimeText at={at} timeZone="Europe/Zurich" show="both" />);
    expect(write("2027-03-27T18:00:00Z")).toContain("Sat 27 Mar, 19:00");
    expect(write("2027-03-28T18:00:00Z")).toContain("Sun 28 Mar, 20:00");
    expect(write("2027-03-28T22:30:00Z")).toContain("Mon 29 Mar, 00:30");
  });
});

test("toasts: three at most, watchers told, dropped by id", () => {
  let told = 0;
  const stop = watchToasts(() => {
    told += 1;
  });
  for (const title of ["one", "two", "three", "four"]) showToast({ title });
  expect(currentToasts().map((toast) => toast.title)).toEqual(["two", "three", "four"]);
  const second = currentToasts()[1];
  dropToast(second?.id ?? NaN);
  expect(currentToasts().map((toast) => toast.title)).toEqual(["two", "four"]);
  expect(told).toBe(5);
  stop();
  showToast({ title: "five" });
  expect(told).toBe(5);
});
