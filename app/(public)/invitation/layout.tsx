import type { ReactNode } from "react";
import { PublicFrame } from "../_components/public-frame";

export default function InvitationLayout({ children }: { children: ReactNode }) {
  return <PublicFrame>{children}</PublicFrame>;
}
