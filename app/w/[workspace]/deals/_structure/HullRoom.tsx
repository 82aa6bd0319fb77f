"use client";

import { Group, SegmentedControl, Text, TextInput } from "@mantine/core";
import { Takeable } from "@/app/_ui/Takeable";
import { useAddress } from "@/app/_ui/useAddress";
import { moveBoundary } from "@/lib/deals/classEdits";
import { typedNumber } from "@/lib/platform/typed";
import type { PricingReport } from "@/lib/pricing/report";
import { useDeal } from "../_frame/dealContext";
import { Hull } from "./hull/Hull";
import { type LawView, waterLine } from "./hull/law";
import { planksOf } from "./hull/Planks";

const LEVELS = "95, 99, 99.9";

/** The hull with its controls: how much of the pool is in view, what of the law is drawn, which water lines. */
export function HullRoom({ law }: { law: PricingReport["lossLaw"] | undefined }) {
  const { form, change, mayEdit } = useDeal();
  const [reachText, setReach] = useAddress("reach", "");
  const [lawView, setLawView] = useAddress("law", "mass");
  const [levelsText, setLevels] = useAddress("levels", LEVELS);
  const levels = readLevels(levelsText);
  const typedReach = typedNumber(reachText);
  const reach =
    typeof typedReach === "number" && typedReach > 0 && typedReach <= 100
      ? typedReach / 100
      : usualReach(form.classes, law, levels);
  return (
    <div>
      <Group gap="sm" mb="xs" className="screenOnly">
        <TextInput
          size="xs"
          w={170}
          label="In view, up to (% of pool)"
          placeholder={String(Number((reach * 100).toPrecision(3)))}
          value={reachText}
          onChange={(event) => setReach(event.currentTarget.value)}
        />
        <TextInput
          size="xs"
          w={200}
          label="Water lines at (%)"
          value={levelsText}
          error={levels.length === 0 && levelsText !== "" ? "Levels between 0 and 100" : undefined}
          onChange={(event) => setLevels(event.currentTarget.value)}
        />
        <div>
          <Text size="xs" fw={500} mb={2}>
            Loss law
          </Text>
          <SegmentedControl
            size="xs"
            value={lawView}
            onChange={setLawView}
            data={[
              { value: "mass", label: "By loss" },
              { value: "tail", label: "Tail" },
            ]}
          />
        </div>
      </Group>
      <Takeable name="structure and loss law">
        <Hull
          classes={form.classes}
          law={law}
          levels={levels}
          reach={reach}
          lawView={lawView as LawView}
          onMove={
            mayEdit
              ? (from, to, gesture) => change({ classes: moveBoundary(form.classes, from, to) }, gesture)
              : undefined
          }
        />
      </Takeable>
    </div>
  );
}

function readLevels(text: string): number[] {
  return text
    .split(/[\s;,]+/)
    .map(Number)
    .filter((level) => level > 0 && level < 100)
    .slice(0, 6)
    .map((percent) => percent / 100);
}

/** Up to a little above the highest water line and the highest boundary below the whole pool. */
function usualReach(
  classes: Parameters<typeof planksOf>[0],
  law: PricingReport["lossLaw"] | undefined,
  levels: readonly number[],
): number {
  const planks = planksOf(classes);
  const strikes = planks.flatMap(({ attachment, detachment }) => [
    attachment,
    detachment < 1 ? detachment : 0,
  ]);
  const lines = law ? levels.map((level) => waterLine(law, level)) : [];
  const highest = Math.max(0.02, ...strikes, ...lines);
  return Math.min(1, highest * 1.12);
}
