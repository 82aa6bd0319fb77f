"use client";

import {
  Button,
  Code,
  CopyButton,
  Group,
  NativeSelect,
  Stack,
  Table,
  Text,
  TextInput,
  Title,
} from "@mantine/core";
import { useRouter } from "next/navigation";
import { type FormEvent, useState } from "react";
import { type Answer, call } from "@/app/_ui/call";
import { Problems } from "@/app/_ui/Problems";
import type { Operations } from "@/lib/operations";
import { type Role, roles } from "@/lib/platform/accounts/actor";
import type { Problem } from "@/lib/platform/errors";

type PeopleShown = Operations["workspaces.people"]["output"];

/** Members with their roles, and open invitations; owners change both. */
export function People({ workspaceId, people }: { workspaceId: string; people: PeopleShown }) {
  const router = useRouter();
  const [role, setRole] = useState<Role>("analyst");
  const [email, setEmail] = useState("");
  const [link, setLink] = useState<string | null>(null);
  const [problems, setProblems] = useState<readonly Problem[]>([]);
  const done = (answer: Answer<unknown>) => {
    setProblems(answer.ok ? [] : answer.problems);
    router.refresh();
  };
  const invite = async (event: FormEvent) => {
    event.preventDefault();
    const answer = await call("workspaces.invite", { workspaceId, role, email });
    if (answer.ok) setLink(answer.output.link);
    done(answer);
  };
  const leave = async () => {
    const answer = await call("workspaces.leave", { workspaceId });
    if (answer.ok) router.push("/?all");
    else done(answer);
  };
  return (
    <Stack>
      <Title order={1}>People</Title>
      <Problems problems={problems} title="Nothing was changed" />
      <Table.ScrollContainer minWidth={520}>
        <Table>
          <Table.Thead>
            <Table.Tr>
              <Table.Th>Name</Table.Th>
              <Table.Th>E-mail</Table.Th>
              <Table.Th>Role</Table.Th>
              <Table.Th>Since</Table.Th>
              <Table.Th />
            </Table.Tr>
          </Table.Thead>
          <Table.Tbody>
            {people.members.map((member) => (
              <Table.Tr key={member.userId}>
                <Table.Td>{member.name}</Table.Td>
                <Table.Td>{member.email}</Table.Td>
                <Table.Td>
                  {people.may.manage ? (
                    <NativeSelect
                      aria-label={`Role of ${member.name}`}
                      data={[...roles]}
                      value={member.role}
                      onChange={async (event) =>
                        done(
                          await call("workspaces.changeRole", {
                            workspaceId,
                            userId: member.userId,
                            role: event.currentTarget.value as Role,
                          }),
                        )
                      }
                    />
                  ) : (
                    member.role
                  )}
                </Table.Td>
                <Table.Td>{member.since.slice(0, 10)}</Table.Td>
                <Table.Td>
                  {member.isSelf ? (
                    <Button size="compact-sm" variant="default" onClick={leave}>
                      Leave
                    </Button>
                  ) : (
                    people.may.manage && (
                      <Button
                        size="compact-sm"
                        variant="default"
                        onClick={async () =>
                          done(await call("workspaces.removeMember", { workspaceId, userId: member.userId }))
                        }
                      >
                        Remove
                      </Button>
                    )
                  )}
                </Table.Td>
              </Table.Tr>
            ))}
          </Table.Tbody>
        </Table>
      </Table.ScrollContainer>
      {people.may.manage && (
        <>
          <Title order={2} size="h4">
            Invite
          </Title>
          <form onSubmit={invite}>
            <Group align="end">
              <NativeSelect
                label="As"
                data={[...roles]}
                value={role}
                onChange={(event) => setRole(event.currentTarget.value as Role)}
              />
              <TextInput
                label="E-mail (if it is to be mailed)"
                type="email"
                value={email}
                onChange={(event) => setEmail(event.currentTarget.value)}
              />
              <Button type="submit">Make an invitation link</Button>
            </Group>
          </form>
          {link && (
            <Group>
              <Code data-testid="invitation-link">{link}</Code>
              <CopyButton value={link}>
                {({ copied, copy }) => (
                  <Button size="compact-sm" variant="default" onClick={copy}>
                    {copied ? "Copied" : "Copy"}
                  </Button>
                )}
              </CopyButton>
              <Text size="sm">It is shown once and holds for seven days.</Text>
            </Group>
          )}
          {people.invitations.map((invitation) => (
            <Group key={invitation.id}>
              <Text size="sm">
                Open: {invitation.role}
                {invitation.email ? `, ${invitation.email}` : ""}, until {invitation.expiresAt.slice(0, 10)}
              </Text>
              <Button
                size="compact-sm"
                variant="default"
                onClick={async () =>
                  done(await call("workspaces.revoke", { workspaceId, invitationId: invitation.id }))
                }
              >
                Revoke
              </Button>
            </Group>
          ))}
        </>
      )}
    </Stack>
  );
}
