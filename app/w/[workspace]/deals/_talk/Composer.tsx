"use client";

import { Button, Group, Stack, Text, Textarea } from "@mantine/core";
import { useRouter } from "next/navigation";
import { type KeyboardEvent, useRef, useState } from "react";
import type { Answer } from "@/app/_ui/call";
import { Problems } from "@/app/_ui/Problems";
import { useKept } from "@/app/_ui/useKept";
import type { Problem } from "@/lib/platform/errors";
import { mentionsIn } from "./mentions";
import type { MemberName } from "./shown";
import styles from "./talk.module.css";

const LONGEST = 4_000;

/** Where a comment is written: kept on reload, people named by @ and chosen by keyboard, sent by Ctrl Enter. */
export function Composer({
  draft,
  initial = "",
  label,
  act,
  members,
  send,
}: {
  draft: string;
  initial?: string;
  label: string;
  act: string;
  members: readonly MemberName[];
  send(body: string, mentions: string[]): Promise<Answer<unknown>>;
}) {
  const router = useRouter();
  const field = useRef<HTMLTextAreaElement>(null);
  const [kept, setKept] = useKept<string>(draft);
  const [problems, setProblems] = useState<readonly Problem[]>([]);
  const [isBusy, setBusy] = useState(false);
  const [caret, setCaret] = useState(0);
  const [chosen, setChosen] = useState(0);
  const body = kept ?? initial;
  const [, typedName] = /(?:^|\s)@([\p{L}\p{N} .'-]{0,40})$/u.exec(body.slice(0, caret)) ?? [];
  const found =
    typedName === undefined
      ? []
      : members.filter(
          ({ name }) =>
            name.toLowerCase().startsWith(typedName.toLowerCase()) &&
            name.toLowerCase() !== typedName.toLowerCase(),
        );
  const submit = async () => {
    setBusy(true);
    const answer = await send(body, mentionsIn(body, members));
    setBusy(false);
    setProblems(answer.ok ? [] : answer.problems);
    if (answer.ok) {
      setKept(null);
      router.refresh();
    }
  };
  const choose = (member: MemberName) => {
    const from = caret - (typedName?.length ?? 0);
    const next = `${body.slice(0, from)}${member.name} ${body.slice(caret)}`;
    setKept(next);
    setCaret(from + member.name.length + 1);
    field.current?.focus();
  };
  const key = (event: KeyboardEvent) => {
    if (event.key === "Enter" && (event.ctrlKey || event.metaKey) && body.trim() !== "") {
      event.preventDefault();
      void submit();
    }
    const member = found[Math.min(chosen, found.length - 1)];
    if (!member) return;
    if (event.key === "ArrowDown" || event.key === "ArrowUp") {
      event.preventDefault();
      setChosen((chosen + (event.key === "ArrowDown" ? 1 : found.length - 1)) % found.length);
    } else if (event.key === "Enter" || event.key === "Tab") {
      event.preventDefault();
      choose(member);
    } else if (event.key === "Escape") setCaret(0);
  };
  return (
    <Stack gap={4}>
      <Textarea
        ref={field}
        aria-label={label}
        placeholder={`${label}; @ names someone, **bold**, \`code\`, - list`}
        autosize
        minRows={1}
        maxLength={LONGEST}
        value={body}
        onChange={(event) => {
          setKept(event.currentTarget.value);
          setCaret(event.currentTarget.selectionStart);
          setChosen(0);
        }}
        onKeyDown={key}
      />
      {found.length > 0 && (
        <div className={styles.choices} role="listbox" aria-label="People to name">
          {found.slice(0, 8).map((member, i) => (
            <button
              key={member.userId}
              type="button"
              role="option"
              aria-selected={i === Math.min(chosen, found.length - 1)}
              onClick={() => choose(member)}
            >
              {member.name}
            </button>
          ))}
        </div>
      )}
      <Group gap="xs">
        <Button size="compact-sm" onClick={submit} loading={isBusy} disabled={body.trim() === ""}>
          {act}
        </Button>
        {body.length > LONGEST * 0.9 && (
          <Text size="xs" c="dimmed">
            {LONGEST - body.length} characters left
          </Text>
        )}
      </Group>
      <Problems title="This was not sent" problems={problems} />
    </Stack>
  );
}
