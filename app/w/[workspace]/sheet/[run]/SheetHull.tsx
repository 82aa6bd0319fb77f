"use client";

import { textOf } from "@/lib/platform/typed";
import type { PricingReport } from "@/lib/pricing/report";
import { Hull } from "../../deals/_structure/hull/Hull";
import { waterLine } from "../../deals/_structure/hull/law";
import styles from "./sheet.module.css";

const LEVELS = [0.95, 0.99, 0.999];

/** The structure beside the loss law at a width that fits the paper. */
export function SheetHull({ report, nameOf }: { report: PricingReport; nameOf(id: string): string }) {
  const { tranches, lossLaw } = report;
  if (tranches.length === 0) return null;
  const strikes = tranches.flatMap(({ attachment, detachment }) => [
    attachment,
    detachment < 1 ? detachment : 0,
  ]);
  const lines = lossLaw ? LEVELS.map((level) => waterLine(lossLaw, level)) : [];
  return (
    <div className={styles.hull}>
      <Hull
        classes={tranches.map(({ id, attachment, detachment }) => ({
          key: id,
          id,
          name: nameOf(id),
          attachment: textOf(attachment, 100),
          detachment: textOf(detachment, 100),
          running: "",
          upfront: "",
        }))}
        law={lossLaw}
        levels={LEVELS}
        reach={Math.min(1, 1.12 * Math.max(0.02, ...strikes, ...lines))}
        lawView="mass"
      />
    </div>
  );
}
