"use client";

import { Button, Group, NativeSelect, SegmentedControl, Stack, Table, Text, Title } from "@mantine/core";
import Link from "next/link";
import { useRouter } from "next/navigation";
import { call } from "@/app/_ui/call";
import { useAddress } from "@/app/_ui/useAddress";
import { noticePlace, noticeWords } from "@/lib/notices/words";
import type { Operations } from "@/lib/operations";

type InboxShown = Operations["notices.list"]["output"];

/** A person's own inbox: what named them, answered them, asked them, or changed what they follow. */
export function Inbox({ workspaceId, inbox }: { workspaceId: string; inbox: InboxShown }) {
  const router = useRouter();
  const [choice, setChoice] = useAddress("show", "unread");
  const shown = inbox.notices.filter((notice) => choice === "all" || !notice.isRead);
  const mark = async (which: "all" | string[], isRead: boolean) => {
    await call("notices.read", { workspaceId, which, isRead });
    router.refresh();
  };
  return (
    <Stack maw={980}>
      <Group justify="space-between">
        <Title order={1}>Inbox</Title>
        {inbox.isMailPossible && (
          <NativeSelect
            size="xs"
            aria-label="Mail"
            value={inbox.mail}
            data={[
              { value: "off", label: "No mail" },
              { value: "digest", label: "Mail once an hour" },
              { value: "atOnce", label: "Mail at once" },
            ]}
            onChange={async (event) => {
              await call("notices.setMail", {
                workspaceId,
                mail: event.currentTarget.value as InboxShown["mail"],
              });
              router.refresh();
            }}
          />
        )}
      </Group>
      <Group>
        <SegmentedControl
          size="xs"
          aria-label="Which lines"
          value={choice}
          onChange={setChoice}
          data={[
            { value: "unread", label: "Unread" },
            { value: "all", label: "All" },
          ]}
        />
        <Button
          size="compact-sm"
          variant="default"
          onClick={() => mark("all", true)}
          disabled={!inbox.notices.some(({ isRead }) => !isRead)}
        >
          Mark all as read
        </Button>
      </Group>
      {shown.length === 0 ? (
        <Text c="dimmed">{inbox.notices.length === 0 ? "Nothing has come in yet." : "Nothing unread."}</Text>
      ) : (
        <Table.ScrollContainer minWidth={560}>
          <Table fz="sm" verticalSpacing={4}>
            <Table.Tbody>
              {shown.map((notice) => (
                <Table.Tr key={notice.id} fw={notice.isRead ? 400 : 600}>
                  <Table.Td>{notice.at.slice(0, 16).replace("T", " ")}</Table.Td>
                  <Table.Td>
                    {notice.dealId ? (
                      <Link
                        href={noticePlace(workspaceId, notice.dealId, notice)}
                        onClick={() => void mark([notice.id], true)}
                      >
                        {noticeWords(notice)}
                      </Link>
                    ) : (
                      noticeWords(notice)
                    )}
                    {notice.payload.words && (
                      <Text size="xs" c="dimmed" lineClamp={2}>
                        {notice.payload.words}
                      </Text>
                    )}
                  </Table.Td>
                  <Table.Td>
                    <Button
                      size="compact-xs"
                      variant="subtle"
                      onClick={() => mark([notice.id], !notice.isRead)}
                    >
                      {notice.isRead ? "Mark as unread" : "Mark as read"}
                    </Button>
                  </Table.Td>
                </Table.Tr>
              ))}
            </Table.Tbody>
          </Table>
        </Table.ScrollContainer>
      )}
    </Stack>
  );
}
