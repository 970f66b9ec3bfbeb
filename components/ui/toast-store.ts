export type Toast = {
  id: number;
  title: string;
  tone: "done" | "error";
  /** Takes back what was just done; the toast then stays longer. */
  undo?: () => void | Promise<void>;
};

let toasts: readonly Toast[] = [];
let nextId = 1;
const watchers = new Set<() => void>();

function change(next: readonly Toast[]): void {
  toasts = next;
  for (const watcher of watchers) watcher();
}

/** Says in passing that something was done, with the way back where there is one. Browser only. */
export function showToast(toast: {
  title: string;
  tone?: Toast["tone"];
  undo?: () => void | Promise<void>;
}): void {
  const { title, tone = "done", undo } = toast;
  // Three at most: an older one has been read or was not worth keeping.
  change([...toasts.slice(-2), { id: nextId++, title, tone, ...(undo && { undo }) }]);
}

export function dropToast(id: number): void {
  change(toasts.filter((toast) => toast.id !== id));
}

export function watchToasts(watcher: () => void): () => void {
  watchers.add(watcher);
  return () => {
    watchers.delete(watcher);
  };
}

export function currentToasts(): readonly Toast[] {
  return toasts;
}

const NONE: readonly Toast[] = [];

/** On the server there are none. */
export function serverToasts(): readonly Toast[] {
  return NONE;
}
