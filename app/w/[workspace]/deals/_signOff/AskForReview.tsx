"use client";

import { Button, Fieldset, Group, MultiSelect, NativeSelect, Stack, Text, Textarea } from "@mantine/core";
import { useRouter } from "next/navigation";
import { useState } from "react";
import { call } from "@/app/_ui/call";
import { Problems } from "@/app/_ui/Problems";
import { useKept } from "@/app/_ui/useKept";
import type { Problem } from "@/lib/platform/errors";
import type { ReviewSettings } from "@/lib/reviews/schema";

/** Puts a run before named people; what is typed is kept in this browser until it is sent. */
export function AskForReview({
  workspaceId,
  settings,
  candidates,
  runs,
}: {
  workspaceId: string;
  settings: ReviewSettings;
  candidates: readonly { userId: string; name: string; role: string }[];
  runs: readonly { id: string; number: number; isCurrent: boolean }[];
}) {
  const router = useRouter();
  const [runId, setRun] = useState(runs.find(({ isCurrent }) => isCurrent)?.id ?? runs[0]?.id ?? "");
  const [reviewers, setReviewers] = useState<string[]>([]);
  const [note, setNote] = useKept<string>(`review note ${runId}`);
  const [problems, setProblems] = useState<readonly Problem[]>([]);
  const [isBusy, setBusy] = useState(false);
  const chosen = runs.find(({ id }) => id === runId);
  if (runs.length === 0)
    return <Text c="dimmed">A review is asked for a run: price the deal first, then ask here.</Text>;
  const send = async () => {
    setBusy(true);
    const answer = await call("reviews.ask", { workspaceId, runId, reviewers, note: note ?? "" });
    setBusy(false);
    setProblems(answer.ok ? [] : answer.problems);
    if (!answer.ok) return;
    setNote(null);
    setReviewers([]);
    router.refresh();
  };
  return (
    <Fieldset legend="Ask for a review">
      <Stack gap="xs">
        <Group align="start" grow>
          <NativeSelect
            size="xs"
            label="Run"
            value={runId}
            data={runs.map(({ id, number, isCurrent }) => ({
              value: id,
              label: `Run ${number}${isCurrent ? ", stands" : ", changed since"}`,
            }))}
            onChange={(event) => setRun(event.currentTarget.value)}
          />
          <MultiSelect
            size="xs"
            label={`Reviewers (${settings.needed} must sign)`}
            placeholder={reviewers.length === 0 ? "Choose people" : ""}
            data={candidates.map(({ userId, name, role }) => ({ value: userId, label: `${name}, ${role}` }))}
            value={reviewers}
            onChange={setReviewers}
            error={problems.find(({ path }) => path === "reviewers")?.message}
          />
        </Group>
        <Textarea
          size="xs"
          label="What to check"
          autosize
          minRows={2}
          maxLength={2_000}
          value={note ?? ""}
          onChange={(event) => setNote(event.currentTarget.value || null)}
        />
        {chosen && !chosen.isCurrent && (
          <Text size="sm" c="var(--remark-color)">
            The deal has changed since run {chosen.number}: a sign-off of it would not hold for the deal as it
            is.
          </Text>
        )}
        {candidates.length === 0 && (
          <Text size="sm" c="dimmed">
            Nobody else here may sign off: invite an analyst or a structurer under People.
          </Text>
        )}
        <Problems
          title="The review was not asked for"
          problems={problems.filter(({ path }) => path !== "reviewers")}
        />
        <Group>
          <Button size="compact-sm" onClick={send} loading={isBusy} disabled={reviewers.length === 0}>
            Ask for the review
          </Button>
        </Group>
      </Stack>
    </Fieldset>
  );
}
