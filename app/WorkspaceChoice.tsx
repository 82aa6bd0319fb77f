"use client";

import { Button, Container, List, Stack, Text, TextInput, Title } from "@mantine/core";
import Link from "next/link";
import { useRouter } from "next/navigation";
import { type FormEvent, useState } from "react";
import type { Operations } from "@/lib/operations";
import type { Problem } from "@/lib/platform/errors";
import { call } from "./_ui/call";
import { Problems } from "./_ui/Problems";

type Workspace = Operations["workspaces.mine"]["output"]["workspaces"][number];

/** The workspaces a person is in, and a new one. */
export function WorkspaceChoice({ workspaces }: { workspaces: readonly Workspace[] }) {
  const router = useRouter();
  const [name, setName] = useState("");
  const [problems, setProblems] = useState<readonly Problem[]>([]);
  const create = async (event: FormEvent) => {
    event.preventDefault();
    const answer = await call("workspaces.create", { name });
    if (answer.ok) router.push(`/w/${answer.output.workspaceId}`);
    else setProblems(answer.problems);
  };
  return (
    <Container size="sm" py="xl" component="main">
      <Stack>
        <Title order={1}>Workspaces</Title>
        {workspaces.length === 0 ? (
          <Text>You are in no workspace yet: make one, or open the invitation link that you were sent.</Text>
        ) : (
          <List>
            {workspaces.map((workspace) => (
              <List.Item key={workspace.id}>
                <Link href={`/w/${workspace.id}`}>{workspace.name}</Link> as {workspace.role}
              </List.Item>
            ))}
          </List>
        )}
        <form onSubmit={create}>
          <Stack>
            <TextInput
              label="Name of a new workspace"
              required
              maxLength={80}
              value={name}
              onChange={(event) => setName(event.currentTarget.value)}
            />
            <Button type="submit">Make the workspace</Button>
            <Problems problems={problems} title="The workspace was not made" />
          </Stack>
        </form>
      </Stack>
    </Container>
  );
}
