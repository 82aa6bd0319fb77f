"use client";

import { Badge, Button, Group, SimpleGrid, Stack, Text, Title } from "@mantine/core";
import Link from "next/link";
import { useRouter } from "next/navigation";
import { useDeferredValue, useMemo, useState } from "react";
import { call } from "@/app/_ui/call";
import { Problems } from "@/app/_ui/Problems";
import { UndoButton } from "@/app/_ui/UndoButton";
import { useKept } from "@/app/_ui/useKept";
import { blankForm, formOf, type MarketForm, mergedForm, readForm } from "@/lib/markets/form";
import type { Operations } from "@/lib/operations";
import type { Problem } from "@/lib/platform/errors";
import { DiscountFields } from "./DiscountFields";
import { GeneralFields } from "./GeneralFields";
import { MarketActions } from "./MarketActions";
import { MarketPreview } from "./MarketPreview";
import { NewerMarket } from "./NewerMarket";
import { QuotedPoolFields } from "./QuotedPoolFields";
import { ScheduleFields } from "./ScheduleFields";

type OpenMarket = Operations["markets.open"]["output"];
type Saved = Pick<OpenMarket, "name" | "pricingDate" | "content" | "version">;

interface Kept {
  readonly form: MarketForm;
  /** The saved form and version that the typing began from. */
  readonly base: MarketForm;
  readonly version: number;
}

/** One market, new or saved: fields with their checks beside them, and what the pricing core reads from them. */
export function MarketDesk({
  workspaceId,
  market,
  today,
  mayEdit,
  pools,
}: {
  workspaceId: string;
  market: OpenMarket | null;
  today: string;
  mayEdit: boolean;
  pools: readonly { id: string; name: string }[];
}) {
  const router = useRouter();
  const [saved, setSaved] = useState<Saved | null>(market);
  const [kept, setKept] = useKept<Kept>(`market ${market?.id ?? `new ${workspaceId}`}`);
  const [refused, setRefused] = useState<readonly Problem[]>([]);
  const [isBusy, setBusy] = useState(false);
  const [undone, setUndone] = useState<Kept | null>(null);
  const savedForm = useMemo(() => (saved ? formOf(saved) : blankForm(today)), [saved, today]);
  const form = kept ? { ...savedForm, ...kept.form } : savedForm;
  const settled = useDeferredValue(form);
  const reading = useMemo(() => readForm(settled), [settled]);
  const version = kept?.version ?? saved?.version ?? 0;
  const isDirty = kept !== null;
  const isBehind = kept !== null && saved !== null && kept.version !== saved.version;
  const told = Object.fromEntries(refused.map(({ path, message }) => [path, message]));
  const shownProblems = reading.ok || (!isDirty && !market) ? told : reading.problems;

  const change = (part: Partial<MarketForm>) => {
    const next = { ...form, ...part };
    setRefused([]);
    setKept(
      JSON.stringify(next) === JSON.stringify(kept?.base ?? savedForm)
        ? null
        : { form: next, base: kept?.base ?? savedForm, version },
    );
  };
  const save = async () => {
    const now = readForm(form);
    if (!now.ok) return;
    setBusy(true);
    setRefused([]);
    const { name, pricingDate, content } = now;
    const answer = market
      ? await call("markets.save", { workspaceId, marketId: market.id, version, name, pricingDate, content })
      : await call("markets.create", { workspaceId, name, pricingDate, content });
    setBusy(false);
    if (answer.ok) {
      setKept(null);
      if ("marketId" in answer.output) router.push(`/w/${workspaceId}/markets/${answer.output.marketId}`);
      router.refresh();
    } else if (answer.current) setSaved(answer.current as Saved);
    else setRefused(answer.problems);
  };

  const fields = { form, problems: shownProblems, isReadOnly: !mayEdit, onChange: change };
  return (
    <Stack gap="md">
      <Group justify="space-between" align="end">
        <div>
          <Link href={`/w/${workspaceId}/markets`}>Markets</Link>
          <Title order={1}>
            {market ? market.name : "New market"}{" "}
            {market?.isArchived && <Badge variant="default">Archived</Badge>}
          </Title>
        </div>
        {market && <MarketActions workspaceId={workspaceId} market={market} />}
      </Group>
      {!mayEdit && <Text c="dimmed">You can read this market, not change it.</Text>}
      {isBehind && (
        <NewerMarket
          theirs={savedForm}
          mine={mergedForm(kept.base, form, savedForm)}
          onMine={() =>
            setKept({
              form: mergedForm(kept.base, form, savedForm),
              base: savedForm,
              version: saved.version,
            })
          }
          onTheirs={() => setKept(null)}
        />
      )}
      <SimpleGrid cols={{ base: 1, md: 2 }} spacing="xl">
        <Stack gap="md">
          <GeneralFields {...fields} />
          <DiscountFields {...fields} />
          <ScheduleFields {...fields} />
          <QuotedPoolFields {...fields} pools={pools} />
        </Stack>
        <MarketPreview reading={reading} />
      </SimpleGrid>
      {mayEdit && (
        <Group>
          <Button onClick={save} loading={isBusy} disabled={!isDirty || !reading.ok || isBehind}>
            {market ? "Save" : "Store the market"}
          </Button>
          <UndoButton kept={kept} undone={undone} onKept={setKept} onUndone={setUndone} />
          <Text size="sm" c="dimmed" aria-live="polite">
            {isDirty
              ? "Not saved yet; kept in this browser until it is."
              : market
                ? "Everything is saved."
                : ""}
          </Text>
        </Group>
      )}
      <Problems title="The market was not saved" problems={refused} />
    </Stack>
  );
}
