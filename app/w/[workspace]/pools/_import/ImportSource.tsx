"use client";

import { Button, FileButton, Group, Stack, Text, Textarea } from "@mantine/core";
import { type DragEvent, useState } from "react";
import { decodeText } from "@/lib/pools/import/decode";

const LARGEST_FILE = 16 * 1024 * 1024;

/** Where the table comes from: a file chosen or dropped, or text pasted from a spreadsheet. */
export function ImportSource({ onText }: { onText: (text: string, source: string | null) => void }) {
  const [pasted, setPasted] = useState("");
  const [remark, setRemark] = useState("");

  const openFile = async (file: File | null | undefined) => {
    if (!file) return;
    if (file.size > LARGEST_FILE) return setRemark(`${file.name} is larger than 16 MB: split it.`);
    const bytes = new Uint8Array(await file.arrayBuffer());
    if (bytes[0] === 0x50 && bytes[1] === 0x4b) {
      return setRemark(
        `${file.name} is a workbook: save the sheet as CSV, or copy its cells and paste them here.`,
      );
    }
    setRemark(`Read ${file.name}.`);
    onText(decodeText(bytes), file.name);
  };
  const drop = (event: DragEvent) => {
    event.preventDefault();
    void openFile(event.dataTransfer.files[0]);
  };

  return (
    <Stack gap="xs" onDragOver={(event) => event.preventDefault()} onDrop={drop}>
      <Group>
        <FileButton onChange={openFile} accept=".csv,.tsv,.txt,text/csv,text/plain">
          {(props) => <Button {...props}>Choose a file</Button>}
        </FileButton>
        <Text size="sm" aria-live="polite">
          {remark || "CSV or tab-separated; or drop it here."}
        </Text>
      </Group>
      <Textarea
        label="Or paste cells from a spreadsheet, header line included"
        value={pasted}
        onChange={(event) => setPasted(event.currentTarget.value)}
        minRows={3}
        maxRows={6}
        autosize
        styles={{ input: { fontFamily: "monospace", whiteSpace: "pre", overflowX: "auto" } }}
      />
      <Group>
        <Button variant="default" disabled={pasted.trim() === ""} onClick={() => onText(pasted, null)}>
          Read what is pasted
        </Button>
      </Group>
    </Stack>
  );
}
