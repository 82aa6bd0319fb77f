"use client";

import { Button, Group, List, NativeSelect, Stack, Text, Textarea, Title } from "@mantine/core";
import { useRouter } from "next/navigation";
import { useState } from "react";
import { call } from "@/app/_ui/call";
import { Problems } from "@/app/_ui/Problems";
import { useKept } from "@/app/_ui/useKept";
import type { Problem } from "@/lib/platform/errors";
import type { ReviewSettings } from "@/lib/reviews/schema";

/** What a review needs in this workspace: its checklist and how many must sign. Owners change it. */
export function ReviewSettingsForm({
  workspaceId,
  settings,
  mayManage,
}: {
  workspaceId: string;
  settings: ReviewSettings;
  mayManage: boolean;
}) {
  const router = useRouter();
  const [kept, setKept] = useKept<{ lines: string; needed: string }>(`review settings ${workspaceId}`);
  const [problems, setProblems] = useState<readonly Problem[]>([]);
  const saved = { lines: settings.checklist.join("\n"), needed: String(settings.needed) };
  const typed = kept ?? saved;
  const save = async () => {
    const checklist = typed.lines.split("\n").filter((line) => line.trim() !== "");
    const input = { workspaceId, settings: { checklist, needed: Number(typed.needed) } };
    const answer = await call("reviews.saveSettings", input);
    setProblems(answer.ok ? [] : answer.problems);
    if (answer.ok) setKept(null);
    router.refresh();
  };
  return (
    <Stack gap="xs">
      <Title order={2} size="h4">
        What a review needs
      </Title>
      {mayManage ? (
        <>
          <Textarea
            label="Checklist, a line each"
            autosize
            minRows={3}
            maw={720}
            value={typed.lines}
            onChange={(event) => setKept({ ...typed, lines: event.currentTarget.value })}
          />
          <Group align="end">
            <NativeSelect
              label="How many must sign"
              data={["1", "2", "3", "4", "5"]}
              value={typed.needed}
              onChange={(event) => setKept({ ...typed, needed: event.currentTarget.value })}
            />
            <Button variant="default" onClick={save} disabled={kept === null}>
              Save
            </Button>
          </Group>
          <Text size="sm" c="dimmed">
            Reviews already asked for keep the list that they were asked with.
          </Text>
          <Problems title="The settings were not saved" problems={problems} />
        </>
      ) : (
        <>
          <List size="sm">
            {settings.checklist.map((line) => (
              <List.Item key={line}>{line}</List.Item>
            ))}
          </List>
          <Text size="sm">
            {settings.needed === 1 ? "One person must sign." : `${settings.needed} people must sign.`}
          </Text>
        </>
      )}
    </Stack>
  );
}
