"use client";

import { Button, Stack } from "@mantine/core";
import { useRouter } from "next/navigation";
import { useState } from "react";
import { call } from "@/app/_ui/call";
import { Problems } from "@/app/_ui/Problems";
import type { Problem } from "@/lib/platform/errors";

/** Accepts an invitation. */
export function JoinButton({ token }: { token: string }) {
  const router = useRouter();
  const [problems, setProblems] = useState<readonly Problem[]>([]);
  const join = async () => {
    const answer = await call("workspaces.join", { token });
    if (answer.ok) router.push(`/w/${answer.output.workspaceId}`);
    else setProblems(answer.problems);
  };
  return (
    <Stack>
      <Button onClick={join}>Join</Button>
      <Problems problems={problems} title="You have not joined" />
    </Stack>
  );
}
