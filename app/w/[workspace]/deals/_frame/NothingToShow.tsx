"use client";

import { Button, Stack, Text } from "@mantine/core";
import Link from "next/link";
import { Problems } from "@/app/_ui/Problems";
import { useDeal } from "./dealContext";
import { roomAddress } from "./rooms";

/** What a room shows while the deal has nothing to price: it is being fetched, does not read, or has no class. */
export function NothingToShow({ what, needsClass }: { what: string; needsClass: boolean }) {
  const { workspaceId, deal, problems, parts, reading } = useDeal();
  if (!needsClass && reading.ok && !parts) return <Text c="dimmed">Fetching pool and market…</Text>;
  return (
    <Stack gap="sm" align="start">
      {needsClass ? (
        <Text c="dimmed">{what} is shown once the deal has a class.</Text>
      ) : (
        <Problems title="The deal does not read yet" problems={problems} />
      )}
      {deal && (
        <Button size="compact-sm" variant="default" component={Link} href={roomAddress(workspaceId, deal.id)}>
          To the structure
        </Button>
      )}
    </Stack>
  );
}
