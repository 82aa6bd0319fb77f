"use client";

import { Button } from "@mantine/core";

/** Takes back everything that was typed and not saved, and brings it back on a second press: nothing typed is lost. */
export function UndoButton<Kept>({
  kept,
  undone,
  onKept,
  onUndone,
}: {
  kept: Kept | null;
  undone: Kept | null;
  onKept: (kept: Kept | null) => void;
  onUndone: (undone: Kept | null) => void;
}) {
  const swap = () => {
    onUndone(kept);
    onKept(kept === null ? undone : null);
  };
  const isRedo = kept === null && undone !== null;
  return (
    <Button variant="default" disabled={kept === null && undone === null} onClick={swap}>
      {isRedo ? "Bring the changes back" : "Undo all changes"}
    </Button>
  );
}
