"use client";

import { useRouter } from "next/navigation";
import { type ReactNode, useMemo, useState } from "react";
import { call } from "@/app/_ui/call";
import { dealFormOf, readDealForm } from "@/lib/deals/form";
import { toRequest } from "@/lib/deals/request";
import type { Problem } from "@/lib/platform/errors";
import type { NameInput } from "@/lib/pricing/request";
import { blankDeal } from "./blankDeal";
import { type DealAtHand, DealContext, type MarketChoice, type OpenDeal } from "./dealContext";
import { roomAddress } from "./rooms";
import { useDraft } from "./useDraft";
import { useParts } from "./useParts";

/** Holds the deal that the rooms of its desk share: what is saved, what is typed, and the request of it. */
export function DealFrame({
  workspaceId,
  deal,
  mayEdit,
  pools,
  markets,
  children,
}: {
  workspaceId: string;
  deal: OpenDeal | null;
  mayEdit: boolean;
  pools: readonly { id: string; name: string }[];
  markets: readonly MarketChoice[];
  children: ReactNode;
}) {
  const router = useRouter();
  const saved = useMemo(
    () =>
      deal
        ? dealFormOf({ ...deal, poolId: deal.pool.id, marketId: deal.market.id })
        : blankDeal(pools, markets),
    [deal, pools, markets],
  );
  const version = deal?.version ?? 0;
  const draft = useDraft(`deal ${deal?.id ?? `new ${workspaceId}`}`, saved, version);
  const [refused, setRefused] = useState<readonly Problem[]>([]);
  const [tried, tryNames] = useState<readonly NameInput[] | null>(null);
  const [isSaving, setSaving] = useState(false);
  const { form, kept } = draft;
  const scheduleKind = markets.find(({ id }) => id === form.marketId)?.scheduleKind ?? "standard";
  const reading = useMemo(
    () => readDealForm(form, scheduleKind, deal?.content ?? null),
    [form, scheduleKind, deal],
  );
  const stamp = `${deal?.pool.version ?? 0} ${deal?.market.version ?? 0}`;
  const { parts } = useParts(workspaceId, form.poolId, form.marketId, stamp);
  const request = useMemo(
    () =>
      reading.ok && parts
        ? toRequest({ ...parts, names: tried ?? parts.names, content: reading.content })
        : null,
    [reading, parts, tried],
  );
  const isUntouchedNew = kept === null && deal === null;
  const problems = refused.length > 0 ? refused : reading.ok || isUntouchedNew ? [] : reading.problems;

  const save = async () => {
    if (!reading.ok) return null;
    setSaving(true);
    setRefused([]);
    const { name, poolId, marketId } = form;
    const fields = { workspaceId, name, poolId, marketId, content: reading.content };
    const answer = deal
      ? await call("deals.save", { ...fields, dealId: deal.id, version: kept?.version ?? version })
      : await call("deals.create", fields);
    setSaving(false);
    if (!answer.ok) {
      if (answer.status === 409) router.refresh();
      setRefused(answer.problems);
      return null;
    }
    draft.settle();
    if ("dealId" in answer.output) router.push(roomAddress(workspaceId, answer.output.dealId));
    router.refresh();
    return "version" in answer.output ? answer.output.version : 1;
  };

  const value: DealAtHand = {
    workspaceId,
    deal,
    mayEdit,
    mayWork: deal?.may.work ?? false,
    pools,
    markets,
    scheduleKind,
    saved,
    draft,
    form,
    change(part, gesture = null) {
      setRefused([]);
      draft.change(part, gesture);
    },
    isDirty: kept !== null,
    isBehind: kept !== null && deal !== null && kept.version !== deal.version,
    reading,
    problems,
    refused,
    problemAt: (path) =>
      problems.find((problem) => problem.path === path || problem.path.startsWith(`${path}.`))?.message,
    parts,
    tried,
    tryNames,
    request,
    isSaving,
    save,
  };
  return <DealContext.Provider value={value}>{children}</DealContext.Provider>;
}
