"use client";

import { Badge, Button, Group, Paper, Stack } from "@mantine/core";
import { useRouter } from "next/navigation";
import { call } from "@/app/_ui/call";
import { Comment } from "./Comment";
import { Composer } from "./Composer";
import { PinThenNow } from "./PinThenNow";
import { pinWords } from "./pinWords";
import type { MemberName, ThreadShown } from "./shown";

/** One thread: what it is pinned to, its comments, an answer. */
export function Thread({
  workspaceId,
  dealId,
  thread,
  members,
  mayComment,
  linked,
}: {
  workspaceId: string;
  dealId: string;
  thread: ThreadShown;
  members: readonly MemberName[];
  mayComment: boolean;
  /** The comment that the page's address leads to. */
  linked: string | null;
}) {
  const router = useRouter();
  const resolve = async () => {
    await call("discussion.resolve", { workspaceId, threadId: thread.id, resolved: !thread.isResolved });
    router.refresh();
  };
  return (
    <Paper
      withBorder
      p="sm"
      component="article"
      aria-label={`Thread on ${pinWords(thread.pin)}`}
      id={`thread-${thread.id}`}
    >
      <Stack gap="xs">
        <Group gap="xs">
          <PinThenNow pin={thread.pin} />
          {thread.isUnread && (
            <Badge size="xs" color="indigo">
              New
            </Badge>
          )}
          {thread.isResolved && (
            <Badge size="xs" variant="default">
              Resolved
            </Badge>
          )}
        </Group>
        {thread.comments.map((comment) => (
          <Comment
            key={comment.id}
            workspaceId={workspaceId}
            dealId={dealId}
            comment={comment}
            members={members}
            isLinked={comment.id === linked}
          />
        ))}
        {mayComment && (
          <>
            <Composer
              draft={`reply ${thread.id}`}
              label="Reply"
              act="Reply"
              members={members}
              send={(body, mentions) =>
                call("discussion.reply", { workspaceId, threadId: thread.id, body, mentions })
              }
            />
            <Button size="compact-xs" variant="default" w="fit-content" onClick={resolve}>
              {thread.isResolved ? "Reopen" : "Resolve"}
            </Button>
          </>
        )}
      </Stack>
    </Paper>
  );
}
