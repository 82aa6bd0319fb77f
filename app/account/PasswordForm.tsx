"use client";

import { Alert, Button, Container, PasswordInput, Stack, Text, Title } from "@mantine/core";
import Link from "next/link";
import { type FormEvent, useState } from "react";
import { askAccounts } from "../_ui/accounts";

/** Changes one's own password; every other session is ended. */
export function PasswordForm({ name, email, back }: { name: string; email: string; back: string }) {
  const [currentPassword, setCurrent] = useState("");
  const [newPassword, setNew] = useState("");
  const [said, setSaid] = useState<{ ok: boolean; text: string } | null>(null);
  const submit = async (event: FormEvent) => {
    event.preventDefault();
    const answer = await askAccounts("change-password", {
      currentPassword,
      newPassword,
      revokeOtherSessions: true,
    });
    setSaid(
      answer.ok
        ? { ok: true, text: "The password is changed; other sessions are ended." }
        : { ok: false, text: answer.message },
    );
    if (answer.ok) {
      setCurrent("");
      setNew("");
    }
  };
  return (
    <Container size={460} py="xl" component="main">
      <form onSubmit={submit}>
        <Stack>
          <Link href={back}>Back</Link>
          <Title order={1}>{name}</Title>
          <Text c="dimmed">{email}</Text>
          <PasswordInput
            label="Present password"
            autoComplete="current-password"
            required
            value={currentPassword}
            onChange={(event) => setCurrent(event.currentTarget.value)}
          />
          <PasswordInput
            label="New password"
            description="At least 10 characters."
            autoComplete="new-password"
            required
            minLength={10}
            maxLength={200}
            value={newPassword}
            onChange={(event) => setNew(event.currentTarget.value)}
          />
          <Button type="submit">Change the password</Button>
          {said && (
            <Alert color={said.ok ? "teal" : "red"} role="status">
              {said.text}
            </Alert>
          )}
        </Stack>
      </form>
    </Container>
  );
}
