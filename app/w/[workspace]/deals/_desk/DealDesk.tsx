"use client";

import {
  Alert,
  Button,
  Group,
  NativeSelect,
  SimpleGrid,
  Stack,
  Text,
  Textarea,
  TextInput,
  Title,
} from "@mantine/core";
import Link from "next/link";
import { useRouter } from "next/navigation";
import { useMemo, useState } from "react";
import { call } from "@/app/_ui/call";
import { Problems } from "@/app/_ui/Problems";
import { useKept } from "@/app/_ui/useKept";
import { type DealForm, dealFormOf, readDealForm } from "@/lib/deals/form";
import type { Operations } from "@/lib/operations";
import type { Problem } from "@/lib/platform/errors";
import { ClassesEditor } from "./ClassesEditor";
import { Hull } from "./Hull";

type OpenDeal = Operations["deals.open"]["output"];

interface MarketChoice {
  readonly id: string;
  readonly name: string;
  readonly pricingDate: string;
  readonly scheduleKind: "even" | "standard";
}

interface Kept {
  readonly form: DealForm;
  readonly version: number;
}

/** The structure of a deal, new or saved: what it is made of, its classes to scale; typed text is kept until saved. */
export function DealDesk({
  workspaceId,
  deal,
  mayEdit,
  pools,
  markets,
}: {
  workspaceId: string;
  deal: OpenDeal | null;
  mayEdit: boolean;
  pools: readonly { id: string; name: string }[];
  markets: readonly MarketChoice[];
}) {
  const router = useRouter();
  const saved = useMemo(
    () =>
      deal ? dealFormOf({ ...deal, poolId: deal.pool.id, marketId: deal.market.id }) : blank(pools, markets),
    [deal, pools, markets],
  );
  const [kept, setKept] = useKept<Kept>(`deal ${deal?.id ?? `new ${workspaceId}`}`);
  const [refused, setRefused] = useState<readonly Problem[]>([]);
  const [newer, setNewer] = useState<number | null>(null);
  const [isBusy, setBusy] = useState(false);
  const form = kept?.form ?? saved;
  const scheduleKind = markets.find((market) => market.id === form.marketId)?.scheduleKind ?? "standard";
  const reading = readDealForm(form, scheduleKind, deal?.content ?? null);
  const version = kept?.version ?? deal?.version ?? 0;
  const isBehind = kept !== null && deal !== null && kept.version !== deal.version;
  const change = (part: Partial<DealForm>) => {
    const next = { ...form, ...part };
    setRefused([]);
    setKept(JSON.stringify(next) === JSON.stringify(saved) ? null : { form: next, version });
  };
  const save = async () => {
    if (!reading.ok) return;
    setBusy(true);
    setRefused([]);
    const fields = {
      workspaceId,
      name: form.name,
      poolId: form.poolId,
      marketId: form.marketId,
      content: reading.content,
    };
    const answer = deal
      ? await call("deals.save", { ...fields, dealId: deal.id, version: newer ?? version })
      : await call("deals.create", fields);
    setBusy(false);
    if (answer.ok) {
      setKept(null);
      setNewer(null);
      if ("dealId" in answer.output) router.push(`/w/${workspaceId}/deals/${answer.output.dealId}`);
      router.refresh();
    } else {
      if (answer.status === 409) router.refresh();
      setRefused(answer.problems);
    }
  };
  const problems =
    refused.length > 0 ? refused : reading.ok || (kept === null && deal === null) ? [] : reading.problems;
  const problemAt = (path: string) =>
    problems.find((problem) => problem.path === path || problem.path.startsWith(`${path}.`))?.message;
  const disabled = !mayEdit;
  return (
    <Stack gap="md">
      {!deal && <Title order={1}>New deal</Title>}
      {(pools.length === 0 || markets.length === 0) && (
        <Alert color="yellow">
          A deal needs a <Link href={`/w/${workspaceId}/pools/new`}>pool</Link> and a{" "}
          <Link href={`/w/${workspaceId}/markets/new`}>market</Link> first.
        </Alert>
      )}
      {isBehind && (
        <Alert color="yellow" title="Someone saved a newer version of this deal meanwhile">
          <Text size="sm">
            Your own text is still below, on version {kept.version}; the saved one is version {deal.version}.
          </Text>
          <Group mt="xs">
            <Button size="compact-sm" onClick={() => setKept({ form, version: deal.version })}>
              Go on with mine over version {deal.version}
            </Button>
            <Button size="compact-sm" variant="default" onClick={() => setKept(null)}>
              Take the saved one
            </Button>
          </Group>
        </Alert>
      )}
      <SimpleGrid cols={{ base: 1, sm: 2, md: 3 }}>
        <TextInput
          label="Name"
          required
          disabled={disabled}
          value={form.name}
          error={problemAt("name")}
          onChange={(event) => change({ name: event.currentTarget.value })}
        />
        <NativeSelect
          label="Pool"
          disabled={disabled}
          data={pools.map((row) => ({ value: row.id, label: row.name }))}
          value={form.poolId}
          error={problemAt("poolId")}
          onChange={(event) => change({ poolId: event.currentTarget.value })}
        />
        <NativeSelect
          label="Market"
          disabled={disabled}
          data={markets.map((row) => ({ value: row.id, label: `${row.name} (${row.pricingDate})` }))}
          value={form.marketId}
          error={problemAt("marketId")}
          onChange={(event) => change({ marketId: event.currentTarget.value })}
        />
        {scheduleKind === "standard" ? (
          <TextInput
            label="Maturity (20 June or 20 December)"
            placeholder="YYYY-MM-DD"
            disabled={disabled}
            value={form.maturity}
            error={problemAt("content.maturity")}
            onChange={(event) => change({ maturity: event.currentTarget.value })}
          />
        ) : (
          <TextInput
            label="Maturity (years)"
            disabled={disabled}
            value={form.years}
            error={problemAt("content.years")}
            onChange={(event) => change({ years: event.currentTarget.value })}
          />
        )}
        {!deal || deal.content.correlation.kind === "flat" ? (
          <TextInput
            label="Flat asset correlation (%)"
            disabled={disabled}
            value={form.rho}
            error={problemAt("content.correlation")}
            onChange={(event) => change({ rho: event.currentTarget.value })}
          />
        ) : (
          <TextInput label="Correlation" disabled value={deal.content.correlation.kind} />
        )}
        <NativeSelect
          label="Loss law"
          disabled={disabled}
          data={[
            { value: "finite", label: "Finite pool, exact" },
            { value: "largePool", label: "Large pool, one class" },
          ]}
          value={form.law}
          error={problemAt("content.law")}
          onChange={(event) => change({ law: event.currentTarget.value as DealForm["law"] })}
        />
        <TextInput
          label="n-th-to-default contracts"
          placeholder="1, 2, 3"
          disabled={disabled}
          value={form.nthToDefault}
          error={problemAt("content.nthToDefault")}
          onChange={(event) => change({ nthToDefault: event.currentTarget.value })}
        />
      </SimpleGrid>
      <ClassesEditor
        classes={form.classes}
        isReadOnly={disabled}
        problemAt={problemAt}
        onChange={(classes) => change({ classes })}
      />
      {reading.ok && reading.content.classes.length > 0 && <Hull classes={reading.content.classes} />}
      <Textarea
        label="Notes"
        autosize
        minRows={2}
        disabled={disabled}
        value={form.notes}
        error={problemAt("content.notes")}
        onChange={(event) => change({ notes: event.currentTarget.value })}
      />
      <Problems
        title={refused.length > 0 ? "The deal was not saved" : "Before it can be saved"}
        problems={problems}
      />
      {mayEdit ? (
        <Group>
          <Button
            onClick={save}
            loading={isBusy}
            disabled={!reading.ok || isBehind || (deal !== null && kept === null)}
          >
            {deal ? "Save" : "Store the deal"}
          </Button>
          <Button variant="default" disabled={kept === null} onClick={() => setKept(null)}>
            Undo all changes
          </Button>
          <Text size="sm" c="dimmed" aria-live="polite">
            {kept
              ? "Not saved yet; kept in this browser until it is."
              : deal
                ? `Version ${deal.version} is saved.`
                : ""}
          </Text>
        </Group>
      ) : (
        <Text c="dimmed">You can read this deal, not change it.</Text>
      )}
    </Stack>
  );
}

function blank(pools: readonly { id: string }[], markets: readonly MarketChoice[]): DealForm {
  const date = markets[0]?.pricingDate ?? "";
  const year = Number(date.slice(0, 4)) + 5;
  return {
    name: "",
    poolId: pools[0]?.id ?? "",
    marketId: markets[0]?.id ?? "",
    maturity: date ? `${year}-12-20` : "",
    years: "5",
    rho: "30",
    law: "finite",
    classes: [],
    nthToDefault: "",
    notes: "",
  };
}
