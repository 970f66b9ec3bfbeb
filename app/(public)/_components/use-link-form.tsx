"use client";

import { useState } from "react";
import { Button } from "@/components/ui/button";

/** The button that uses a sign-in link up. It goes out once: a second press would find the link used already. */
export function UseLinkForm({
  fields,
}: {
  fields: { token: string; email: string; callbackUrl: string };
}) {
  const [sent, setSent] = useState(false);
  return (
    <form
      method="get"
      action="/api/auth/callback/nodemailer"
      onSubmit={(event) => {
        if (sent) event.preventDefault();
        setSent(true);
      }}
    >
      {Object.entries(fields).map(([name, value]) => (
        <input key={name} type="hidden" name={name} value={value} />
      ))}
      <Button
        type="submit"
        kind="primary"
        size="large"
        aria-disabled={sent || undefined}
        className="max-sm:w-full"
      >
        {sent ? "Signing in" : "Sign in"}
      </Button>
    </form>
  );
}
