"use client";

import { Anchor, Button, Group, Text } from "@mantine/core";
import { useRouter } from "next/navigation";
import { useState } from "react";
import { call } from "@/app/_ui/call";
import { Composer } from "./Composer";
import { Formatted } from "./Formatted";
import type { CommentShown, MemberName } from "./shown";
import styles from "./talk.module.css";

/** One comment; its address can be handed on, its author may change it or take it back. */
export function Comment({
  workspaceId,
  dealId,
  comment,
  members,
  isLinked,
}: {
  workspaceId: string;
  dealId: string;
  comment: CommentShown;
  members: readonly MemberName[];
  /** Whether the page's address leads to this comment. */
  isLinked: boolean;
}) {
  const router = useRouter();
  const [isEditing, setEditing] = useState(false);
  const place = `comment-${comment.id}`;
  if (comment.isDeleted)
    return (
      <Text c="dimmed" size="sm" id={place}>
        {comment.author} deleted a comment.
      </Text>
    );
  const remove = async () => {
    await call("discussion.delete", { workspaceId, commentId: comment.id });
    router.refresh();
  };
  return (
    <div id={place} className={styles.comment} data-linked={isLinked || undefined}>
      <Group gap="xs">
        <Text fw={600} size="sm">
          {comment.author}
        </Text>
        <Anchor
          size="xs"
          href={`/w/${workspaceId}/deals/${dealId}/talk?threads=all#${place}`}
          title="Address of this comment"
        >
          {comment.at.slice(0, 16).replace("T", " ")} UTC
        </Anchor>
        {comment.isEdited && (
          <Text c="dimmed" size="xs">
            edited
          </Text>
        )}
        {comment.may.change && (
          <>
            <Button size="compact-xs" variant="subtle" onClick={() => setEditing(!isEditing)}>
              {isEditing ? "Leave as it is" : "Edit"}
            </Button>
            <Button size="compact-xs" variant="subtle" color="red" onClick={remove}>
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
          members={members}
          send={async (body, mentions) => {
            const { id: commentId, version } = comment;
            const input = { workspaceId, commentId, version, body, mentions };
            const answer = await call("discussion.edit", input);
            if (answer.ok) setEditing(false);
            return answer;
          }}
        />
      ) : (
        <Formatted body={comment.body} members={members} />
      )}
    </div>
  );
}
