import { type ClassText, dealFormOf, readDealForm } from "@/lib/deals/form";
import type { DealClass, DealContent } from "@/lib/deals/schema";

const frame: DealContent = {
  maturity: null,
  years: 5,
  law: "finite",
  correlation: { kind: "flat", rho: 0.3 },
  classes: [],
  nthToDefault: [],
  notes: "",
};

/** Typed classes as a deal keeps them; null when one does not read. */
export function classesOf(typed: readonly ClassText[]): DealClass[] | null {
  const form = { ...dealFormOf({ name: "", poolId: "", marketId: "", content: frame }), classes: typed };
  const reading = readDealForm(form, "even", frame);
  return reading.ok ? reading.content.classes : null;
}

/** A deal's classes as text. */
export function classTexts(classes: readonly DealClass[]): readonly ClassText[] {
  return dealFormOf({ name: "", poolId: "", marketId: "", content: { ...frame, classes: [...classes] } })
    .classes;
}
