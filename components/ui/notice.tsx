import type { ReactNode } from "react";
import { cx } from "./cx";

export type NoticeTone = "info" | "caution" | "error" | "done";

const tones: Record<NoticeTone, string> = {
  info: "border-smalt bg-smalt-wash",
  caution: "border-ochre bg-ochre-wash",
  error: "border-vermilion bg-vermilion-wash",
  done: "border-verdigris bg-verdigris-wash",
};

export type NoticeProps = {
  tone?: NoticeTone;
  /** The first words, in bold: what happened. */
  title?: ReactNode;
  /** What to do next. */
  children?: ReactNode;
  actions?: ReactNode;
  /** Reads it aloud when it appears; on for errors unless told. */
  live?: boolean;
  className?: string;
  id?: string;
};

/** A message in the page, beside what it is about. */
export function Notice({
  tone = "info",
  title,
  children,
  actions,
  live = tone === "error",
  className,
  id,
}: NoticeProps) {
  return (
    <div
      {...(id !== undefined && { id })}
      {...(live && { role: tone === "error" ? "alert" : "status" })}
      className={cx("rounded-sm border px-4 py-3 text-sm text-ink", tones[tone], className)}
    >
      {title && <strong>{title}</strong>}
      {title && children ? " " : null}
      {children}
      {actions && <div className="mt-2 flex flex-wrap gap-2">{actions}</div>}
    </div>
  );
}
