/** Bundles the threads that run beside the server into .run/workers. */
export function buildWorkers(): Promise<void>;
