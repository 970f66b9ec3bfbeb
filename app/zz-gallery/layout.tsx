import { AppFrame } from "@/components/layout/app-frame";
export default function L({ children }: { children: React.ReactNode }) {
  return (
    <AppFrame
      crumbs={[{ label: "Lantern Street Theatre", href: "/zz-gallery" }, { label: "The Tidewatcher" }]}
      today="Thursday 11 March"
      account={{ name: "Rosa Orme", initials: "RO", entries: [
        { kind: "link", label: "My page", href: "/me" }, { kind: "link", label: "Account", href: "/account" },
        { kind: "line" }, { kind: "heading", label: "Companies" }, { kind: "link", label: "Lantern Street Theatre", href: "/x", current: true, note: "here" },
        { kind: "line" }, { kind: "mode" }, { kind: "line" }, { kind: "link", label: "Sign out", href: "/out" },
      ] }}
      nav={{ label: "Production", items: ["Score","Auditions","Callbacks","Casting","Rehearsals","Pianists","Call sheets","People"].map((l) => ({ label: l, href: l === "Casting" ? "/zz-gallery" : `/zz/${l.toLowerCase().replace(" ","-")}` })) }}
    >
      {children}
    </AppFrame>
  );
}
