"use client";

import { NativeSelect, SimpleGrid, Text, Textarea, TextInput } from "@mantine/core";
import Link from "next/link";
import type { CorrelationText } from "@/lib/deals/correlationForm";
import { useDeal } from "../_frame/dealContext";
import { correlationWords, mappingWords } from "./words";

/** The deal's choice of correlation, in one place. */
export function Choice() {
  const { workspaceId, form, change, mayEdit, parts, problemAt } = useDeal();
  const { correlation } = form;
  const set = (part: Partial<CorrelationText>, gesture: string | null = null) =>
    change({ correlation: { ...correlation, ...part } }, gesture);
  const quoted = parts?.market.quotedPools ?? [];
  const kinds = (Object.keys(correlationWords) as CorrelationText["kind"][]).filter(
    (kind) => kind !== "stored" || correlation.kind === "stored",
  );
  const typed = (field: "within" | "between", label: string) => (
    <TextInput
      size="xs"
      label={label}
      disabled={!mayEdit}
      value={correlation[field]}
      error={problemAt(`content.correlation.${field}`)}
      onChange={(event) => set({ [field]: event.currentTarget.value }, `correlation ${field}`)}
    />
  );
  const isCurve = correlation.kind === "base" || correlation.kind === "market";
  return (
    <>
      <SimpleGrid cols={{ base: 2, sm: 3, lg: 6 }} spacing="xs">
        <NativeSelect
          size="xs"
          label="How names default together"
          disabled={!mayEdit}
          value={correlation.kind}
          data={kinds.map((kind) => ({ value: kind, label: correlationWords[kind] }))}
          error={
            correlation.kind === "loadings" || correlation.kind === "stored"
              ? problemAt("content.correlation")
              : undefined
          }
          onChange={(event) => {
            const kind = event.currentTarget.value as CorrelationText["kind"];
            set(
              kind === "market" && correlation.quotedPool === ""
                ? { kind, quotedPool: quoted[0]?.key ?? "" }
                : { kind },
            );
          }}
        />
        {correlation.kind === "flat" && (
          <TextInput
            size="xs"
            label="Flat asset correlation (%)"
            disabled={!mayEdit}
            value={form.rho}
            error={problemAt("content.correlation")}
            onChange={(event) => change({ rho: event.currentTarget.value }, "rho")}
          />
        )}
        {correlation.kind === "sector" && (
          <>
            {typed("within", "Asset correlation within a sector (%)")}
            {typed("between", "Asset correlation between sectors (%)")}
          </>
        )}
        {correlation.kind === "market" && (
          <NativeSelect
            size="xs"
            label="Quoted pool of the market"
            disabled={!mayEdit}
            value={correlation.quotedPool}
            data={[
              ...(quoted.some(({ key }) => key === correlation.quotedPool)
                ? []
                : [{ value: correlation.quotedPool, label: "Choose" }]),
              ...quoted.map(({ key, name }) => ({ value: key, label: name })),
            ]}
            error={problemAt("content.correlation")}
            onChange={(event) => set({ quotedPool: event.currentTarget.value })}
          />
        )}
        {isCurve && (
          <>
            <NativeSelect
              size="xs"
              label="Between strikes"
              disabled={!mayEdit}
              value={correlation.interpolation}
              data={[
                { value: "linear", label: "Linear" },
                { value: "monotone", label: "Monotone cubic" },
              ]}
              onChange={(event) =>
                set({ interpolation: event.currentTarget.value as CorrelationText["interpolation"] })
              }
            />
            <NativeSelect
              size="xs"
              label="Outside the strikes"
              disabled={!mayEdit}
              value={correlation.beyond}
              data={[
                { value: "flat", label: "Flat" },
                { value: "linear", label: "Along the last chord" },
              ]}
              onChange={(event) => set({ beyond: event.currentTarget.value as CorrelationText["beyond"] })}
            />
            <NativeSelect
              size="xs"
              label="From quoted pool to deal's pool"
              disabled={!mayEdit}
              value={correlation.mapping}
              data={Object.entries(mappingWords).map(([value, label]) => ({ value, label }))}
              onChange={(event) => set({ mapping: event.currentTarget.value as CorrelationText["mapping"] })}
            />
          </>
        )}
      </SimpleGrid>
      {correlation.kind === "market" && quoted.length === 0 && parts && (
        <Text size="sm" c="dimmed">
          The market has no quoted pool: give it tranche quotes on{" "}
          <Link href={`/w/${workspaceId}/markets/${form.marketId}`}>its own page</Link>.
        </Text>
      )}
      {correlation.kind === "base" && (
        <Textarea
          size="xs"
          w={320}
          label="Base curve"
          description="Strike (% of pool) and correlation (%), one pair a line"
          placeholder={"3\t42\n7\t55"}
          autosize
          minRows={4}
          maxRows={14}
          classNames={{ input: "figure" }}
          disabled={!mayEdit}
          value={correlation.nodes}
          error={problemAt("content.correlation")}
          onChange={(event) => set({ nodes: event.currentTarget.value }, "correlation nodes")}
        />
      )}
    </>
  );
}
