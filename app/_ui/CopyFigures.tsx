"use client";

import { useEffect } from "react";
import { copiedText } from "./copyFigures";

/** Makes copying a figure copy all its digits. */
export function CopyFigures() {
  useEffect(() => {
    const onCopy = (event: ClipboardEvent) => {
      const target = event.target as Element | null;
      if (target?.closest("input, textarea")) return;
      const selection = document.getSelection();
      const text = selection && copiedText(selection);
      if (!text) return;
      event.clipboardData?.setData("text/plain", text);
      event.preventDefault();
    };
    document.addEventListener("copy", onCopy);
    return () => document.removeEventListener("copy", onCopy);
  }, []);
  return null;
}
