"use client";

import { Button, Text } from "@mantine/core";
import type { ImportReading } from "@/lib/pools/import/read";

/** Takes the rows that fit, saying how many are left out; gives those as a file. */
export function TakeButtons({
  reading,
  isBusy,
  replaces,
  onTake,
  onRejected,
}: {
  reading: ImportReading;
  isBusy: boolean;
  replaces: boolean;
  onTake: () => void;
  onRejected: () => void;
}) {
  const bad = reading.rows.length - reading.names.length;
  const isWhole = bad === 0 && reading.tableProblems.length === 0;
  const count = reading.names.length;
  const words = `${count} ${count === 1 ? "name" : "names"}`;
  return (
    <>
      <Button
        onClick={onTake}
        loading={isBusy}
        disabled={reading.tableProblems.length > 0 || count === 0}
        {...(isWhole ? {} : { color: "orange.9" })}
      >
        {replaces ? `Replace the pool's names by ${words}` : `Store ${words}`}
        {bad > 0 ? `, leave ${bad} out` : ""}
      </Button>
      {bad > 0 && (
        <Button variant="default" onClick={onRejected}>
          Save rejected rows as CSV
        </Button>
      )}
      {bad > 0 && (
        <Text size="sm">
          {bad} {bad === 1 ? "row does" : "rows do"} not fit: mend below the column, or leave out.
        </Text>
      )}
    </>
  );
}
