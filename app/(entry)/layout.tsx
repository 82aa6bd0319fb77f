import { Container, Paper, Text, Title } from "@mantine/core";
import type { ReactNode } from "react";

/** The frame of the pages in front of a workspace. */
export default function EntryLayout({ children }: { children: ReactNode }) {
  return (
    <Container size={460} py={60} component="main">
      <Title order={1} size="h2">
        Loadline
      </Title>
      <Text c="dimmed" mb="lg">
        Structure, check and review baskets of credits and their tranches.
      </Text>
      <Paper withBorder p="lg" radius="md">
        {children}
      </Paper>
    </Container>
  );
}
