import { LOST_CONNECTION } from "@/components/forms/lost-connection";
import { showToast } from "@/components/ui/toast-store";
import type { ActionResult } from "@/lib/errors";

/** Waits for an action and says it when it did not work. Whether it did. */
export async function tell(action: Promise<ActionResult<unknown>>): Promise<boolean> {
  const result = await action.catch(() => null);
  if (result?.ok) return true;
  showToast({ title: result ? result.error.message : LOST_CONNECTION, tone: "error" });
  return false;
}
