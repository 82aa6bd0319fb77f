"use client";

import { Group, TextInput } from "@mantine/core";
import { type FieldsProps, problemAt } from "./fields";

/** Name and pricing date. */
export function GeneralFields({ form, problems, isReadOnly, onChange }: FieldsProps) {
  return (
    <Group align="start" grow>
      <TextInput
        label="Name"
        value={form.name}
        readOnly={isReadOnly}
        error={problemAt(problems, "name")}
        onChange={(event) => onChange({ name: event.currentTarget.value })}
      />
      <TextInput
        label="Pricing date"
        description="YYYY-MM-DD"
        inputWrapperOrder={["label", "input", "description", "error"]}
        value={form.pricingDate}
        readOnly={isReadOnly}
        error={problemAt(problems, "pricingDate")}
        onChange={(event) => onChange({ pricingDate: event.currentTarget.value.trim() })}
      />
    </Group>
  );
}
