"use client";

import { Box, Button, Group, Text, UnstyledButton, useMantineColorScheme } from "@mantine/core";
import Link from "next/link";
import { usePathname, useRouter } from "next/navigation";
import { askAccounts } from "@/app/_ui/accounts";
import classes from "./bar.module.css";
import { Palette } from "./Palette";

const rooms = ["deals", "pools", "markets", "people", "activity"] as const;

/** The bar above every screen of a workspace: where one is, who one is, and the way to the other rooms. */
export function WorkspaceBar({
  workspaceId,
  name,
  role,
  person,
  unread,
}: {
  workspaceId: string;
  name: string;
  role: string;
  person: string;
  unread: number;
}) {
  const path = usePathname();
  const router = useRouter();
  const { colorScheme, setColorScheme } = useMantineColorScheme();
  const following = { auto: "light", light: "dark", dark: "auto" } as const;
  const signOut = async () => {
    await askAccounts("sign-out", {});
    router.push("/sign-in");
    router.refresh();
  };
  return (
    <Box component="header" className={classes.bar}>
      <Group justify="space-between" gap="xs">
        <Group gap="md" component="nav" aria-label="Workspace">
          <Text component={Link} href="/?all" fw={700} className={classes.mark}>
            Loadline
          </Text>
          <Text component={Link} href={`/w/${workspaceId}`} fw={600}>
            {name}
          </Text>
          {rooms.map((room) => (
            <Link
              key={room}
              href={`/w/${workspaceId}/${room}`}
              aria-current={path.startsWith(`/w/${workspaceId}/${room}`) ? "page" : undefined}
              className={classes.room}
            >
              {room.charAt(0).toUpperCase() + room.slice(1)}
            </Link>
          ))}
        </Group>
        <Group gap="sm">
          <Palette workspaceId={workspaceId} />
          <Link
            href={`/w/${workspaceId}/inbox`}
            className={classes.room}
            aria-current={path.startsWith(`/w/${workspaceId}/inbox`) ? "page" : undefined}
          >
            Inbox{unread > 0 ? ` (${unread})` : ""}
          </Link>
          <Text size="sm" component={Link} href={`/account?back=${encodeURIComponent(path)}`}>
            {person}, {role}
          </Text>
          <UnstyledButton
            fz="sm"
            onClick={() => setColorScheme(following[colorScheme])}
            aria-label={`Colours: ${colorScheme}; change`}
          >
            {colorScheme === "auto" ? "As system" : colorScheme === "light" ? "Light" : "Dark"}
          </UnstyledButton>
          <Button size="compact-sm" variant="default" onClick={signOut}>
            Sign out
          </Button>
        </Group>
      </Group>
    </Box>
  );
}
