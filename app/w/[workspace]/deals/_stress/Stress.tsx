"use client";

import { Stack } from "@mantine/core";
import { useMemo } from "react";
import { useKept } from "@/app/_ui/useKept";
import { canonicalJson } from "@/lib/pricing/canonical";
import { noShock, type Shock } from "@/lib/pricing/shock";
import { blankGrid, blankShock, readShock } from "@/lib/scenarios/form";
import { useDeal } from "../_frame/dealContext";
import { NothingToShow } from "../_frame/NothingToShow";
import { GridDesk } from "./GridDesk";
import { ScenarioBar } from "./ScenarioBar";
import { ScenarioTable } from "./ScenarioTable";
import { ShockFields } from "./ShockFields";
import type { Scenarios, StressText, Work } from "./text";

const blank: StressText = { shock: blankShock, grid: blankGrid, of: null };

/** The room of shocks: a common shock, kept scenarios side by side, and the grid of spreads by correlation. */
export function Stress({ work, kept }: { work: Work; kept: Scenarios }) {
  const { deal, request, form } = useDeal();
  const [typed, setTyped] = useKept<StressText>(`stress ${deal?.id ?? ""}`);
  const text = typed ?? blank;
  const reading = useMemo(() => readShock(text.shock), [text.shock]);
  const classes = useMemo(
    () =>
      (request?.tranches ?? []).map(({ id }) => ({
        id,
        name: form.classes.find((row) => (row.id.trim() || row.key) === id)?.name || id,
      })),
    [request, form.classes],
  );
  const own = useMemo(
    () => (reading.ok && !isKept(reading.shock, kept.scenarios) ? reading.shock : null),
    [reading, kept.scenarios],
  );
  if (!request || classes.length === 0)
    return <NothingToShow what="Stress of a class" needsClass={request !== null} />;
  const change = (part: Partial<StressText>) => setTyped({ ...text, ...part });
  return (
    <Stack gap="lg">
      <section aria-label="Common shock">
        <ScenarioBar
          scenarios={kept.scenarios}
          mayEdit={kept.may.edit}
          text={text}
          reading={reading}
          onChange={change}
        />
        <ShockFields
          shock={text.shock}
          problems={reading.ok ? [] : reading.problems}
          pool={request.pool}
          onChange={(shock) => change({ shock })}
        />
      </section>
      <ScenarioTable request={request} classes={classes} scenarios={kept.scenarios} typed={own} />
      <GridDesk
        request={request}
        classes={classes}
        work={work}
        grid={text.grid}
        shock={reading.ok ? reading.shock : null}
        onChange={(grid) => change({ grid })}
      />
    </Stack>
  );
}

/** Whether a shock moves nothing or is a kept scenario's: then it needs no row of its own. */
function isKept(shock: Shock, scenarios: Scenarios["scenarios"]): boolean {
  const text = canonicalJson(shock);
  return [noShock, ...scenarios.map(({ content }) => content.shock)].some(
    (one) => canonicalJson(one) === text,
  );
}
