"use client";

import { Alert, Group, SegmentedControl, Stack, Text, Title } from "@mantine/core";
import { useMemo } from "react";
import { Problems } from "@/app/_ui/Problems";
import { useAddress } from "@/app/_ui/useAddress";
import { useDeal } from "../_frame/dealContext";
import { NothingToShow } from "../_frame/NothingToShow";
import { PiecesProgress } from "../_frame/PiecesProgress";
import { MarketTable } from "./MarketTable";
import { NameTable } from "./NameTable";
import { nameMeasures, nameRows, sectorRows } from "./rows";
import { SectorTable } from "./SectorTable";
import { useDrivers } from "./useDrivers";

/** The room of what moves each class: market inputs, names, sectors, defaults, and the pool as a hedge. */
export function Drivers() {
  const { request, form } = useDeal();
  const [over, setOver] = useAddress("over", "names");
  const [by, setMeasure] = useAddress("by", "spread01");
  const drivers = useDrivers(request);
  const classes = useMemo(
    () =>
      (request?.tranches ?? []).map(({ id }) => ({
        id,
        name: form.classes.find((row) => (row.id.trim() || row.key) === id)?.name || id,
      })),
    [request, form.classes],
  );
  const rows = useMemo(
    () => (request ? nameRows(request.pool, drivers.names.outputs) : []),
    [request, drivers.names.outputs],
  );
  if (!request || classes.length === 0)
    return <NothingToShow what="What moves a class" needsClass={request !== null} />;
  const currency = request.currency ?? "EUR";
  const measures = nameMeasures(currency);
  const { value: measure, about } = measures.find(({ value }) => value === by) ?? measures[0]!;
  return (
    <Stack gap="lg">
      <section aria-labelledby="marketDrivers">
        <Title order={2} size="h5" id="marketDrivers">
          Market inputs
        </Title>
        <Text size="sm" c="dimmed">
          Change of each class's value to the protection seller, in {currency}, by full revaluation with the
          move named in the header; spreads are kept where recovery or rates move.
        </Text>
        <Problems title="Why there are no figures" problems={drivers.problems} />
        <MarketTable
          classes={classes}
          drivers={drivers.market}
          isBusy={drivers.isMarketBusy}
          currency={currency}
        />
      </section>
      <section aria-labelledby="nameDrivers">
        <Group justify="space-between" align="end">
          <div>
            <Title order={2} size="h5" id="nameDrivers">
              {over === "names" ? "Name by name" : "Sector by sector"}
            </Title>
            <Text size="sm" c="dimmed">
              {about}
            </Text>
          </div>
          <Group gap="xs" className="screenOnly">
            <SegmentedControl
              size="xs"
              aria-label="What is shown"
              value={measure}
              onChange={setMeasure}
              data={measures.map(({ value, label }) => ({ value, label }))}
            />
            <SegmentedControl
              size="xs"
              aria-label="Names or sectors"
              value={over === "names" ? "names" : "sectors"}
              onChange={setOver}
              data={[
                { value: "names", label: "Names" },
                { value: "sectors", label: "Sectors" },
              ]}
            />
          </Group>
        </Group>
        <PiecesProgress pieces={drivers.names} total={drivers.pieces} what="names" />
        {drivers.names.problem && <Alert color="red">{drivers.names.problem}</Alert>}
        {over === "names" ? (
          <NameTable rows={rows} classes={classes} measure={measure} currency={currency} />
        ) : (
          <SectorTable
            rows={sectorRows(rows, classes.length)}
            classes={classes}
            measure={measure}
            currency={currency}
          />
        )}
      </section>
    </Stack>
  );
}
