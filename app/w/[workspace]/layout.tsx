import { Container, Text } from "@mantine/core";
import type { ReactNode } from "react";
import { ask } from "@/app/_ui/ask";
import { queries as notices } from "@/lib/notices/queries";
import { queries } from "@/lib/workspaces/queries";
import { Live } from "./_live/Live";
import { WorkspaceBar } from "./WorkspaceBar";

/** The frame of every screen of a workspace. */
export default async function WorkspaceLayout({
  children,
  params,
}: {
  children: ReactNode;
  params: Promise<{ workspace: string }>;
}) {
  const { workspace } = await params;
  const { name, role, actor, since } = await ask(queries.open, { workspaceId: workspace });
  const { unread } = await ask(notices.count, { workspaceId: workspace });
  return (
    <>
      <WorkspaceBar workspaceId={workspace} name={name} role={role} person={actor.name} unread={unread} />
      <Container fluid maw={1760} py="md" component="main">
        <Live workspaceId={workspace} userId={actor.userId} since={since}>
          {children}
        </Live>
        <Text component="footer" size="xs" c="dimmed" mt="xl">
          Figures come from a model whose copula has no dynamics and which the market has broken before. They
          are an aid to judgement, not advice or a price anyone must honour; use is subject to the firm's own
          model validation, to local regulation, and to licensed practice.
        </Text>
      </Container>
    </>
  );
}
