"use client";

import { Button, Group, Stack, Table, Text, Title } from "@mantine/core";
import { useRouter } from "next/navigation";
import { useState } from "react";
import { call } from "@/app/_ui/call";
import { Problems } from "@/app/_ui/Problems";
import { useAddress } from "@/app/_ui/useAddress";
import { fieldChanges } from "@/lib/activity/words";
import type { Operations } from "@/lib/operations";
import type { Problem } from "@/lib/platform/errors";
import { useDeal } from "../_frame/dealContext";

type Version = Operations["deals.history"]["output"]["versions"][number];

/** Every version of the deal: what it changed, how it differs from the one now, and taking it again as a new version. */
export function History({
  workspaceId,
  dealId,
  versions,
}: {
  workspaceId: string;
  dealId: string;
  versions: readonly Version[];
}) {
  const router = useRouter();
  const { mayEdit } = useDeal();
  const [chosen, setChosen] = useAddress("version", "");
  const [problems, setProblems] = useState<readonly Problem[]>([]);
  const now = versions[0];
  const old = versions.find(({ version }) => String(version) === chosen);
  const restore = async (version: number) => {
    const answer = await call("deals.restoreVersion", { workspaceId, dealId, version });
    setProblems(answer.ok ? [] : answer.problems);
    if (answer.ok) setChosen("");
    router.refresh();
  };
  return (
    <Stack gap="md">
      <Title order={2} size="h4">
        Versions
      </Title>
      <Table.ScrollContainer minWidth={520}>
        <Table fz="sm" verticalSpacing={4}>
          <Table.Thead>
            <Table.Tr>
              <Table.Th>Version</Table.Th>
              <Table.Th>Saved by</Table.Th>
              <Table.Th>When (UTC)</Table.Th>
              <Table.Th>Fields changed</Table.Th>
              <Table.Th />
            </Table.Tr>
          </Table.Thead>
          <Table.Tbody>
            {versions.map((row, i) => {
              const earlier = versions[i + 1];
              return (
                <Table.Tr key={row.version}>
                  <Table.Td>{row.version}</Table.Td>
                  <Table.Td>{row.savedBy}</Table.Td>
                  <Table.Td>{row.savedAt.slice(0, 16).replace("T", " ")}</Table.Td>
                  <Table.Td>
                    {earlier ? fieldChanges(earlier.content, row.content).length : "the first version"}
                  </Table.Td>
                  <Table.Td>
                    {row !== now && (
                      <Group gap="xs">
                        <Button
                          size="compact-xs"
                          variant="default"
                          aria-pressed={chosen === String(row.version)}
                          onClick={() => setChosen(String(row.version))}
                        >
                          Beside the one now
                        </Button>
                        {mayEdit && (
                          <Button size="compact-xs" variant="default" onClick={() => restore(row.version)}>
                            Take it again
                          </Button>
                        )}
                      </Group>
                    )}
                  </Table.Td>
                </Table.Tr>
              );
            })}
          </Table.Tbody>
        </Table>
      </Table.ScrollContainer>
      <Problems title="The version was not taken again" problems={problems} />
      {old && now && <Differences old={old} now={now} />}
    </Stack>
  );
}

function Differences({ old, now }: { old: Version; now: Version }) {
  const changes = fieldChanges(old.content, now.content);
  return (
    <section>
      <Title order={3} size="h5">
        Version {old.version} beside version {now.version}
      </Title>
      {changes.length === 0 && <Text c="dimmed">They say the same.</Text>}
      {changes.length > 0 && (
        <Table.ScrollContainer minWidth={520}>
          <Table fz="sm" verticalSpacing={2}>
            <Table.Thead>
              <Table.Tr>
                <Table.Th>Field (decimals, years)</Table.Th>
                <Table.Th>Version {old.version}</Table.Th>
                <Table.Th>Version {now.version}, now</Table.Th>
              </Table.Tr>
            </Table.Thead>
            <Table.Tbody>
              {changes.map(({ path, before, after }) => (
                <Table.Tr key={path}>
                  <Table.Td>{path}</Table.Td>
                  <Table.Td style={{ overflowWrap: "anywhere" }}>{words(before)}</Table.Td>
                  <Table.Td style={{ overflowWrap: "anywhere" }}>{words(after)}</Table.Td>
                </Table.Tr>
              ))}
            </Table.Tbody>
          </Table>
        </Table.ScrollContainer>
      )}
    </section>
  );
}

function words(value: unknown): string {
  if (value === null || value === undefined) return "—";
  return typeof value === "string" ? value : JSON.stringify(value);
}
