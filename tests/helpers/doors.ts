import { AROUND } from "./doors/around";
import { AUDITION, PRODUCTION } from "./doors/production";
import { COMPANY_DOORS, REHEARSAL } from "./doors/rehearsal";
import type { Doors } from "./doors/types";

export type { Door } from "./doors/types";

/** Every server action and route handler of the product, and who may pass it. */
export const DOORS: Doors = {
  ...AROUND,
  ...PRODUCTION,
  ...AUDITION,
  ...REHEARSAL,
  ...COMPANY_DOORS,
};
