"use client";

import { ActionIcon, Menu } from "@mantine/core";
import { classAbove, mergeUp, raiseClass, splitClass } from "@/lib/deals/classEdits";
import type { ClassText } from "@/lib/deals/form";

/** What can be done with one class of the structure. */
export function ClassActions({
  row,
  classes,
  onChange,
}: {
  row: ClassText;
  classes: readonly ClassText[];
  onChange(classes: readonly ClassText[]): void;
}) {
  const above = classAbove(classes, row.key);
  const name = row.name || "the class";
  return (
    <Menu position="bottom-end">
      <Menu.Target>
        <ActionIcon size="sm" variant="subtle" color="gray" aria-label={`Change ${name}`}>
          ⋯
        </ActionIcon>
      </Menu.Target>
      <Menu.Dropdown>
        <Menu.Item onClick={() => onChange(splitClass(classes, row.key, newKey()))}>
          Cut in two halves
        </Menu.Item>
        <Menu.Item disabled={!above} onClick={() => onChange(mergeUp(classes, row.key))}>
          Join with {above?.name || "the class above"}
        </Menu.Item>
        <Menu.Item disabled={!above} onClick={() => onChange(raiseClass(classes, row.key))}>
          Change places with {above?.name || "the class above"}
        </Menu.Item>
        <Menu.Item color="red" onClick={() => onChange(classes.filter(({ key }) => key !== row.key))}>
          Remove
        </Menu.Item>
      </Menu.Dropdown>
    </Menu>
  );
}

export function newKey(): string {
  return `C${Date.now().toString(36)}`;
}
