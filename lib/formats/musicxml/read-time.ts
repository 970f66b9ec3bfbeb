import { add, rational, ZERO, type Rational } from "./rational";
import { child, type XmlElement } from "./xml-events";

/**
 * A time signature: how it is shown ("3+2/8", "3/4+2/4", "free") and how many quarters a bar of it
 * lasts; null for free time or one that is not understood.
 */
export function readTime(time: XmlElement): { shown: string | null; quarters: Rational | null } {
  if (child(time, "senza-misura")) return { shown: "free", quarters: null };
  const shown: string[] = [];
  let quarters: Rational | null = ZERO;
  let beats = "";
  for (const { name, text } of time.children) {
    if (name === "beats") beats = text.trim();
    if (name !== "beat-type") continue;
    const unit = text.trim();
    shown.push(`${beats}/${unit}`.slice(0, 40));
    const groups = /^[\d\s+]{1,40}$/.test(beats) && /^[1-9]\d{0,3}$/.test(unit);
    const total = beats.split("+").reduce((sum, group) => sum + (Number(group) || 0), 0);
    quarters =
      groups && quarters !== null
        ? add(quarters, rational(BigInt(Math.round(total)) * 4n, BigInt(unit)))
        : null;
  }
  if (shown.length === 0) return { shown: null, quarters: null };
  return { shown: shown.join("+"), quarters };
}
