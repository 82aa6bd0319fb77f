"use client";

import { Group, SegmentedControl, Stack, Text, TextInput, Title } from "@mantine/core";
import { useEffect, useMemo } from "react";
import { call } from "@/app/_ui/call";
import { useAddress } from "@/app/_ui/useAddress";
import { Composer } from "./Composer";
import { FollowChoice } from "./FollowChoice";
import { pinWords } from "./pinWords";
import type { TalkShown, ThreadShown } from "./shown";
import { Thread } from "./Thread";
import { useLinkedComment } from "./useLinkedComment";

type Choice = "open" | "resolved" | "mine" | "unread" | "all";

const choices: readonly { value: Choice; label: string }[] = [
  { value: "open", label: "Open" },
  { value: "unread", label: "Unread" },
  { value: "mine", label: "Mine" },
  { value: "resolved", label: "Resolved" },
  { value: "all", label: "All" },
];

/** The deal's threads: chosen, searched, answered. What is on screen counts as read a moment later. */
export function Talk({
  workspaceId,
  dealId,
  talk,
  follow,
}: {
  workspaceId: string;
  dealId: string;
  talk: TalkShown;
  follow: "following" | "muted" | "neither";
}) {
  const [choice, setChoice] = useAddress("threads", "open");
  const [sought, setSought] = useAddress("find", "");
  const shown = useMemo(
    () => talk.threads.filter((thread) => isChosen(thread, choice as Choice) && hasWords(thread, sought)),
    [talk.threads, choice, sought],
  );
  const linked = useLinkedComment();
  const unread = shown.filter((thread) => thread.isUnread).map(({ id }) => id);
  const unreadKey = unread.join(" ");
  useEffect(() => {
    if (unreadKey === "") return;
    const timer = setTimeout(() => {
      void call("discussion.seen", { workspaceId, dealId, threadIds: unreadKey.split(" ") });
    }, 2_500);
    return () => clearTimeout(timer);
  }, [workspaceId, dealId, unreadKey]);
  return (
    <Stack gap="sm" maw={980}>
      <Group justify="space-between">
        <Title order={2} size="h4">
          Talk
        </Title>
        <FollowChoice workspaceId={workspaceId} dealId={dealId} state={follow} />
      </Group>
      {talk.may.comment ? (
        <Composer
          draft={`talk ${dealId}`}
          label="New thread"
          act="Post"
          members={talk.members}
          send={(body, mentions) =>
            call("discussion.start", { workspaceId, dealId, body, mentions, anchor: { kind: "deal" } })
          }
        />
      ) : (
        <Text c="dimmed">You can read here; an analyst or structurer can write.</Text>
      )}
      <Group align="end">
        <SegmentedControl
          size="xs"
          data={[...choices]}
          value={choice}
          onChange={setChoice}
          aria-label="Which threads"
        />
        <TextInput
          size="xs"
          label="Find"
          value={sought}
          onChange={(event) => setSought(event.currentTarget.value)}
        />
      </Group>
      {shown.length === 0 && (
        <Text c="dimmed">
          {talk.threads.length === 0 ? "Nobody has said anything yet." : "No thread is like that."}
        </Text>
      )}
      {shown.map((thread) => (
        <Thread
          key={thread.id}
          workspaceId={workspaceId}
          dealId={dealId}
          thread={thread}
          members={talk.members}
          mayComment={talk.may.comment}
          linked={linked}
        />
      ))}
    </Stack>
  );
}

function isChosen(thread: ThreadShown, choice: Choice): boolean {
  if (choice === "all") return true;
  if (choice === "unread") return thread.isUnread;
  if (choice === "mine") return thread.isMine;
  return thread.isResolved === (choice === "resolved");
}

function hasWords({ comments, pin }: ThreadShown, sought: string): boolean {
  const words = sought.trim().toLowerCase();
  if (words === "") return true;
  const text = [pinWords(pin), ...comments.flatMap(({ author, body }) => [author, body])].join("\n");
  return text.toLowerCase().includes(words);
}
