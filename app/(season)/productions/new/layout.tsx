import type { ReactNode } from "react";
import { pageActor } from "@/lib/auth/get-actor";
import { SeasonFrame } from "../../_components/season-frame";

export default async function NewProductionLayout({ children }: { children: ReactNode }) {
  const actor = await pageActor("/productions/new");
  return <SeasonFrame actor={actor}>{children}</SeasonFrame>;
}
