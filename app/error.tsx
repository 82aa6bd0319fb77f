"use client";

import { Button, Container, Stack, Text, Title } from "@mantine/core";

/** A page that could not be made: says so and offers a way on; what was typed is kept in the browser. */
export default function ErrorPage({ reset }: { reset: () => void }) {
  return (
    <Container size="sm" py={80} component="main">
      <Stack>
        <Title order={1}>This page could not be made</Title>
        <Text>The server may be starting again. What you typed is kept in this browser.</Text>
        <Button onClick={reset}>Try again</Button>
      </Stack>
    </Container>
  );
}
