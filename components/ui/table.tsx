import type { ComponentProps, ReactNode } from "react";
import { cx } from "./cx";

export type TableProps = Omit<ComponentProps<"table">, "children"> & {
  /** Says what the table holds; shown only to screen readers unless told. */
  caption: string;
  captionShown?: boolean;
  children: ReactNode;
};

/** A ruled sheet that scrolls sideways inside itself when the page is too narrow. */
export function Table({ caption, captionShown = false, className, children, ...rest }: TableProps) {
  return (
    <div
      role="region"
      aria-label={caption}
      tabIndex={0}
      className="min-w-0 overflow-x-auto border-y-2 border-ink bg-sheet print:overflow-visible"
    >
      <table className={cx("w-full border-collapse text-left text-sm", className)} {...rest}>
        <caption className={captionShown ? "px-3 py-2 text-left text-sm text-ink-2" : "sr-only"}>
          {caption}
        </caption>
        {children}
      </table>
    </div>
  );
}

/** A column's heading. */
export function ColumnHead({ className, ...rest }: ComponentProps<"th">) {
  return (
    <th
      scope="col"
      className={cx("border-b border-rule px-3 py-3 align-bottom font-bold text-ink", className)}
      {...rest}
    />
  );
}

/** A row's heading: the name the rest of the row is about. */
export function RowHead({ className, ...rest }: ComponentProps<"th">) {
  return (
    <th
      scope="row"
      className={cx("border-b border-rule px-3 py-3 align-top font-bold text-ink", className)}
      {...rest}
    />
  );
}

export function Cell({ className, ...rest }: ComponentProps<"td">) {
  return (
    <td className={cx("border-b border-rule px-3 py-3 align-top text-ink", className)} {...rest} />
  );
}
