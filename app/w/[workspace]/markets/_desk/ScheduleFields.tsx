"use client";

import { Fieldset, NativeSelect, Stack, Textarea, TextInput } from "@mantine/core";
import type { MarketForm } from "@/lib/markets/form";
import { type FieldsProps, problemAt, problemsBelow } from "./fields";

const kinds = [
  { value: "standard", label: "standard: 20 March, June, September, December" },
  { value: "even", label: "even periods from the pricing date, no calendar" },
];

/** When premiums are paid, and on which days nobody pays. */
export function ScheduleFields({ form, problems, isReadOnly, onChange }: FieldsProps) {
  return (
    <Fieldset legend="Payment dates">
      <Stack gap="sm">
        <NativeSelect
          label="Rule"
          data={kinds}
          value={form.scheduleKind}
          disabled={isReadOnly}
          onChange={(event) =>
            onChange({ scheduleKind: event.currentTarget.value as MarketForm["scheduleKind"] })
          }
        />
        {form.scheduleKind === "even" ? (
          <TextInput
            label="Payments a year"
            inputMode="numeric"
            value={form.perYear}
            readOnly={isReadOnly}
            error={problemAt(problems, "content.schedule.perYear")}
            onChange={(event) => onChange({ perYear: event.currentTarget.value })}
          />
        ) : (
          <Textarea
            label="Holidays"
            description="Dates YYYY-MM-DD, one a line; weekends need not be listed"
            autosize
            minRows={3}
            maxRows={10}
            value={form.holidays}
            readOnly={isReadOnly}
            error={
              problemsBelow(problems, "content.schedule.holidays") ??
              problemsBelow(problems, "content.schedule")
            }
            onChange={(event) => onChange({ holidays: event.currentTarget.value })}
          />
        )}
      </Stack>
    </Fieldset>
  );
}
