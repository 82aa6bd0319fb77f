"use client";

import { Alert, NativeSelect, SimpleGrid, TextInput } from "@mantine/core";
import Link from "next/link";
import type { DealForm } from "@/lib/deals/form";
import { correlationWords } from "../_correlation/words";
import { useDeal } from "../_frame/dealContext";

/** What the deal is made of besides its classes: name, pool, market, maturity, correlation, loss law. */
export function Terms() {
  const { workspaceId, form, change, mayEdit, pools, markets, scheduleKind, problemAt } = useDeal();
  const text = (field: "name" | "maturity" | "years" | "rho", path: string) => ({
    size: "xs",
    disabled: !mayEdit,
    value: form[field],
    error: problemAt(path),
    onChange: (event: { currentTarget: { value: string } }) =>
      change({ [field]: event.currentTarget.value }, field),
  });
  return (
    <>
      {(pools.length === 0 || markets.length === 0) && (
        <Alert color="yellow">
          A deal needs a <Link href={`/w/${workspaceId}/pools/new`}>pool</Link> and a{" "}
          <Link href={`/w/${workspaceId}/markets/new`}>market</Link> first.
        </Alert>
      )}
      <SimpleGrid cols={{ base: 2, sm: 3, lg: 6 }} spacing="xs">
        <TextInput label="Name" required {...text("name", "name")} />
        <NativeSelect
          label="Pool"
          size="xs"
          disabled={!mayEdit}
          data={pools.map((row) => ({ value: row.id, label: row.name }))}
          value={form.poolId}
          error={problemAt("poolId")}
          onChange={(event) => change({ poolId: event.currentTarget.value })}
        />
        <NativeSelect
          label="Market"
          size="xs"
          disabled={!mayEdit}
          data={markets.map((row) => ({ value: row.id, label: `${row.name} (${row.pricingDate})` }))}
          value={form.marketId}
          error={problemAt("marketId")}
          onChange={(event) => change({ marketId: event.currentTarget.value })}
        />
        {scheduleKind === "standard" ? (
          <TextInput
            label="Maturity (20 Jun or 20 Dec)"
            placeholder="YYYY-MM-DD"
            {...text("maturity", "content.maturity")}
          />
        ) : (
          <TextInput label="Maturity (years)" {...text("years", "content.years")} />
        )}
        {form.correlation.kind === "flat" ? (
          <TextInput label="Flat asset correlation (%)" {...text("rho", "content.correlation")} />
        ) : (
          <TextInput
            label="Correlation (see its room)"
            size="xs"
            disabled
            value={correlationWords[form.correlation.kind]}
            error={problemAt("content.correlation")}
          />
        )}
        <NativeSelect
          label="Loss law"
          size="xs"
          disabled={!mayEdit}
          data={[
            { value: "finite", label: "Finite pool, exact" },
            { value: "largePool", label: "Large pool, one class" },
          ]}
          value={form.law}
          error={problemAt("content.law")}
          onChange={(event) => change({ law: event.currentTarget.value as DealForm["law"] })}
        />
      </SimpleGrid>
    </>
  );
}
