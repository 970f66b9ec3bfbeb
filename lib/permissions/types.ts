import type { POSITION_KINDS } from "./position-kinds";

export type PositionKind = (typeof POSITION_KINDS)[number];

export type Position = {
  kind: PositionKind;
  companyId: string;
  /** Null for a position in the company itself. */
  productionId: string | null;
  personId: string;
};

/** Someone signed in: their login, the records companies have of them, and their open positions. */
export type Actor = {
  userId: string;
  email: string;
  name: string;
  people: { id: string; companyId: string }[];
  positions: Position[];
};

/** What a permission is asked about. `productionId` is left out for what belongs to the company as a whole. */
export type Subject = {
  companyId: string;
  productionId?: string | undefined;
  /** Whose row it is, for what a person may only do with their own. */
  personId?: string | undefined;
  /** Whether the cast list of the production is out. */
  castPublished?: boolean | undefined;
};
