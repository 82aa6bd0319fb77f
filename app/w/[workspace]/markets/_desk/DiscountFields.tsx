"use client";

import { Button, Fieldset, NativeSelect, Stack, Table, Text, TextInput } from "@mantine/core";
import type { MarketForm } from "@/lib/markets/form";
import { type FieldsProps, problemAt } from "./fields";

const kinds = [
  { value: "flat", label: "one flat zero rate" },
  { value: "zero", label: "zero rates at nodes" },
  { value: "par", label: "par swap rates (annual, whole years)" },
];
const path = "content.discount";

/** The discount curve: continuously compounded zero rates, or par swap rates that are bootstrapped. */
export function DiscountFields({ form, problems, isReadOnly, onChange }: FieldsProps) {
  return (
    <Fieldset legend="Discount curve">
      <Stack gap="sm">
        <NativeSelect
          label="Given as"
          data={kinds}
          value={form.discountKind}
          disabled={isReadOnly}
          onChange={(event) =>
            onChange({ discountKind: event.currentTarget.value as MarketForm["discountKind"] })
          }
        />
        {form.discountKind === "flat" ? (
          <TextInput
            label="Zero rate, continuously compounded (%)"
            inputMode="decimal"
            value={form.rate}
            readOnly={isReadOnly}
            error={problemAt(problems, `${path}.rate`)}
            onChange={(event) => onChange({ rate: event.currentTarget.value })}
          />
        ) : (
          <Nodes form={form} problems={problems} isReadOnly={isReadOnly} onChange={onChange} />
        )}
      </Stack>
    </Fieldset>
  );
}

function Nodes({ form, problems, isReadOnly, onChange }: FieldsProps) {
  const { nodes, discountKind } = form;
  const change = (i: number, part: Partial<MarketForm["nodes"][number]>) =>
    onChange({ nodes: nodes.map((node, k) => (k === i ? { ...node, ...part } : node)) });
  const rateHeader = discountKind === "zero" ? "Zero rate (%)" : "Par swap rate (%)";
  return (
    <>
      <Table verticalSpacing={4}>
        <Table.Thead>
          <Table.Tr>
            <Table.Th>Years</Table.Th>
            <Table.Th>{rateHeader}</Table.Th>
            {!isReadOnly && <Table.Th aria-label="Remove" />}
          </Table.Tr>
        </Table.Thead>
        <Table.Tbody>
          {nodes.map((node, i) => (
            // biome-ignore lint/suspicious/noArrayIndexKey: a node is its place in the curve
            <Table.Tr key={i}>
              <Table.Td>
                <TextInput
                  aria-label={`Years of node ${i + 1}`}
                  inputMode="decimal"
                  value={node.years}
                  readOnly={isReadOnly}
                  error={problemAt(problems, `${path}.nodes.${i}.years`)}
                  onChange={(event) => change(i, { years: event.currentTarget.value })}
                />
              </Table.Td>
              <Table.Td>
                <TextInput
                  aria-label={`${rateHeader} of node ${i + 1}`}
                  inputMode="decimal"
                  value={node.rate}
                  readOnly={isReadOnly}
                  error={problemAt(problems, `${path}.nodes.${i}.rate`)}
                  onChange={(event) => change(i, { rate: event.currentTarget.value })}
                />
              </Table.Td>
              {!isReadOnly && (
                <Table.Td>
                  <Button
                    variant="subtle"
                    size="xs"
                    aria-label={`Remove node ${i + 1}`}
                    onClick={() => onChange({ nodes: nodes.filter((_, k) => k !== i) })}
                  >
                    ×
                  </Button>
                </Table.Td>
              )}
            </Table.Tr>
          ))}
        </Table.Tbody>
      </Table>
      {problems[`${path}.nodes`] && (
        <Text size="sm" c="var(--mantine-color-error)">
          {problems[`${path}.nodes`]}
        </Text>
      )}
      {!isReadOnly && (
        <Button
          variant="default"
          size="xs"
          onClick={() => onChange({ nodes: [...nodes, { years: nextYears(nodes), rate: "" }] })}
        >
          Add a node
        </Button>
      )}
    </>
  );
}

/** The usual tenor after the last one. */
function nextYears(nodes: MarketForm["nodes"]): string {
  const last = Number(nodes.at(-1)?.years ?? 0);
  return String([1, 2, 3, 4, 5, 7, 10, 15, 20, 30].find((years) => years > last) ?? "");
}
