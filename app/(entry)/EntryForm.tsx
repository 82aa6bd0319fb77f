"use client";

import { Alert, Button, PasswordInput, Stack, Text, TextInput, Title } from "@mantine/core";
import Link from "next/link";
import { useRouter } from "next/navigation";
import { type FormEvent, useState } from "react";
import { askAccounts } from "../_ui/accounts";

/** Sign in, or sign up with a name; afterwards to where the person was going. */
export function EntryForm({ kind, next }: { kind: "sign-in" | "sign-up"; next: string }) {
  const router = useRouter();
  const [name, setName] = useState("");
  const [email, setEmail] = useState("");
  const [password, setPassword] = useState("");
  const [refused, setRefused] = useState<string | null>(null);
  const [isBusy, setBusy] = useState(false);
  const isNew = kind === "sign-up";
  const submit = async (event: FormEvent) => {
    event.preventDefault();
    setBusy(true);
    setRefused(null);
    const answer = await askAccounts(
      `${kind}/email`,
      isNew ? { name, email, password } : { email, password },
    );
    setBusy(false);
    if (answer.ok) {
      router.push(next);
      router.refresh();
    } else setRefused(answer.message);
  };
  const other = isNew ? "sign-in" : "sign-up";
  return (
    <form onSubmit={submit}>
      <Stack>
        <Title order={2} size="h3">
          {isNew ? "Make an account" : "Sign in"}
        </Title>
        {isNew && (
          <TextInput
            label="Name"
            autoComplete="name"
            required
            maxLength={80}
            value={name}
            onChange={(event) => setName(event.currentTarget.value)}
          />
        )}
        <TextInput
          label="E-mail"
          type="email"
          autoComplete="username"
          required
          maxLength={200}
          value={email}
          onChange={(event) => setEmail(event.currentTarget.value)}
        />
        <PasswordInput
          label="Password"
          description={isNew ? "At least 10 characters." : undefined}
          autoComplete={isNew ? "new-password" : "current-password"}
          required
          maxLength={200}
          value={password}
          onChange={(event) => setPassword(event.currentTarget.value)}
        />
        {refused && (
          <Alert color="red" role="alert">
            {refused}
          </Alert>
        )}
        <Button type="submit" loading={isBusy}>
          {isNew ? "Make the account" : "Sign in"}
        </Button>
        <Text size="sm">
          {isNew ? "You have an account already?" : "No account yet?"}{" "}
          <Link href={`/${other}?next=${encodeURIComponent(next)}`}>{isNew ? "Sign in" : "Make one"}</Link>
        </Text>
      </Stack>
    </form>
  );
}
