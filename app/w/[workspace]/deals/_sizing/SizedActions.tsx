"use client";

import { Button, Group, TextInput } from "@mantine/core";
import { useRouter } from "next/navigation";
import { useState } from "react";
import { call } from "@/app/_ui/call";
import { Problems } from "@/app/_ui/Problems";
import { limitFields, type SizingForm } from "@/lib/alternatives/sizingForm";
import type { ClassText } from "@/lib/deals/form";
import type { Problem } from "@/lib/platform/errors";
import { useDeal } from "../_frame/dealContext";
import { classesOf } from "./classesOf";

/** Lays the placed classes over the deal, or keeps them beside it. */
export function SizedActions({
  form,
  placed,
  isTyped,
  onForget,
}: {
  form: SizingForm;
  placed: readonly ClassText[] | null;
  isTyped: boolean;
  onForget(): void;
}) {
  const { workspaceId, deal, mayEdit, change } = useDeal();
  const router = useRouter();
  const [name, setName] = useState("");
  const [isBusy, setBusy] = useState(false);
  const [isApplied, setApplied] = useState(false);
  const [refused, setRefused] = useState<readonly Problem[]>([]);
  const keep = async () => {
    if (!deal || !placed) return;
    const read = classesOf(placed);
    if (!read) return;
    setBusy(true);
    const answer = await call("alternatives.keep", {
      workspaceId,
      dealId: deal.id,
      name,
      content: { classes: read, note: targetWords(form) },
    });
    setBusy(false);
    setRefused(answer.ok ? [] : answer.problems);
    if (answer.ok) setName("");
    router.refresh();
  };
  return (
    <>
      <Group gap="xs" mt="xs" className="screenOnly">
        {mayEdit && (
          <>
            <Button
              size="xs"
              disabled={!placed}
              onClick={() => {
                if (placed) change({ classes: placed });
                setApplied(true);
              }}
            >
              Lay over the deal's structure
            </Button>
            {deal && (
              <>
                <TextInput
                  size="xs"
                  aria-label="Name of the alternative"
                  placeholder="Name of the alternative"
                  maxLength={120}
                  value={name}
                  onChange={(event) => setName(event.currentTarget.value)}
                />
                <Button
                  size="xs"
                  variant="default"
                  loading={isBusy}
                  disabled={!placed || name.trim() === ""}
                  onClick={keep}
                >
                  Keep beside the deal
                </Button>
              </>
            )}
          </>
        )}
        <Button size="xs" variant="default" disabled={!isTyped} onClick={onForget}>
          Start from the deal's classes
        </Button>
      </Group>
      {isApplied && (
        <div role="status">The classes are laid over the deal, not saved yet; Undo takes them back.</div>
      )}
      <Problems title="The alternative was not kept" problems={refused} />
    </>
  );
}

/** What was asked for, for the alternative's note. */
function targetWords({ rows }: SizingForm): string {
  return rows
    .map((row) => {
      const limits = limitFields
        .filter(({ kind }) => row[kind].trim() !== "")
        .map(({ kind, label, unit }) => `${label.toLowerCase()} ${row[kind].trim()} ${unit}`);
      return `${row.name}: ${limits.join(", ")}`;
    })
    .join("; ")
    .slice(0, 1_000);
}
