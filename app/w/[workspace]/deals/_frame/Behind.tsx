"use client";

import { Alert, Button, Group, Radio, Table, Text } from "@mantine/core";
import { useMemo, useState } from "react";
import { mergeForms, withTheirs } from "@/lib/deals/merge";
import { useDeal } from "./dealContext";

/** Someone saved meanwhile: what does not touch is laid together, what does is chosen field by field; nothing typed is lost. */
export function Behind() {
  const { deal, draft, saved } = useDeal();
  const [theirs, setTheirs] = useState<ReadonlySet<string>>(new Set());
  const { kept } = draft;
  const merged = useMemo(
    () => kept && mergeForms(kept.base ?? saved, { ...saved, ...kept.form }, saved),
    [kept, saved],
  );
  if (!deal || !kept || !merged) return null;
  const { conflicts } = merged;
  const take = (path: string, isTheirs: boolean) => {
    const next = new Set(theirs);
    if (isTheirs) next.add(path);
    else next.delete(path);
    setTheirs(next);
  };
  return (
    <Alert color="yellow" title="Someone saved a newer version of this deal meanwhile">
      <Text size="sm">
        {conflicts.length === 0
          ? `What you typed on version ${kept.version} and what version ${deal.version} changed do not touch each other.`
          : `You began on version ${kept.version}; version ${deal.version} changed the same fields. Choose for each; the rest is laid together.`}
      </Text>
      {conflicts.length > 0 && (
        <Table fz="sm" verticalSpacing={2} aria-label="Both versions">
          <Table.Thead>
            <Table.Tr>
              <Table.Th>Field</Table.Th>
              <Table.Th>Typed here</Table.Th>
              <Table.Th>Saved now</Table.Th>
            </Table.Tr>
          </Table.Thead>
          <Table.Tbody>
            {conflicts.map(({ path, label, mine, theirs: other }) => (
              <Table.Tr key={path}>
                <Table.Td>{label}</Table.Td>
                <Table.Td>
                  <Radio
                    size="xs"
                    name={path}
                    label={mine || "empty"}
                    checked={!theirs.has(path)}
                    onChange={() => take(path, false)}
                  />
                </Table.Td>
                <Table.Td>
                  <Radio
                    size="xs"
                    name={path}
                    label={other || "empty"}
                    checked={theirs.has(path)}
                    onChange={() => take(path, true)}
                  />
                </Table.Td>
              </Table.Tr>
            ))}
          </Table.Tbody>
        </Table>
      )}
      <Group mt="xs">
        <Button
          size="compact-sm"
          onClick={() => draft.rebase(withTheirs(merged, saved, theirs), deal.version)}
        >
          Go on with both on version {deal.version}
        </Button>
        <Button size="compact-sm" variant="default" onClick={draft.discard}>
          Take the saved one, drop mine
        </Button>
      </Group>
    </Alert>
  );
}
