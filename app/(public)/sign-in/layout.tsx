import type { ReactNode } from "react";
import { PublicFrame } from "../_components/public-frame";

export default function SignInLayout({ children }: { children: ReactNode }) {
  return <PublicFrame>{children}</PublicFrame>;
}
