"use client";

import { Alert, Button, Group, PasswordInput, Text, TextInput } from "@mantine/core";
import { useRouter } from "next/navigation";
import { type FormEvent, useState } from "react";
import { askAccounts } from "@/app/_ui/accounts";

/** The session has ended: one signs in again in place, and loses nothing of what is on screen. */
export function SignInAgain({ onDone }: { onDone(): void }) {
  const router = useRouter();
  const [problem, setProblem] = useState<string | null>(null);
  const [isBusy, setBusy] = useState(false);
  const signIn = async (event: FormEvent<HTMLFormElement>) => {
    event.preventDefault();
    const fields = new FormData(event.currentTarget);
    setBusy(true);
    const answer = await askAccounts("sign-in/email", {
      email: String(fields.get("email")),
      password: String(fields.get("password")),
    });
    setBusy(false);
    setProblem(answer.ok ? null : answer.message);
    if (!answer.ok) return;
    onDone();
    router.refresh();
  };
  return (
    <Alert color="yellow" mb="sm" title="You are signed out" role="status">
      <Text size="sm">Sign in again here: what you typed stays on this page.</Text>
      <form onSubmit={signIn}>
        <Group align="end" mt="xs">
          <TextInput size="xs" name="email" type="email" label="E-mail" required autoComplete="username" />
          <PasswordInput
            size="xs"
            name="password"
            label="Password"
            required
            w={180}
            autoComplete="current-password"
          />
          <Button size="xs" type="submit" loading={isBusy}>
            Sign in
          </Button>
        </Group>
        {problem && (
          <Text size="sm" c="var(--mantine-color-error)" mt={4} role="alert">
            {problem}
          </Text>
        )}
      </form>
    </Alert>
  );
}
