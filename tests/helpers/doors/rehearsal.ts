import { MUSIC, PLANNERS, TABLE } from "../personas";
import type { Persona } from "../personas";
import type { RichWorld } from "../rich-world";
import { reads } from "./types";
import type { Door, Doors } from "./types";

const CALLS = "app/(season)/productions/[productionId]/rehearsals/actions.ts#";
const SHEETS = "app/(season)/productions/[productionId]/call-sheets/actions.ts#";
const PEOPLE = "app/(season)/productions/[productionId]/people/actions.ts#";
const COMPANY = "app/(season)/companies/[companyId]/actions.ts#";

const READS: Persona[] = [...PLANNERS, ...TABLE, "admin"];

const draft = (w: RichWorld) => ({
  productionId: w.productionId,
  kind: "music",
  title: "",
  localDate: "2027-04-06",
  localTime: "18:30",
  roomId: w.roomId,
  leaderId: "",
  pianistId: "",
  blocks: [
    {
      key: "one",
      kind: "number",
      minutes: "30",
      numberId: w.numberId,
      title: "",
      bars: "",
      detail: "",
    },
  ],
  hand: [],
});
const planned = (extra: (w: RichWorld) => object): Door => ({
  may: PLANNERS,
  input: (w) => ({ productionId: w.productionId, ...extra(w) }),
});
const call = (w: RichWorld) => ({ productionId: w.productionId, callId: w.callId });
const sheet = (w: RichWorld) => ({ productionId: w.productionId, issueId: w.issueId });

/** Calls, call sheets and pianists of a production. */
export const REHEARSAL: Doors = {
  [`${CALLS}checkCall`]: planned((w) => ({ ...draft(w), callId: null })),
  [`${CALLS}createCall`]: planned(draft),
  [`${CALLS}changeCall`]: planned((w) => ({ ...draft(w), callId: w.callId, version: 1 })),
  [`${CALLS}refreshCall`]: planned((w) => ({ callId: w.callId, version: 1 })),
  [`${CALLS}publishCall`]: planned((w) => ({ callId: w.callId, version: 1, despite: true })),
  [`${CALLS}cancelCall`]: planned((w) => ({ callId: w.publishedCallId, version: 1 })),
  [`${CALLS}restoreCall`]: planned((w) => ({
    callId: w.publishedCallId,
    version: 1,
    to: "published",
  })),
  [`${CALLS}decideConflict`]: planned((w) => ({ conflictId: w.conflictId, state: "agreed" })),
  "app/api/productions/[productionId]/calls/[callId]/clashes/route.ts#GET": reads(
    PLANNERS,
    "/clashes",
    call,
  ),
  "app/(season)/productions/[productionId]/pianists/actions.ts#assignCallPianist": {
    may: MUSIC,
    input: (w) => ({
      productionId: w.productionId,
      callId: w.callId,
      version: 1,
      personId: w.people.accompanist.personId,
    }),
  },
  // What was seen is compared with what is there: for those who may, this answers that the sheet has changed.
  [`${SHEETS}issueSheet`]: planned(() => ({
    localDate: "2027-03-24",
    seen: "0".repeat(64),
    notes: "",
  })),
  // An actor the sheet concerns downloads their own copy; a production's sheet is for its music team, the table and the admin.
  "app/api/productions/[productionId]/call-sheets/[issueId]/route.ts#GET": reads(
    READS,
    "/call-sheets/x?format=xlsx",
    sheet,
  ),
  "app/api/productions/[productionId]/call-sheets/[issueId]/acknowledgements/route.ts#GET": reads(
    PLANNERS,
    "/acknowledgements",
    sheet,
  ),
};

const invitation = (w: RichWorld) => ({
  companyId: w.companyId,
  name: "Ida Rowan",
  email: "ida.rowan@people.example",
  phone: "",
});
const managesRooms: Persona[] = ["admin", "md", "stageManager", "siblingMd"];
const room = (extra: (w: RichWorld) => object): Door => ({
  may: managesRooms,
  input: (w) => ({ companyId: w.companyId, ...extra(w) }),
});
const admin = (input: (w: RichWorld) => object): Door => ({ may: ["admin"], input });

/** Positions in a production, members and places of a company. */
export const COMPANY_DOORS: Doors = {
  [`${PEOPLE}invitePerson`]: {
    may: ["md", "admin"],
    input: (w) => ({ ...invitation(w), productionId: w.productionId, kind: "choreographer" }),
  },
  [`${PEOPLE}endPosition`]: { may: ["md", "admin"], input: (w) => ({ positionId: w.positionId }) },
  [`${PEOPLE}reopenPosition`]: {
    may: ["md", "admin"],
    input: (w) => ({ positionId: w.positionId }),
  },
  [`${COMPANY}inviteMember`]: admin((w) => ({
    ...invitation(w),
    productionId: null,
    kind: "company_admin",
  })),
  [`${COMPANY}endMembership`]: {
    may: ["md", "admin"],
    input: (w) => ({ positionId: w.positionId }),
  },
  [`${COMPANY}reopenMembership`]: {
    may: ["md", "admin"],
    input: (w) => ({ positionId: w.positionId }),
  },
  [`${COMPANY}addVenue`]: room(() => ({ name: "The Rope Walk", address: "" })),
  [`${COMPANY}changeVenue`]: room((w) => ({
    venueId: w.venueId,
    name: "Lantern Street",
    address: "5 Quay Lane",
  })),
  [`${COMPANY}addRoom`]: room((w) => ({ venueId: w.venueId, name: "Attic", hasPiano: false })),
  [`${COMPANY}changeRoom`]: room((w) => ({ roomId: w.roomId, name: "Room One", hasPiano: true })),
  [`${COMPANY}setTravel`]: room(() => ({ pairs: [] })),
};
