"use client";

import { useEffect, useRef, useState } from "react";
import type { CallCheck } from "@/lib/data/calls/check";
import { checkCall } from "../actions";
import type { CallFields } from "./call-fields";

export type CheckState =
  | { at: "incomplete" }
  | { at: "checking"; last: CallCheck | null }
  | { at: "checked"; check: CallCheck }
  | { at: "failed"; message: string; last: CallCheck | null };

const WAIT_MS = 450;

/** Looks at the call as it stands in the form, a moment after the last change; an older answer never replaces a newer one. */
export function useCallCheck(fields: CallFields, callId: string | null): CheckState {
  const [state, setState] = useState<CheckState>({ at: "incomplete" });
  const asked = useRef(0);
  const text = JSON.stringify({ ...fields, callId });
  useEffect(() => {
    const mine = (asked.current += 1);
    const input = JSON.parse(text) as CallFields & { callId: string | null };
    const timer = setTimeout(() => {
      void isComplete(input).then((complete) => {
        if (mine !== asked.current) return;
        if (!complete) setState({ at: "incomplete" });
        else ask();
      });
    }, WAIT_MS);
    function ask() {
      setState((before) => ({ at: "checking", last: lastOf(before) }));
      void checkCall(input)
        .catch(() => null)
        .then((result) => {
          if (mine !== asked.current) return;
          if (result?.ok) setState({ at: "checked", check: result.data });
          else {
            const message =
              result?.error.message ??
              "The server did not answer, so clashes are not known. Check the connection.";
            setState((before) => ({ at: "failed", message, last: lastOf(before) }));
          }
        });
    }
    return () => clearTimeout(timer);
  }, [text]);
  return state;
}

/** Whether the form is filled in far enough to be checked; the schema is fetched when it is first needed. */
async function isComplete(input: unknown): Promise<boolean> {
  try {
    const { checkCallSchema } = await import("@/lib/schemas/calls");
    return checkCallSchema.safeParse(input).success;
  } catch {
    // Without it the server is asked, which checks for itself.
    return true;
  }
}

/** The newest check there is, also while a newer one is on its way. */
export function lastOf(state: CheckState): CallCheck | null {
  if (state.at === "checked") return state.check;
  return state.at === "incomplete" ? null : state.last;
}
