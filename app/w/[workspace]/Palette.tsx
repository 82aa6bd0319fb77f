"use client";

import "@mantine/spotlight/styles.css";
import { Button, Kbd, Modal, Table } from "@mantine/core";
import { useDisclosure, useHotkeys } from "@mantine/hooks";
import { Spotlight, type SpotlightActionData, spotlight } from "@mantine/spotlight";
import { usePathname, useRouter } from "next/navigation";
import { useState } from "react";
import { call } from "@/app/_ui/call";
import { roomAddress, rooms } from "./deals/_frame/rooms";

const places = ["Deals", "Pools", "Markets", "People", "Activity", "Inbox"] as const;

const keys: readonly (readonly [string, string])[] = [
  ["Ctrl K", "Go anywhere: rooms, deals, pools"],
  ["?", "This list"],
  ["Ctrl S", "Save the deal"],
  ["Ctrl Z, Ctrl Shift Z", "Undo and redo in the deal (outside a field)"],
  ["Arrow keys on a boundary", "Move it by 0.1 %; with Shift 1 %, with Alt 0.01 %"],
  ["Arrows, Tab, Enter, F2, Esc", "Move and edit in a grid of names"],
  ["Shift with arrows, Ctrl D, Ctrl C, Ctrl V", "Choose a block, fill it down, copy, paste"],
  ["Ctrl Enter", "Send a comment"],
];

interface Found {
  readonly label: string;
  readonly address: string;
}

/** Everything by keyboard: a field that leads anywhere, and the list of keys. */
export function Palette({ workspaceId }: { workspaceId: string }) {
  const router = useRouter();
  const path = usePathname();
  const [records, setRecords] = useState<readonly Found[]>([]);
  const [isListOpen, list] = useDisclosure(false);
  const home = `/w/${workspaceId}`;
  const [, dealId] = /\/deals\/([^/]+)/.exec(path) ?? [];
  const fetchRecords = async () => {
    const deals = await call("deals.list", { workspaceId });
    const pools = await call("pools.list", { workspaceId });
    setRecords([
      ...(deals.ok
        ? deals.output.deals.map(({ id, name }) => ({
            label: `Deal: ${name}`,
            address: `${home}/deals/${id}`,
          }))
        : []),
      ...(pools.ok
        ? pools.output.pools.map(({ id, name }) => ({
            label: `Pool: ${name}`,
            address: `${home}/pools/${id}`,
          }))
        : []),
    ]);
  };
  useHotkeys([["shift+?", list.open]]);
  const go = ({ label, address }: Found): SpotlightActionData => ({
    id: address,
    label,
    onClick: () => router.push(address),
  });
  const actions: SpotlightActionData[] = [
    ...(dealId && dealId !== "new"
      ? rooms.map(({ slug, label }) =>
          go({ label: `Room: ${label}`, address: roomAddress(workspaceId, dealId, slug) }),
        )
      : []),
    ...places.map((place) => go({ label: place, address: `${home}/${place.toLowerCase()}` })),
    go({ label: "New deal", address: `${home}/deals/new` }),
    go({ label: "New pool", address: `${home}/pools/new` }),
    go({ label: "New market", address: `${home}/markets/new` }),
    ...records.map(go),
    { id: "keys", label: "List of keys", onClick: list.open },
  ];
  return (
    <>
      <Button size="compact-sm" variant="default" onClick={spotlight.open} aria-label="Go anywhere">
        Go to <Kbd ml={6}>Ctrl K</Kbd>
      </Button>
      <Spotlight
        actions={actions}
        shortcut="mod + K"
        limit={12}
        nothingFound="Nothing of that name."
        onSpotlightOpen={() => void fetchRecords()}
        searchProps={{ placeholder: "A room, a deal, a pool …", "aria-label": "Go to" }}
      />
      <Modal opened={isListOpen} onClose={list.close} title="Keys">
        <Table fz="sm">
          <Table.Tbody>
            {keys.map(([key, words]) => (
              <Table.Tr key={key}>
                <Table.Td>
                  <Kbd>{key}</Kbd>
                </Table.Td>
                <Table.Td>{words}</Table.Td>
              </Table.Tr>
            ))}
          </Table.Tbody>
        </Table>
      </Modal>
    </>
  );
}
