"use client";

import { Alert, Button, Group, Progress, Text } from "@mantine/core";
import { shockWords } from "@/lib/scenarios/form";
import type { OpenJob } from "./useJobs";

const words: Record<OpenJob["state"], string> = {
  queued: "Waiting its turn",
  running: "Being worked out on the server",
  done: "Worked out",
  failed: "Given up",
  cancelled: "Called off",
};

/** Where a grid's work stands: how far, since when and by whom, and the way to call it off. */
export function JobStatus({ job, onCancel }: { job: OpenJob; onCancel(): void }) {
  const { state, done, total, by, at, grid, problem, mayCancel } = job;
  const isOn = state === "queued" || state === "running";
  return (
    <>
      <Group gap="sm" role="status">
        {isOn && <Progress value={(100 * done) / total} w={180} aria-label="Part of the grid worked out" />}
        <Text size="sm" c="dimmed">
          {words[state]}: {done} of {total} cells. Asked for by {by}, {at.slice(0, 16).replace("T", " ")} UTC;
          common shock: {shockWords(grid.shock)}.{isOn && " It goes on when this page is closed."}
        </Text>
        {mayCancel && (
          <Button size="compact-xs" variant="default" onClick={onCancel}>
            Call it off
          </Button>
        )}
      </Group>
      {problem && (
        <Alert color="red" role="alert">
          {problem}
        </Alert>
      )}
    </>
  );
}
