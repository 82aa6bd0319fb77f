"use client";

import { Stack, Title } from "@mantine/core";
import { useMemo } from "react";
import { inputDifferences } from "@/lib/runs/differences";
import { FigureDifferences } from "./FigureDifferences";
import { InputDifferences } from "./InputDifferences";
import { Movers } from "./Movers";
import type { OpenRun } from "./openRun";

/** Two runs side by side: inputs that differ, figures with their differences, and what moved each class's value. */
export function RunComparison({ earlier, later }: { earlier: OpenRun; later: OpenRun }) {
  const differences = useMemo(
    () => inputDifferences(earlier.request, later.request),
    [earlier.request, later.request],
  );
  const names = { ...earlier.classNames, ...later.classNames };
  const nameOf = (id: string) => names[id] ?? id;
  return (
    <Stack gap="md" component="section" aria-label="Two runs side by side">
      <Title order={2} size="h4">
        Run {earlier.number} beside run {later.number}
      </Title>
      <FigureDifferences earlier={earlier} later={later} nameOf={nameOf} />
      <Movers earlier={earlier} later={later} nameOf={nameOf} />
      <InputDifferences differences={differences} nameOf={nameOf} />
    </Stack>
  );
}
