import { NextRequest } from "next/server";
import { SIGNED_IN } from "../personas";
import { ORIGIN, reads } from "./types";
import type { Doors } from "./types";

const fit = JSON.stringify({ singer: { low: 57, high: 74 }, line: { low: 60, high: 77 } });

/** Signing in and out, one's own account and page, health, the public API. */
export const AROUND: Doors = {
  "app/_frame/actions.ts#signOut": { may: "anyone", input: () => undefined },
  "app/(public)/actions.ts#requestLink": {
    may: "anyone",
    input: () => ({ email: "someone@people.example" }),
  },
  "app/(public)/actions.ts#signInWithPassword": {
    may: "anyone",
    input: () => ({ email: "someone@people.example", password: "not the right one" }),
  },
  "app/(public)/actions.ts#acceptInvitation": {
    may: "anyone",
    input: (w) => ({ token: w.invitationSecret }),
  },
  "app/api/auth/[...nextauth]/route.ts#GET": {
    may: "anyone",
    request: () => ({
      request: () =>
        new NextRequest(
          `${ORIGIN}/api/auth/callback/nodemailer?token=x&email=someone%40people.example`,
        ),
      params: {},
    }),
  },
  "app/api/health/route.ts#GET": reads("anyone", "/api/health"),
  "app/api/ready/route.ts#GET": reads("anyone", "/api/ready"),
  "app/api/v1/openapi.json/route.ts#GET": reads("anyone", "/api/v1/openapi.json"),
  "app/api/v1/range-fit/route.ts#POST": {
    may: SIGNED_IN,
    request: () => ({
      request: () => new Request(`${ORIGIN}/api/v1/range-fit`, { method: "POST", body: fit }),
      params: {},
    }),
  },
  "app/api/v1/vocal-lines/route.ts#POST": {
    may: SIGNED_IN,
    request: () => ({
      request: () =>
        new Request(`${ORIGIN}/api/v1/vocal-lines`, {
          method: "POST",
          body: fit,
          headers: { "content-type": "application/json" },
        }),
      params: {},
    }),
  },
  "app/(me)/account/actions.ts#changeName": {
    may: SIGNED_IN,
    input: () => ({ name: "Another Name" }),
  },
  "app/(me)/account/actions.ts#setPassword": {
    may: SIGNED_IN,
    input: () => ({ current: "", password: "seven quiet herons" }),
  },
  "app/(me)/account/actions.ts#removePassword": {
    may: SIGNED_IN,
    input: () => ({ current: "nothing set" }),
  },
  "app/(me)/account/actions.ts#endOtherSessions": { may: SIGNED_IN, input: () => ({}) },
  // Nobody can name another's session or token: it is not found, and so for everyone here.
  "app/(me)/account/actions.ts#endSession": {
    may: [],
    input: () => ({ sessionId: "0".repeat(32) }),
  },
  "app/(me)/account/actions.ts#createToken": {
    may: SIGNED_IN,
    input: () => ({ label: "For the test" }),
  },
  "app/(me)/account/actions.ts#revokeToken": { may: [], input: (w) => ({ tokenId: w.roleId }) },
  "app/(me)/actions.ts#answerSlot": {
    may: ["actor"],
    input: (w) => ({ signUpId: w.signUpId, slotId: w.slotId, answer: "confirm" }),
  },
  "app/(me)/actions.ts#answerCallback": {
    may: ["actor"],
    input: (w) => ({ invitationId: w.invitationId, answer: "yes" }),
  },
  "app/(me)/actions.ts#acknowledgeSheet": {
    may: ["actor"],
    input: (w) => ({ issueId: w.issueId }),
  },
  "app/(me)/actions.ts#claimRange": {
    may: ["actor"],
    input: (w) => ({
      personIds: [w.people.actor.personId],
      range: { low: 55, high: 79 },
      comfortable: { low: null, high: null },
    }),
  },
  // There is no open invitation to the address of anyone here.
  "app/(me)/actions.ts#joinCompany": {
    may: [],
    input: (w) => ({ invitationId: w.accountInvitationId }),
  },
  "app/(me)/actions.ts#addConflict": {
    may: ["actor"],
    input: (w) => ({
      personIds: [w.people.actor.personId],
      span: "day",
      from: "2027-04-02",
      to: "",
      timeFrom: "",
      timeTo: "",
      reason: "",
    }),
  },
  "app/(me)/actions.ts#removeConflicts": {
    may: ["actor"],
    input: (w) => ({ conflictIds: [w.conflictId] }),
  },
  "app/(me)/actions.ts#restoreConflicts": {
    may: ["actor"],
    input: (w) => ({ conflictIds: [w.conflictId] }),
  },
};
