"use client";

import { Group, NativeSelect, Select, Text } from "@mantine/core";
import { useMemo, useState } from "react";
import { Figure } from "@/app/_ui/Figure";
import { assetCorrelation } from "@/lib/pricing/assetCorrelation";
import type { PricingReport } from "@/lib/pricing/report";
import type { PricingRequest } from "@/lib/pricing/request";
import { PairMatrix } from "./PairMatrix";

type PairReport = NonNullable<PricingReport["pairs"]>;
type Measure = "jointDefault" | "eventCorrelation";

const measures: readonly { value: Measure; label: string }[] = [
  { value: "jointDefault", label: "Joint default probability (%)" },
  { value: "eventCorrelation", label: "Event correlation (%), not the asset correlation" },
];

/** How every two names default together by maturity: the matrix sorted by sector, one pair exactly. */
export function Pairs({ pairs, of }: { pairs: PairReport; of: PricingRequest }) {
  const { pool: names, correlation } = of;
  const [measure, setMeasure] = useState<Measure>("jointDefault");
  const [kept, setChosen] = useState<readonly [number, number]>([0, 1]);
  const last = names.length - 1;
  const chosen = [Math.min(kept[0], last), Math.min(kept[1], last)] as const;
  const order = useMemo(
    () =>
      names
        .map((_, i) => i)
        .sort(
          (one, other) => (names[one]!.sector ?? "").localeCompare(names[other]!.sector ?? "") || one - other,
        ),
    [names],
  );
  const values = pairs[measure];
  const [row, column] = chosen;
  const label = (i: number) => {
    const name = names[i];
    return name ? `${name.id}${name.name ? `, ${name.name}` : ""}` : "";
  };
  const choices = names.map((_, i) => ({ value: String(i), label: label(i) }));
  const both = pairs.jointDefault[row]?.[column] ?? null;
  const asset = row === column ? 1 : assetCorrelation(correlation, names[row]!, names[column]!);
  return (
    <>
      <Group align="end">
        <NativeSelect
          size="xs"
          label="What the matrix shows"
          data={[...measures]}
          value={measure}
          onChange={(event) => setMeasure(event.currentTarget.value as Measure)}
        />
        <Select
          size="xs"
          label="One name"
          searchable
          limit={60}
          data={choices}
          value={String(row)}
          onChange={(value) => value !== null && setChosen([Number(value), column])}
        />
        <Select
          size="xs"
          label="Another name"
          searchable
          limit={60}
          data={choices}
          value={String(column)}
          onChange={(value) => value !== null && setChosen([row, Number(value)])}
        />
      </Group>
      <Text size="sm" aria-live="polite">
        {label(row)} {row !== column && <>and {label(column)}</>}: asset correlation{" "}
        <Figure value={asset} unit="percent" /> %,{" "}
        {row === column ? "default probability" : "joint default probability"}{" "}
        <Figure value={both} unit="percent" /> %, event correlation{" "}
        <Figure
          value={pairs.eventCorrelation[row]?.[column] ?? null}
          unit="percent"
          otherwise="One of them is sure."
        />{" "}
        %; alone <Figure value={pairs.jointDefault[row]?.[row] ?? null} unit="percent" /> % and{" "}
        <Figure value={pairs.jointDefault[column]?.[column] ?? null} unit="percent" /> %.
      </Text>
      <PairMatrix
        names={names}
        measure={measure === "jointDefault" ? "joint default probability" : "event correlation"}
        order={order}
        values={values}
        chosen={chosen}
        label={label}
        onChoose={setChosen}
      />
    </>
  );
}
