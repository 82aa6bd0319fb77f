import { Container } from "@mantine/core";
import Link from "next/link";
import type { ReactNode } from "react";

/** The frame of every screen of a workspace. */
export default async function WorkspaceLayout({
  children,
  params,
}: {
  children: ReactNode;
  params: Promise<{ workspace: string }>;
}) {
  const { workspace } = await params;
  return (
    <Container size="xl" py="md" component="main">
      <nav aria-label="Workspace">
        <Link href={`/w/${workspace}/pools`}>Pools</Link>{" "}
        <Link href={`/w/${workspace}/markets`}>Markets</Link>
      </nav>
      {children}
    </Container>
  );
}
