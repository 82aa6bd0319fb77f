"use client";

import { Anchor, Badge, Button, Group, Paper, Stack, Text, Textarea, Title } from "@mantine/core";
import { useRouter } from "next/navigation";
import { type ReactNode, useState } from "react";
import { type Answer, call } from "@/app/_ui/call";
import { Problems } from "@/app/_ui/Problems";
import { useKept } from "@/app/_ui/useKept";
import type { Operations } from "@/lib/operations";
import type { Problem } from "@/lib/platform/errors";

type TalkShown = Operations["discussion.list"]["output"];
type ThreadShown = TalkShown["threads"][number];
type CommentShown = ThreadShown["comments"][number];

/** The deal's threads; drafts are kept on reload. */
export function Talk({
  workspaceId,
  dealId,
  talk,
}: {
  workspaceId: string;
  dealId: string;
  talk: TalkShown;
}) {
  return (
    <Stack gap="sm">
      <Title order={2} size="h4">
        Talk
      </Title>
      {talk.may.comment && (
        <Composer
          draft={`talk ${dealId}`}
          label="New thread"
          act="Post"
          send={(body) => call("discussion.start", { workspaceId, dealId, body })}
        />
      )}
      {talk.threads.length === 0 && <Text c="dimmed">Nobody has said anything yet.</Text>}
      {talk.threads.map((thread) => (
        <Thread key={thread.id} workspaceId={workspaceId} thread={thread} mayComment={talk.may.comment} />
      ))}
    </Stack>
  );
}

function Thread({
  workspaceId,
  thread,
  mayComment,
}: {
  workspaceId: string;
  thread: ThreadShown;
  mayComment: boolean;
}) {
  const router = useRouter();
  return (
    <Paper withBorder p="sm">
      <Stack gap="xs">
        {thread.isResolved && (
          <Badge variant="default" w="fit-content">
            Resolved
          </Badge>
        )}
        {thread.comments.map((comment) => (
          <Comment key={comment.id} workspaceId={workspaceId} comment={comment} />
        ))}
        {mayComment && (
          <>
            <Composer
              draft={`reply ${thread.id}`}
              label="Reply"
              act="Reply"
              send={(body) => call("discussion.reply", { workspaceId, threadId: thread.id, body })}
            />
            <Button
              size="compact-xs"
              variant="default"
              w="fit-content"
              onClick={async () => {
                await call("discussion.resolve", {
                  workspaceId,
                  threadId: thread.id,
                  resolved: !thread.isResolved,
                });
                router.refresh();
              }}
            >
              {thread.isResolved ? "Reopen" : "Resolve"}
            </Button>
          </>
        )}
      </Stack>
    </Paper>
  );
}

function Comment({ workspaceId, comment }: { workspaceId: string; comment: CommentShown }) {
  const router = useRouter();
  const [isEditing, setEditing] = useState(false);
  if (comment.isDeleted) return <Text c="dimmed">{comment.author} deleted a comment.</Text>;
  return (
    <div>
      <Group gap="xs">
        <Text fw={600} size="sm">
          {comment.author}
        </Text>
        <Text c="dimmed" size="xs">
          {comment.at.slice(0, 16).replace("T", " ")}
          {comment.isEdited ? ", edited" : ""}
        </Text>
        {comment.may.change && (
          <>
            <Button size="compact-xs" variant="subtle" onClick={() => setEditing(!isEditing)}>
              {isEditing ? "Leave as it is" : "Edit"}
            </Button>
            <Button
              size="compact-xs"
              variant="subtle"
              color="red"
              onClick={async () => {
                await call("discussion.delete", { workspaceId, commentId: comment.id });
                router.refresh();
              }}
            >
              Delete
            </Button>
          </>
        )}
      </Group>
      {isEditing ? (
        <Composer
          draft={`edit ${comment.id} ${comment.version}`}
          initial={comment.body}
          label="Edit the comment"
          act="Save"
          send={async (body) => {
            const answer = await call("discussion.edit", {
              workspaceId,
              commentId: comment.id,
              version: comment.version,
              body,
            });
            if (answer.ok) setEditing(false);
            return answer;
          }}
        />
      ) : (
        <Text style={{ whiteSpace: "pre-wrap", overflowWrap: "anywhere" }}>{withLinks(comment.body)}</Text>
      )}
    </div>
  );
}

/** Plain text; only web addresses become links. */
function withLinks(body: string): ReactNode[] {
  return body.split(/(https?:\/\/[^\s<>"]+)/).map((part, i) =>
    i % 2 === 1 ? (
      // biome-ignore lint/suspicious/noArrayIndexKey: parts of one text never move
      <Anchor key={i} href={part} rel="noopener noreferrer nofollow" target="_blank">
        {part}
      </Anchor>
    ) : (
      part
    ),
  );
}

function Composer({
  draft,
  initial = "",
  label,
  act,
  send,
}: {
  draft: string;
  initial?: string;
  label: string;
  act: string;
  send(body: string): Promise<Answer<unknown>>;
}) {
  const router = useRouter();
  const [kept, setKept] = useKept<string>(draft);
  const [problems, setProblems] = useState<readonly Problem[]>([]);
  const [isBusy, setBusy] = useState(false);
  const body = kept ?? initial;
  const submit = async () => {
    setBusy(true);
    const answer = await send(body);
    setBusy(false);
    setProblems(answer.ok ? [] : answer.problems);
    if (answer.ok) {
      setKept(null);
      router.refresh();
    }
  };
  return (
    <Stack gap={4}>
      <Textarea
        aria-label={label}
        placeholder={label}
        autosize
        minRows={1}
        maxLength={4_000}
        value={body}
        onChange={(event) => setKept(event.currentTarget.value)}
      />
      <Group>
        <Button size="compact-sm" onClick={submit} loading={isBusy} disabled={body.trim() === ""}>
          {act}
        </Button>
      </Group>
      <Problems title="This was not sent" problems={problems} />
    </Stack>
  );
}
