import type { ReactNode } from "react";
import { pageActor } from "@/lib/auth/get-actor";
import { SeasonFrame } from "../../_components/season-frame";

export default async function CompaniesLayout({ children }: { children: ReactNode }) {
  const actor = await pageActor("/companies");
  return <SeasonFrame actor={actor}>{children}</SeasonFrame>;
}
