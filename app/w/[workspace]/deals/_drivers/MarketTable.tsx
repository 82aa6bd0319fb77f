"use client";

import { Text } from "@mantine/core";
import { useMemo } from "react";
import { FigureTable } from "@/app/_ui/table/FigureTable";
import type { FigureColumn } from "@/app/_ui/table/figureColumns";
import { type MarketDriver, SPREAD_SCALES } from "@/lib/pricing/drivers";
import type { NamedClass } from "./NameTable";

type Row = MarketDriver & { readonly name: string };

/** What one move of each market input does to each class. */
export function MarketTable({
  classes,
  drivers,
  isBusy,
  currency,
}: {
  classes: readonly NamedClass[];
  drivers: readonly MarketDriver[];
  isBusy: boolean;
  currency: string;
}) {
  const columns = useMemo(() => columnsOf(currency), [currency]);
  const rows = drivers.map((driver) => ({
    ...driver,
    name: classes.find(({ id }) => id === driver.id)?.name ?? driver.id,
  }));
  if (rows.length === 0)
    return (
      <Text size="sm" c="dimmed" role="status" py="sm">
        {isBusy ? "Revaluing the classes in this browser…" : ""}
      </Text>
    );
  return (
    <FigureTable
      name="market drivers"
      columns={columns}
      rows={rows}
      keyOf={({ id }) => id}
      hiddenAtFirst={["notional"]}
      minWidth={1080}
    />
  );
}

function columnsOf(currency: string): FigureColumn<Row>[] {
  const money = (
    key: string,
    header: string,
    unitWords: string,
    value: (row: Row) => number | null,
  ): FigureColumn<Row> => ({ key, header, unit: "money", unitWords, value });
  return [
    { key: "name", header: "Class", unit: "text", value: ({ name }) => name },
    money("notional", "Notional", currency, (row) => row.notional),
    money("spread01", "Spreads", `${currency} for +1 bp`, (row) => row.spread01),
    ...SPREAD_SCALES.map((scale, i) =>
      money(
        `scaled ${scale}`,
        "Spreads",
        `${currency} for ${scale < 1 ? "−" : "+"}${Math.round(Math.abs(scale - 1) * 100)} %`,
        (row) => row.scaled[i]!,
      ),
    ),
    money("recovery01", "Recovery", `${currency} for +1 %`, (row) => row.recovery01),
    money("correlation01", "Correlation", `${currency} for +1 %`, (row) => row.correlation01),
    money("rate01", "Rates", `${currency} for +1 bp`, (row) => row.rate01),
    money("carry1d", "Carry", `${currency} for one day`, (row) => row.carry1d),
    {
      key: "hedgeRatio",
      header: "Pool hedge",
      unit: "plain",
      unitWords: "notional per notional",
      value: (row) => row.hedgeRatio,
    },
    money("hedgeNotional", "Pool hedge", `notional, ${currency}`, (row) =>
      row.hedgeRatio === null ? null : row.hedgeRatio * row.notional,
    ),
  ];
}
