"use client";

import { Button, Group, NativeSelect, Stack, Table, Text, Title } from "@mantine/core";
import { usePathname, useRouter, useSearchParams } from "next/navigation";
import { useState } from "react";
import { call } from "@/app/_ui/call";
import { Problems } from "@/app/_ui/Problems";
import { saveFile } from "@/app/_ui/saveFile";
import type { Operations } from "@/lib/operations";
import type { Problem } from "@/lib/platform/errors";

const rooms = [
  ["deal", "Deals"],
  ["run", "Runs"],
  ["review", "Reviews"],
  ["comment", "Comments"],
  ["thread", "Threads"],
  ["pool", "Pools"],
  ["market", "Markets"],
  ["member", "Members"],
  ["workspace", "The workspace"],
] as const;

interface Chosen {
  readonly dealId: string | undefined;
  readonly personId: string | undefined;
  readonly room: string | undefined;
}

/** Who changed what and when, with each field before and after; append-only, taken away as CSV. */
export function Activity({
  workspaceId,
  page,
  choices,
  chosen,
}: {
  workspaceId: string;
  page: Operations["activity.list"]["output"];
  choices: Operations["activity.choices"]["output"];
  chosen: Chosen;
}) {
  const router = useRouter();
  const path = usePathname();
  const parameters = useSearchParams();
  const [problems, setProblems] = useState<readonly Problem[]>([]);
  const choose = (key: string, value: string) => {
    const next = new URLSearchParams(parameters);
    if (key !== "before") next.delete("before");
    if (value) next.set(key, value);
    else next.delete(key);
    router.push(`${path}?${next}`);
  };
  const takeAway = async () => {
    const answer = await call("activity.export", { workspaceId, ...chosen });
    setProblems(answer.ok ? [] : answer.problems);
    if (answer.ok) saveFile("activity.csv", answer.output.csv);
  };
  const last = page.rows.at(-1);
  return (
    <Stack>
      <Title order={1}>Activity</Title>
      <Group align="end">
        <NativeSelect
          size="xs"
          label="Deal"
          value={chosen.dealId ?? ""}
          data={[
            { value: "", label: "All" },
            ...choices.deals.map(({ id, name }) => ({ value: id, label: name })),
          ]}
          onChange={(event) => choose("deal", event.currentTarget.value)}
        />
        <NativeSelect
          size="xs"
          label="Person"
          value={chosen.personId ?? ""}
          data={[
            { value: "", label: "Everyone" },
            ...choices.people.map(({ id, name }) => ({ value: id, label: name })),
          ]}
          onChange={(event) => choose("person", event.currentTarget.value)}
        />
        <NativeSelect
          size="xs"
          label="About"
          value={chosen.room ?? ""}
          data={[{ value: "", label: "Everything" }, ...rooms.map(([value, label]) => ({ value, label }))]}
          onChange={(event) => choose("room", event.currentTarget.value)}
        />
        <Button size="xs" variant="default" onClick={takeAway}>
          Take away as CSV
        </Button>
      </Group>
      <Problems title="Nothing was taken away" problems={problems} />
      {page.rows.length === 0 ? (
        <Text c="dimmed">Nothing like that has happened.</Text>
      ) : (
        <Table.ScrollContainer minWidth={640}>
          <Table fz="sm" verticalSpacing={4}>
            <Table.Thead>
              <Table.Tr>
                <Table.Th>When (UTC)</Table.Th>
                <Table.Th>Who</Table.Th>
                <Table.Th>What</Table.Th>
                <Table.Th>Deal</Table.Th>
                <Table.Th>Before and after</Table.Th>
              </Table.Tr>
            </Table.Thead>
            <Table.Tbody>
              {page.rows.map((row) => (
                <Table.Tr key={row.id}>
                  <Table.Td style={{ whiteSpace: "nowrap" }}>
                    {row.at.slice(0, 19).replace("T", " ")}
                  </Table.Td>
                  <Table.Td>{row.by}</Table.Td>
                  <Table.Td>{row.words}</Table.Td>
                  <Table.Td>{row.deal}</Table.Td>
                  <Table.Td>
                    <Changes changes={row.changes} />
                  </Table.Td>
                </Table.Tr>
              ))}
            </Table.Tbody>
          </Table>
        </Table.ScrollContainer>
      )}
      {!page.isLast && last && (
        <Button variant="default" w="fit-content" onClick={() => choose("before", last.id)}>
          Older
        </Button>
      )}
    </Stack>
  );
}

const AT_ONCE = 3;

function Changes({ changes }: { changes: Operations["activity.list"]["output"]["rows"][number]["changes"] }) {
  const [isOpen, setOpen] = useState(false);
  const shown = isOpen ? changes : changes.slice(0, AT_ONCE);
  return (
    <>
      {shown.map(({ path, before, after }) => (
        <div key={path} style={{ overflowWrap: "anywhere" }}>
          <Text span size="xs" c="dimmed">
            {path}
          </Text>{" "}
          {short(before)} → {short(after)}
        </div>
      ))}
      {changes.length > AT_ONCE && (
        <Button size="compact-xs" variant="subtle" onClick={() => setOpen(!isOpen)}>
          {isOpen ? "Fewer" : `${changes.length - AT_ONCE} more`}
        </Button>
      )}
    </>
  );
}

const LONGEST = 120;

function short(value: unknown): string {
  if (value === null || value === undefined) return "—";
  const text = typeof value === "string" ? value : JSON.stringify(value);
  return text.length > LONGEST ? `${text.slice(0, LONGEST)}…` : text;
}
