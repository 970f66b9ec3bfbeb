/** Milliseconds between two readings of what several people change while they look at it. */
export const LOOK_AGAIN = 4_000;
