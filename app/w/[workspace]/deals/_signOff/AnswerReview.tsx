"use client";

import { Button, Checkbox, Group, Stack, Textarea } from "@mantine/core";
import { useRouter } from "next/navigation";
import { useState } from "react";
import { call } from "@/app/_ui/call";
import { Problems } from "@/app/_ui/Problems";
import { useKept } from "@/app/_ui/useKept";
import type { Problem } from "@/lib/platform/errors";

/** A reviewer's answer: the checklist, and sign off or send back with a reason. */
export function AnswerReview({
  workspaceId,
  review,
}: {
  workspaceId: string;
  review: { id: string; run: number; checklist: readonly string[] };
}) {
  const router = useRouter();
  const [checks, setChecks] = useState<readonly boolean[]>(review.checklist.map(() => false));
  const [reason, setReason] = useKept<string>(`review answer ${review.id}`);
  const [problems, setProblems] = useState<readonly Problem[]>([]);
  const [isBusy, setBusy] = useState(false);
  const send = async (answer: "signed" | "sentBack") => {
    setBusy(true);
    const input = { workspaceId, reviewId: review.id, answer, reason: reason ?? "", checks: [...checks] };
    const told = await call("reviews.answer", input);
    setBusy(false);
    setProblems(told.ok ? [] : told.problems);
    if (told.ok) setReason(null);
    router.refresh();
  };
  return (
    <Stack gap="xs" mt="sm">
      {review.checklist.map((line, i) => (
        <Checkbox
          key={line}
          size="sm"
          label={line}
          checked={checks[i] ?? false}
          onChange={(event) => {
            const isChecked = event.currentTarget.checked;
            setChecks(checks.map((was, k) => (k === i ? isChecked : was)));
          }}
        />
      ))}
      <Textarea
        size="xs"
        label="Reason or remark"
        autosize
        minRows={2}
        maxLength={2_000}
        value={reason ?? ""}
        error={problems.find(({ path }) => path === "reason")?.message}
        onChange={(event) => setReason(event.currentTarget.value || null)}
      />
      <Problems
        title="Your answer was not taken"
        problems={problems.filter(({ path }) => path !== "reason")}
      />
      <Group>
        <Button
          size="compact-sm"
          loading={isBusy}
          disabled={checks.includes(false)}
          onClick={() => send("signed")}
        >
          Sign off run {review.run}
        </Button>
        <Button size="compact-sm" variant="default" loading={isBusy} onClick={() => send("sentBack")}>
          Send back
        </Button>
      </Group>
    </Stack>
  );
}
