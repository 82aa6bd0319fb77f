"use client";

import { Text } from "@mantine/core";
import { useOthersAt } from "../../_live/liveContext";

const MOST_NAMED = 4;

/** Who else looks at the deal now. */
export function OthersHere({ dealId }: { dealId: string | undefined }) {
  const names = useOthersAt(dealId).map(({ name }) => name);
  if (names.length === 0) return null;
  const named = names.slice(0, MOST_NAMED).join(", ");
  const more = names.length - MOST_NAMED;
  return (
    <Text size="xs" c="dimmed" title={names.join(", ")} className="screenOnly">
      Also looking: {named}
      {more > 0 && ` and ${more} more`}
    </Text>
  );
}
