"use client";

import { Button, Group, Menu, Stack, TextInput } from "@mantine/core";
import { useHotkeys } from "@mantine/hooks";
import { useRouter } from "next/navigation";
import { useState } from "react";
import { call } from "@/app/_ui/call";
import { Problems } from "@/app/_ui/Problems";
import type { Problem } from "@/lib/platform/errors";
import { useDeal } from "./dealContext";
import styles from "./frame.module.css";
import { roomAddress } from "./rooms";

interface Refused {
  readonly title: string;
  readonly problems: readonly Problem[];
}

/** Save, take back, price, copy, archive: what this member may do with the deal. */
export function DealActions() {
  const { workspaceId, deal, mayEdit, mayWork, draft, isDirty, isBehind, reading, isSaving, save } =
    useDeal();
  const router = useRouter();
  const [note, setNote] = useState("");
  const [refused, setRefused] = useState<Refused | null>(null);
  const [isPricing, setPricing] = useState(false);
  const maySave = reading.ok && !isBehind && (isDirty || deal === null);

  useHotkeys(
    mayEdit
      ? [
          ["mod+Z", draft.undo],
          ["mod+shift+Z", draft.redo],
        ]
      : [],
  );
  useHotkeys(mayEdit ? [["mod+S", () => void (maySave && save())]] : [], []);

  const price = async () => {
    if (!deal) return;
    setRefused(null);
    const version = isDirty ? await save() : deal.version;
    if (version === null) return;
    setPricing(true);
    const answer = await call("runs.price", { workspaceId, dealId: deal.id, version, note });
    setPricing(false);
    if (answer.ok) router.push(roomAddress(workspaceId, deal.id, `runs/${answer.output.runId}`));
    else setRefused({ title: "Nothing was priced", problems: answer.problems });
  };
  const copy = async () => {
    if (!deal) return;
    const name = `${deal.name} (copy)`.slice(0, 120);
    const answer = await call("deals.copy", { workspaceId, dealId: deal.id, name });
    if (answer.ok) router.push(roomAddress(workspaceId, answer.output.dealId));
    else setRefused({ title: "The deal was not copied", problems: answer.problems });
  };
  const archive = async () => {
    if (!deal) return;
    const answer = await call("deals.archive", { workspaceId, dealId: deal.id, archived: !deal.isArchived });
    if (answer.ok) setRefused(null);
    else setRefused({ title: "The deal stays where it was", problems: answer.problems });
    router.refresh();
  };

  return (
    <Stack gap="xs" className={styles.acts}>
      <Group gap="xs" justify="flex-end">
        {mayEdit && (
          <>
            <Button.Group>
              <Button
                size="compact-sm"
                variant="default"
                disabled={!draft.canUndo}
                onClick={draft.undo}
                title="Take the last change back (Ctrl Z)"
              >
                Undo
              </Button>
              <Button
                size="compact-sm"
                variant="default"
                disabled={!draft.canRedo}
                onClick={draft.redo}
                title="Make it again (Ctrl Shift Z)"
              >
                Redo
              </Button>
              <Button size="compact-sm" variant="default" disabled={!isDirty} onClick={draft.discard}>
                Drop all changes
              </Button>
            </Button.Group>
            <Button size="compact-sm" onClick={save} loading={isSaving} disabled={!maySave}>
              {deal ? "Save" : "Store the deal"}
            </Button>
          </>
        )}
        {deal && mayWork && (
          <>
            <TextInput
              size="xs"
              aria-label="Note for the run"
              placeholder="Note for the run"
              maxLength={500}
              value={note}
              onChange={(event) => setNote(event.currentTarget.value)}
            />
            <Button
              size="compact-sm"
              color="indigo"
              onClick={price}
              loading={isPricing}
              disabled={isDirty && !(mayEdit && maySave)}
            >
              {isDirty && mayEdit ? "Save and price" : `Price version ${deal.version}`}
            </Button>
          </>
        )}
        {deal?.may.edit && (
          <Menu position="bottom-end">
            <Menu.Target>
              <Button size="compact-sm" variant="default" aria-label="More to do with the deal">
                More
              </Button>
            </Menu.Target>
            <Menu.Dropdown>
              <Menu.Item onClick={copy}>Copy the deal</Menu.Item>
              <Menu.Item onClick={archive}>
                {deal.isArchived ? "Restore from the archive" : "Archive"}
              </Menu.Item>
            </Menu.Dropdown>
          </Menu>
        )}
      </Group>
      {refused && <Problems title={refused.title} problems={refused.problems} />}
    </Stack>
  );
}
