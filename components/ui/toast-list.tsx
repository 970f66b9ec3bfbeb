"use client";

import * as RadixToast from "radix-ui/toast";
import { Button } from "./button";
import { cx } from "./cx";
import { CloseIcon } from "./icons";
import { dropToast, type Toast } from "./toast-store";

/** The toasts on screen. Long enough to reach the undo by keyboard; time stops while one is there. */
export default function ToastList({ toasts }: { toasts: readonly Toast[] }) {
  return (
    <RadixToast.Provider label="Message" swipeDirection="down">
      {toasts.map((toast) => (
        <RadixToast.Root
          key={toast.id}
          type={toast.tone === "error" ? "foreground" : "background"}
          duration={toast.undo || toast.tone === "error" ? 20_000 : 7_000}
          onOpenChange={(open) => {
            if (!open) dropToast(toast.id);
          }}
          className={cx(
            "flex animate-slide-up items-center gap-3 rounded-md border bg-sheet py-2 pr-2 pl-4 text-sm text-ink",
            toast.tone === "error" ? "border-vermilion" : "border-ink",
          )}
        >
          <RadixToast.Title className="min-w-0 flex-1">{toast.title}</RadixToast.Title>
          {toast.undo && (
            <RadixToast.Action asChild altText="Undo it on the page itself">
              <Button
                size="small"
                onClick={() => {
                  void toast.undo?.();
                }}
              >
                Undo
              </Button>
            </RadixToast.Action>
          )}
          <RadixToast.Close
            aria-label="Close the message"
            className="grid size-11 place-items-center rounded-md hover:bg-bone md:size-8"
          >
            <CloseIcon />
          </RadixToast.Close>
        </RadixToast.Root>
      ))}
      <RadixToast.Viewport className="fixed inset-x-4 bottom-20 z-50 mx-auto flex max-w-md list-none flex-col gap-2 outline-none lg:bottom-6 print:hidden" />
    </RadixToast.Provider>
  );
}
