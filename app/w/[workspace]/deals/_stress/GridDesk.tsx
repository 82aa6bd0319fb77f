"use client";

import { Button, Group, NativeSelect, SegmentedControl, Stack, Text, TextInput, Title } from "@mantine/core";
import { useState } from "react";
import { call } from "@/app/_ui/call";
import { Problems } from "@/app/_ui/Problems";
import { useAddress } from "@/app/_ui/useAddress";
import { usePieces } from "@/app/_ui/usePieces";
import type { Problem } from "@/lib/platform/errors";
import type { PricingRequest } from "@/lib/pricing/request";
import type { Shock } from "@/lib/pricing/shock";
import { cellCount, cellShock, gridSchema, type StressGrid } from "@/lib/pricing/stressGrid";
import { type GridForm, readSteps, shockWords } from "@/lib/scenarios/form";
import type { NamedClass } from "../_drivers/NameTable";
import { useDeal } from "../_frame/dealContext";
import { PiecesProgress } from "../_frame/PiecesProgress";
import { GridView } from "./GridView";
import { JobStatus } from "./JobStatus";
import type { Work } from "./text";
import { useJobs } from "./useJobs";

interface Here {
  readonly key: string;
  readonly grid: StressGrid;
  readonly request: PricingRequest;
}

/** The grid of spread shocks by correlation shifts: worked out on the server, or here by those who may only read. */
export function GridDesk({
  request,
  classes,
  work,
  grid,
  shock,
  onChange,
}: {
  request: PricingRequest;
  classes: readonly NamedClass[];
  work: Work;
  grid: GridForm;
  shock: Shock | null;
  onChange(grid: GridForm): void;
}) {
  const { workspaceId, deal } = useDeal();
  const [chosen, choose] = useAddress("grid", "");
  const { jobs, job, reload } = useJobs(workspaceId, deal?.id ?? "", work, chosen);
  const [refused, setRefused] = useState<readonly Problem[]>([]);
  const [isBusy, setBusy] = useState(false);
  const [here, setHere] = useState<Here | null>(null);
  const asked = readGrid(grid, shock);
  const local = usePieces(
    "shocked",
    here?.key ?? null,
    here
      ? Array.from({ length: cellCount(here.grid) }, (_, i) => ({
          request: here.request,
          shock: cellShock(here.grid, i),
        }))
      : [],
  );

  const start = async () => {
    if (!asked.ok) return;
    const bare = { ...request, nthToDefault: [], include: [] };
    if (!work.mayStart || !deal)
      return setHere({ key: `grid ${JSON.stringify([bare, asked.grid])}`, grid: asked.grid, request: bare });
    setBusy(true);
    const answer = await call("jobs.start", {
      workspaceId,
      dealId: deal.id,
      request: bare,
      grid: asked.grid,
    });
    setBusy(false);
    setRefused(answer.ok ? [] : answer.problems);
    if (answer.ok) choose(answer.output.jobId);
    reload();
  };
  const cancel = async (jobId: string) => {
    const answer = await call("jobs.cancel", { workspaceId, jobId });
    setRefused(answer.ok ? [] : answer.problems);
    reload();
  };

  return (
    <section aria-labelledby="grid">
      <Title order={2} size="h5" id="grid">
        Grid of spreads by correlation
      </Title>
      <Text size="sm" c="dimmed">
        Each cell moves every spread and the correlation on top of the common shock
        {shock ? ` (${shockWords(shock)})` : ""}.
      </Text>
      <Group gap="sm" align="end" my="xs" className="screenOnly">
        <div>
          <Text size="xs" fw={500} mb={2}>
            Spread shocks in
          </Text>
          <SegmentedControl
            size="xs"
            aria-label="Spread shocks in"
            value={grid.kind}
            onChange={(kind) => onChange({ ...grid, kind: kind as GridForm["kind"] })}
            data={[
              { value: "relative", label: "%" },
              { value: "absolute", label: "bp" },
            ]}
          />
        </div>
        <TextInput
          size="xs"
          miw={200}
          label={`Spreads wider by (${grid.kind === "relative" ? "%" : "bp"})`}
          value={grid.spreads}
          error={asked.ok ? undefined : asked.spreads}
          onChange={(event) => onChange({ ...grid, spreads: event.currentTarget.value })}
        />
        <TextInput
          size="xs"
          miw={200}
          label="Correlation up by (points)"
          value={grid.correlations}
          error={asked.ok ? undefined : asked.correlations}
          onChange={(event) => onChange({ ...grid, correlations: event.currentTarget.value })}
        />
        <Button size="xs" onClick={start} loading={isBusy} disabled={!asked.ok}>
          {work.mayStart ? "Work the grid out" : "Work it out in this browser"}
        </Button>
        {jobs.length > 0 && (
          <NativeSelect
            size="xs"
            label="Grids of this deal"
            value={chosen || jobs[0]!.id}
            onChange={(event) => choose(event.currentTarget.value)}
            data={jobs.map((row) => ({
              value: row.id,
              label: `${row.at.slice(0, 16).replace("T", " ")} UTC, ${row.by}, ${row.state}`,
            }))}
          />
        )}
      </Group>
      <Problems title="The grid was not started" problems={refused} />
      <Stack gap="xs">
        {here && (
          <>
            <PiecesProgress pieces={local} total={cellCount(here.grid)} what="cells" />
            <GridView
              grid={here.grid}
              cells={local.outputs}
              classes={classes}
              currency={request.currency ?? "EUR"}
            />
          </>
        )}
        {!here && job && (
          <>
            <JobStatus job={job} onCancel={() => cancel(job.id)} />
            <GridView
              grid={job.grid}
              cells={job.cells}
              classes={job.tranches.map(({ id }) => classes.find((row) => row.id === id) ?? { id, name: id })}
              currency={job.currency}
            />
          </>
        )}
        {!here && !job && (
          <Text c="dimmed" size="sm">
            {jobs.length > 0 ? "Fetching the grid…" : "No grid of this deal yet."}
          </Text>
        )}
      </Stack>
    </section>
  );
}

type Asked =
  | { readonly ok: true; readonly grid: StressGrid }
  | { readonly ok: false; readonly spreads?: string | undefined; readonly correlations?: string | undefined };

function readGrid(form: GridForm, shock: Shock | null): Asked {
  const spreads = readSteps(form.spreads, form.kind === "relative" ? 100 : 10_000);
  const correlations = readSteps(form.correlations, 100);
  const numbers = "Numbers parted by blanks";
  if (!shock || !spreads || !correlations)
    return {
      ok: false,
      spreads: spreads ? undefined : numbers,
      correlations: correlations ? undefined : numbers,
    };
  const parsed = gridSchema.safeParse({ spreads: { kind: form.kind, steps: spreads }, correlations, shock });
  if (parsed.success) return { ok: true, grid: parsed.data };
  const said = (field: string) => parsed.error.issues.find(({ path }) => path[0] === field)?.message;
  return { ok: false, spreads: said("spreads"), correlations: said("correlations") };
}
