"use client";

import { Button, Table } from "@mantine/core";
import {
  createColumnHelper,
  createSortedRowModel,
  rowSortingFeature,
  sortFns,
  tableFeatures,
  useTable,
} from "@tanstack/react-table";
import { Figure } from "@/app/_ui/Figure";
import type { FigureUnit } from "@/app/_ui/figures";
import type { PricingReport } from "@/lib/pricing/report";

type Tranche = PricingReport["tranches"][number];

const features = tableFeatures({ rowSortingFeature, sortedRowModel: createSortedRowModel(), sortFns });
const helper = createColumnHelper<typeof features, Tranche>();

/** Every class with its figures; a click on a header sorts. */
export function ClassesTable({
  tranches,
  nameOf,
  currency,
}: {
  tranches: readonly Tranche[];
  nameOf(id: string): string;
  currency: string;
}) {
  const figure = (key: keyof Tranche & string, header: string, unit: FigureUnit) =>
    helper.accessor((row) => row[key] as number | null, {
      id: key,
      header,
      cell: (cell) => <Figure value={cell.getValue()} unit={unit} />,
    });
  const columns = helper.columns([
    helper.accessor((row) => nameOf(row.id), { id: "name", header: "Class" }),
    figure("attachment", "Attachment (%)", "percent"),
    figure("detachment", "Detachment (%)", "percent"),
    figure("expectedLoss", "Expected loss (%)", "percent"),
    figure("hitProbability", "Hit (%)", "percent"),
    figure("exhaustionProbability", "Exhaustion (%)", "percent"),
    figure("parSpread", "Par spread (bp)", "basisPoints"),
    figure("upfrontAtRunning", "Upfront at coupon (%)", "percent"),
    figure("sellerValue", `Value to seller (${currency})`, "money"),
    figure("annuity", "Annuity (years)", "years"),
    figure("standardDeviation", "Std. deviation (%)", "percent"),
    figure("leverage", "Leverage", "plain"),
    figure("defaultsToAttach", "Defaults to attach", "plain"),
  ]);
  const table = useTable({ features, columns, data: [...tranches] });
  return (
    <Table.ScrollContainer minWidth={1100}>
      <Table verticalSpacing={4} highlightOnHover>
        <Table.Thead>
          {table.getHeaderGroups().map((group) => (
            <Table.Tr key={group.id}>
              {group.headers.map((header, i) => {
                const sorted = header.column.getIsSorted();
                return (
                  <Table.Th
                    key={header.id}
                    ta={i === 0 ? "left" : "right"}
                    aria-sort={sorted === "asc" ? "ascending" : sorted === "desc" ? "descending" : "none"}
                  >
                    <Button
                      size="compact-xs"
                      variant="subtle"
                      color="gray"
                      onClick={header.column.getToggleSortingHandler()}
                    >
                      {String(header.column.columnDef.header)}
                      {sorted === "asc" ? " ↑" : sorted === "desc" ? " ↓" : ""}
                    </Button>
                  </Table.Th>
                );
              })}
            </Table.Tr>
          ))}
        </Table.Thead>
        <Table.Tbody>
          {table.getRowModel().rows.map((row) => (
            <Table.Tr key={row.id}>
              {row.getAllCells().map((cell, i) => (
                <Table.Td key={cell.id} ta={i === 0 ? "left" : "right"}>
                  <table.FlexRender cell={cell} />
                </Table.Td>
              ))}
            </Table.Tr>
          ))}
        </Table.Tbody>
      </Table>
    </Table.ScrollContainer>
  );
}
