"use client";

import { Button, Group, Progress, Text } from "@mantine/core";
import type { Pieces } from "@/app/_ui/usePieces";

/** How far work in pieces has come in this browser, and the way to stop it. */
export function PiecesProgress({
  pieces,
  total,
  what,
}: {
  pieces: Pick<Pieces<unknown>, "done" | "isBusy" | "isStopped" | "stop" | "goOn">;
  total: number;
  what: string;
}) {
  const { done, isBusy, isStopped, stop, goOn } = pieces;
  if (!isBusy && !isStopped) return null;
  const percent = total > 0 ? (100 * done) / total : 0;
  return (
    <Group gap="sm" my="xs" role="status" className="screenOnly">
      <Progress value={percent} w={180} aria-label={`Part of the ${what} worked out`} />
      <Text size="sm" c="dimmed">
        {isBusy ? `Working ${what} out in this browser, ` : `Stopped: `}
        {Math.round(percent)} % there
      </Text>
      <Button size="compact-xs" variant="default" onClick={isBusy ? stop : goOn}>
        {isBusy ? "Stop" : "Go on"}
      </Button>
    </Group>
  );
}
