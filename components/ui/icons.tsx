import type { ReactNode } from "react";

function Icon({ children }: { children: ReactNode }) {
  return (
    <svg
      viewBox="0 0 16 16"
      width="16"
      height="16"
      fill="none"
      stroke="currentColor"
      strokeWidth="1.75"
      strokeLinecap="round"
      strokeLinejoin="round"
      aria-hidden="true"
      className="shrink-0"
    >
      {children}
    </svg>
  );
}

export function CloseIcon() {
  return (
    <Icon>
      <path d="M3.5 3.5l9 9m0-9l-9 9" />
    </Icon>
  );
}

export function CheckIcon() {
  return (
    <Icon>
      <path d="M2.5 8.5l3.5 3.5 7.5-8" />
    </Icon>
  );
}

export function MoreIcon() {
  return (
    <Icon>
      <path d="M3 8h.01M8 8h.01M13 8h.01" strokeWidth="2.5" />
    </Icon>
  );
}

export function ChevronDownIcon() {
  return (
    <Icon>
      <path d="M3.5 6l4.5 4.5L12.5 6" />
    </Icon>
  );
}

export function SortIcon({ direction }: { direction: "asc" | "desc" | false }) {
  return (
    <Icon>
      {direction !== "desc" && <path d="M5 6.5L8 3.5l3 3" opacity={direction ? 1 : 0.6} />}
      {direction !== "asc" && <path d="M5 9.5l3 3 3-3" opacity={direction ? 1 : 0.6} />}
    </Icon>
  );
}
