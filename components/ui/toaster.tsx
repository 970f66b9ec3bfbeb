"use client";

import { Suspense, lazy, useSyncExternalStore } from "react";
import { currentToasts, serverToasts, watchToasts } from "./toast-store";

const ToastList = lazy(() => import("./toast-list"));

/** Where toasts appear; stands once, in the root layout. Its list is fetched with the first toast. */
export function Toaster() {
  const toasts = useSyncExternalStore(watchToasts, currentToasts, serverToasts);
  if (toasts.length === 0) return null;
  return (
    <Suspense fallback={null}>
      <ToastList toasts={toasts} />
    </Suspense>
  );
}
