"use client";

import { Badge, Group, Stack, Text, Title } from "@mantine/core";
import { Problems } from "@/app/_ui/Problems";
import type { Standing } from "@/lib/reviews/standing";
import { Behind } from "./Behind";
import { DealActions } from "./DealActions";
import { useDeal } from "./dealContext";
import styles from "./frame.module.css";
import { OthersHere } from "./OthersHere";
import { RoomTabs } from "./RoomTabs";

const standingWords: Record<Exclude<Standing, "none">, string> = {
  signed: "Signed off",
  changed: "Changed since sign-off",
  underReview: "Under review",
};

/** The head of the desk: which deal, what of it is not saved, what can be done with it, and the rooms. */
export function DealHeader({ standing = "none" }: { standing?: Standing }) {
  const { workspaceId, deal, isDirty, isBehind, refused, tried, mayEdit } = useDeal();
  return (
    <>
      <div className={styles.head}>
        <Group justify="space-between" align="start" gap="xs">
          <div>
            <Title order={1} size="h3">
              {deal ? deal.name : "New deal"} {deal?.isArchived && <Badge variant="default">Archived</Badge>}{" "}
              {standing !== "none" && (
                <Badge
                  variant={standing === "signed" ? "filled" : "outline"}
                  color={standing === "changed" ? "orange" : "teal"}
                >
                  {standingWords[standing]}
                </Badge>
              )}
            </Title>
            <Text size="sm" c="dimmed" aria-live="polite">
              {deal &&
                `${deal.pool.names} names of ${deal.pool.name}, ${deal.market.name} (${deal.market.pricingDate}). `}
              {isDirty
                ? "Not saved yet; kept in this browser until it is."
                : deal
                  ? `Version ${deal.version} is saved.`
                  : ""}
              {tried && " Figures are of names tried in the pool, not of the saved ones."}
              {deal && !mayEdit && " You can read this deal, not change it."}
            </Text>
          </div>
          <DealActions />
        </Group>
        <OthersHere dealId={deal?.id} />
        {deal && <RoomTabs workspaceId={workspaceId} dealId={deal.id} />}
      </div>
      {(isBehind || refused.length > 0) && (
        <Stack gap="xs" mt="sm">
          {isBehind && <Behind />}
          <Problems title="The deal was not saved" problems={refused} />
        </Stack>
      )}
    </>
  );
}
