import type { Decision } from "./choose-decision";
import { CallbackDecision, InvitationDecision, SheetDecision, SlotDecision } from "./decisions";

export function DecisionShown({ decision }: { decision: Decision }) {
  switch (decision.kind) {
    case "invitation":
      return <InvitationDecision invitation={decision.invitation} />;
    case "slot":
      return <SlotDecision slot={decision.slot} />;
    case "callback":
      return <CallbackDecision callback={decision.callback} />;
    case "sheet":
      return <SheetDecision sheet={decision.sheet} />;
  }
}
