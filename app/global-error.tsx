"use client";

import { Button } from "@/components/ui/button";
import "./globals.css";

/** Stands in for the whole document when even the frame could not be made. */
export default function GlobalError({ retry }: { retry: () => void }) {
  return (
    <html lang="en-GB">
      <body>
        <title>Something went wrong · Cembalo</title>
        <main className="mx-auto flex w-full max-w-3xl flex-col items-start gap-4 px-4 py-16 md:px-8">
          <h1 className="text-3xl md:text-4xl">Cembalo could not be shown</h1>
          <p className="max-w-prose">
            Something went wrong on our side. What was saved is kept. Try again in a moment.
          </p>
          <Button kind="primary" onClick={() => retry()}>
            Try again
          </Button>
        </main>
      </body>
    </html>
  );
}
