"use client";

import { Alert, Button, Group, Text } from "@mantine/core";
import { useDeal } from "./dealContext";

/** Someone saved meanwhile: what is typed stands on an older version, and the person chooses. */
export function Behind() {
  const { deal, draft, form } = useDeal();
  if (!deal || !draft.kept) return null;
  return (
    <Alert color="yellow" title="Someone saved a newer version of this deal meanwhile">
      <Text size="sm">
        Your own text is still here, on version {draft.kept.version}; the saved one is version {deal.version}.
      </Text>
      <Group mt="xs">
        <Button size="compact-sm" onClick={() => draft.rebase(form, deal.version)}>
          Go on with mine over version {deal.version}
        </Button>
        <Button size="compact-sm" variant="default" onClick={draft.discard}>
          Take the saved one
        </Button>
      </Group>
    </Alert>
  );
}
