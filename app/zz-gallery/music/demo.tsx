"use client";
import { useState } from "react";
import { RangeKeyboard, type PickedRange } from "@/components/music/range-keyboard";
export function Demo() {
  const [v, set] = useState<PickedRange>({ low: null, high: null });
  const [w, setW] = useState<PickedRange>({ low: 55, high: 79 });
  return <><RangeKeyboard label="The range you sing" value={v} onChange={set} /><RangeKeyboard label="Range heard" value={w} onChange={setW} /></>;
}
