import { Container, Stack, Text, Title } from "@mantine/core";
import Link from "next/link";

/** What an unknown address, a deleted thing and another workspace's thing look like. */
export default function NotFound() {
  return (
    <Container size="sm" py={80} component="main">
      <Stack>
        <Title order={1}>There is nothing here</Title>
        <Text>The address is not known, or what it led to is not there any more or not yours to see.</Text>
        <Link href="/">To your workspaces</Link>
      </Stack>
    </Container>
  );
}
