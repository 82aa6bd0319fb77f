"use client";

import { NativeSelect } from "@mantine/core";
import { useRouter } from "next/navigation";
import { call } from "@/app/_ui/call";

type FollowState = "following" | "muted" | "neither";

const words: readonly { value: FollowState; label: string }[] = [
  { value: "neither", label: "Told of what concerns me" },
  { value: "following", label: "Following: told of every change" },
  { value: "muted", label: "Muted: told of nothing here" },
];

/** Whether this person's inbox hears of the deal. */
export function FollowChoice({
  workspaceId,
  dealId,
  state,
}: {
  workspaceId: string;
  dealId: string;
  state: FollowState;
}) {
  const router = useRouter();
  return (
    <NativeSelect
      size="xs"
      aria-label="What my inbox hears of this deal"
      data={[...words]}
      value={state}
      onChange={async (event) => {
        await call("notices.follow", {
          workspaceId,
          dealId,
          state: event.currentTarget.value as FollowState,
        });
        router.refresh();
      }}
    />
  );
}
