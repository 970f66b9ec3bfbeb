import type { Metadata } from "next";
import Link from "next/link";
import { AppFrame } from "@/components/layout/app-frame";
import { Button } from "@/components/ui/button";

export const metadata: Metadata = { title: "Not here" };

export default function NotFound() {
  return (
    <AppFrame>
      <h1 className="text-3xl md:text-4xl">There is no such page for you</h1>
      <p className="mt-3 max-w-prose text-lg">
        It may have been removed, or the address is not whole, or it is not for your position. If
        someone sent you here, ask them to invite you.
      </p>
      <div className="mt-6 flex flex-wrap gap-3">
        <Button asChild kind="primary">
          <Link href="/season">Go to your season</Link>
        </Button>
        <Button asChild>
          <Link href="/me">Go to your own page</Link>
        </Button>
      </div>
    </AppFrame>
  );
}
