"use client";

import { Button, Group, Text, Title } from "@mantine/core";
import { useRouter } from "next/navigation";
import { useMemo, useState } from "react";
import { call } from "@/app/_ui/call";
import { Problems } from "@/app/_ui/Problems";
import { FigureTable } from "@/app/_ui/table/FigureTable";
import type { FigureColumn } from "@/app/_ui/table/figureColumns";
import { usePieces } from "@/app/_ui/usePieces";
import type { ClassText } from "@/lib/deals/form";
import type { Operations } from "@/lib/operations";
import type { Problem } from "@/lib/platform/errors";
import type { PricingReport, TrancheReport } from "@/lib/pricing/report";
import type { PricingRequest } from "@/lib/pricing/request";
import { useDeal } from "../_frame/dealContext";
import { PiecesProgress } from "../_frame/PiecesProgress";
import { hiddenTrancheColumns, trancheColumns } from "../_report/trancheColumns";
import { classesOf, classTexts } from "./classesOf";
import { MiniHull } from "./MiniHull";
import styles from "./sizing.module.css";

export type Alternatives = Operations["alternatives.list"]["output"]["alternatives"];

interface Structure {
  readonly key: string;
  readonly name: string;
  readonly about: string;
  readonly classes: readonly ClassText[];
  readonly isKept: boolean;
}

type Row = TrancheReport & { readonly key: string; readonly structure: string; readonly name: string };

/** The deal as typed, the sizing at hand and the kept alternatives side by side, all on the pool and market at hand. */
export function Compared({
  kept,
  placed,
  request,
}: {
  kept: Alternatives;
  placed: readonly ClassText[] | null;
  request: PricingRequest;
}) {
  const { workspaceId, deal, form, mayEdit, change } = useDeal();
  const router = useRouter();
  const [refused, setRefused] = useState<readonly Problem[]>([]);
  const structures = useMemo<Structure[]>(
    () => [
      {
        key: "typed",
        name: "The deal as typed",
        about: "",
        classes: form.classes,
        isKept: false,
      },
      ...(placed ? [{ key: "placed", name: "Sized above", about: "", classes: placed, isKept: false }] : []),
      ...kept.map(({ id, name, content, by, at }) => ({
        key: id,
        name,
        about: `${content.note ? `${content.note}. ` : ""}Kept by ${by}, ${at.slice(0, 10)}.`,
        classes: classTexts(content.classes),
        isKept: true,
      })),
    ],
    [form.classes, placed, kept],
  );
  const asked = useMemo(() => {
    const requests = structures.map(({ classes }) => ({
      ...request,
      tranches: (classesOf(classes) ?? []).map(({ name: _name, ...tranche }) => tranche),
      nthToDefault: [],
      include: [],
    }));
    return { requests, key: `structures ${JSON.stringify(requests)}` };
  }, [structures, request]);
  const priced = usePieces("price", asked.key, asked.requests);
  const currency = request.currency ?? "EUR";
  const rows = useMemo(
    () =>
      structures.flatMap(({ key, name, classes }, i): Row[] => {
        const answer = priced.outputs[i];
        if (!answer?.ok) return [];
        const { tranches } = JSON.parse(answer.report) as PricingReport;
        return tranches.map((tranche) => ({
          ...tranche,
          key: `${key} ${tranche.id}`,
          structure: name,
          name: classes.find((row) => (row.id.trim() || row.key) === tranche.id)?.name ?? tranche.id,
        }));
      }),
    [structures, priced.outputs],
  );
  const columns = useMemo<FigureColumn<Row>[]>(
    () => [
      { key: "structure", header: "Structure", unit: "text", value: ({ structure }) => structure },
      { key: "name", header: "Class", unit: "text", value: ({ name }) => name },
      {
        key: "attachment",
        header: "Attachment",
        unit: "percent",
        unitWords: "%",
        value: ({ attachment }) => attachment,
      },
      {
        key: "detachment",
        header: "Detachment",
        unit: "percent",
        unitWords: "%",
        value: ({ detachment }) => detachment,
      },
      ...(trancheColumns(currency, "class") as FigureColumn<Row>[]),
    ],
    [currency],
  );
  const reach = reachOf(structures);
  const remove = async (alternativeId: string) => {
    if (!deal) return;
    const answer = await call("alternatives.remove", { workspaceId, dealId: deal.id, alternativeId });
    setRefused(answer.ok ? [] : answer.problems);
    router.refresh();
  };
  return (
    <section aria-labelledby="compared">
      <Title order={2} size="h5" id="compared">
        Structures side by side
      </Title>
      <Text size="sm" c="dimmed">
        All to one scale, priced on the pool and market at hand.
        {kept.length === 0 && " No alternative is kept beside this deal yet."}
      </Text>
      <Problems title="The alternative was not deleted" problems={refused} />
      {/* biome-ignore lint/a11y/noNoninteractiveTabindex: a region that scrolls must be reached by keyboard */}
      <section className={styles.hulls} tabIndex={0} aria-label="Structures to scale">
        {structures.map(({ key, name, about, classes, isKept }) => (
          <article key={key} className={styles.hull}>
            <Title order={3} size="h6">
              {name}
            </Title>
            <MiniHull classes={classes} reach={reach} name={name} />
            <Text size="xs" c="dimmed">
              {about}
            </Text>
            {isKept && mayEdit && (
              <Group gap={4} className="screenOnly">
                <Button size="compact-xs" variant="default" onClick={() => change({ classes })}>
                  Lay over the deal
                </Button>
                <Button
                  size="compact-xs"
                  variant="default"
                  aria-label={`Delete ${name}`}
                  onClick={() => remove(key)}
                >
                  Delete
                </Button>
              </Group>
            )}
          </article>
        ))}
      </section>
      <PiecesProgress pieces={priced} total={structures.length} what="structures" />
      <FigureTable
        name="structures side by side"
        columns={columns}
        rows={rows}
        keyOf={({ key }) => key}
        hiddenAtFirst={hiddenTrancheColumns}
        minWidth={1100}
      />
    </section>
  );
}

/** One height for all: a little above the highest boundary below the whole pool. */
function reachOf(structures: readonly Structure[]): number {
  const strikes = structures.flatMap(({ classes }) =>
    classes.flatMap(({ attachment, detachment }) => [Number(attachment), Number(detachment)]),
  );
  const below = strikes.filter((strike) => strike > 0 && strike < 100);
  return Math.min(1, Math.max(2, ...below) * 0.0118);
}
