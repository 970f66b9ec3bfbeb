import type { ComponentProps } from "react";
import { cx } from "./cx";
import { controlClass } from "./input";

export function Textarea({ className, rows = 4, ...rest }: ComponentProps<"textarea">) {
  return <textarea rows={rows} className={cx(controlClass, "resize-y", className)} {...rest} />;
}
