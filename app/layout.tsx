import type { Metadata, Viewport } from "next";
import { cookies } from "next/headers";
import type { ReactNode } from "react";
import { MODE_COOKIE, readMode } from "@/components/layout/mode";
import { Toaster } from "@/components/ui/toaster";
import { fontVariables } from "@/fonts";
import "./globals.css";

export const metadata: Metadata = {
  title: { default: "Cembalo", template: "%s · Cembalo" },
  description:
    "For the music director at the piano: auditions, casting by voice, rehearsal calls and pianists of a theatre season in one place.",
  robots: { index: false, follow: false },
  formatDetection: { telephone: false, date: false, address: false, email: false },
};

export const viewport: Viewport = {
  width: "device-width",
  initialScale: 1,
  themeColor: "#1c1814",
};

/** Reads the reading mode from its cookie, so that the first paint already has the right colours. */
export default async function RootLayout({ children }: { children: ReactNode }) {
  const mode = readMode((await cookies()).get(MODE_COOKIE)?.value);
  return (
    <html lang="en-GB" data-mode={mode} className={fontVariables}>
      <body>
        {children}
        <Toaster />
      </body>
    </html>
  );
}
