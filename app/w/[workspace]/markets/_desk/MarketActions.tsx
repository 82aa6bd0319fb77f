"use client";

import { Button, Group, Text } from "@mantine/core";
import Link from "next/link";
import { useRouter } from "next/navigation";
import { useState } from "react";
import { call } from "@/app/_ui/call";
import { Problems } from "@/app/_ui/Problems";
import type { Operations } from "@/lib/operations";
import type { Problem } from "@/lib/platform/errors";

/** What can be done with a market as a whole, and which deals use it. */
export function MarketActions({
  workspaceId,
  market,
}: {
  workspaceId: string;
  market: Operations["markets.open"]["output"];
}) {
  const router = useRouter();
  const [refused, setRefused] = useState<readonly Problem[]>([]);
  const here = { workspaceId, marketId: market.id };
  const copy = async () => {
    const { pricingDate } = market;
    const answer = await call("markets.copy", {
      ...here,
      name: `Copy of ${market.name}`.slice(0, 120),
      pricingDate,
    });
    if (answer.ok) router.push(`/w/${workspaceId}/markets/${answer.output.marketId}`);
    else setRefused(answer.problems);
  };
  const archive = async () => {
    const answer = await call("markets.archive", { ...here, archived: !market.isArchived });
    if (answer.ok) router.refresh();
    else setRefused(answer.problems);
  };
  return (
    <div>
      {market.may.edit && (
        <Group gap="xs">
          <Button variant="default" onClick={copy}>
            Copy
          </Button>
          <Button variant="default" onClick={archive}>
            {market.isArchived ? "Restore" : "Archive"}
          </Button>
        </Group>
      )}
      {market.deals.length > 0 && (
        <Text size="sm" c="dimmed">
          Used by{" "}
          {market.deals.map(({ id, name }, i) => (
            <span key={id}>
              {i > 0 && ", "}
              <Link href={`/w/${workspaceId}/deals/${id}`}>{name}</Link>
            </span>
          ))}
        </Text>
      )}
      <Problems title="That was not done" problems={refused} />
    </div>
  );
}
