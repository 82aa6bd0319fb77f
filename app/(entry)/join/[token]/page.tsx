import { Button, Stack, Text, Title } from "@mantine/core";
import { headers } from "next/headers";
import Link from "next/link";
import { Refusal } from "@/lib/platform/errors";
import { serve } from "@/lib/platform/serve";
import { queries } from "@/lib/workspaces/queries";
import { JoinButton } from "./JoinButton";

export const metadata = { title: "Invitation" };

export default async function Page({ params }: { params: Promise<{ token: string }> }) {
  const { token } = await params;
  const next = encodeURIComponent(`/join/${token}`);
  try {
    const { workspace, role, inviter } = await serve(queries.invitation, { token }, await headers());
    return (
      <Stack>
        <Title order={2} size="h3">
          Join {workspace}
        </Title>
        <Text>
          {inviter} invites you as {role}.
        </Text>
        <JoinButton token={token} />
      </Stack>
    );
  } catch (error) {
    if (!(error instanceof Refusal)) throw error;
    if (error.kind !== "signedOut") return <Text>{error.message}</Text>;
    return (
      <Stack>
        <Title order={2} size="h3">
          You are invited
        </Title>
        <Text>Sign in, or make an account, to see the invitation.</Text>
        <Button component={Link} href={`/sign-up?next=${next}`}>
          Make an account
        </Button>
        <Button component={Link} href={`/sign-in?next=${next}`} variant="default">
          Sign in
        </Button>
      </Stack>
    );
  }
}
