"use client";

import { useSyncExternalStore } from "react";
import { Button } from "@/components/ui/button";
import { readMode, setMode, type Mode } from "./mode";

function watchMode(changed: () => void): () => void {
  const observer = new MutationObserver(changed);
  observer.observe(document.documentElement, { attributeFilter: ["data-mode"] });
  return () => {
    observer.disconnect();
  };
}

/** A button that turns the lamp mode on or off; `initial` is what the server read in the cookie. */
export function ModeSwitch({ initial }: { initial: Mode }) {
  const mode = useSyncExternalStore(
    watchMode,
    () => readMode(document.documentElement.dataset["mode"]),
    () => initial,
  );
  return (
    <Button
      onClick={() => {
        setMode(mode === "lamp" ? "day" : "lamp");
      }}
    >
      {mode === "lamp" ? "Turn lamp mode off" : "Turn lamp mode on"}
    </Button>
  );
}
