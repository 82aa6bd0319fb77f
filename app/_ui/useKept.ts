"use client";

import { useCallback, useEffect, useState } from "react";

/**
 * State that survives a reload: kept in this browser under a key until it is null again. The first render has the initial
 * value, what was kept follows at once after.
 */
export function useKept<Value>(key: string): [Value | null, (value: Value | null) => void] {
  const [value, setValue] = useState<Value | null>(null);
  useEffect(() => {
    const kept = localStorage.getItem(key);
    if (kept !== null) setValue(parsed<Value>(kept));
  }, [key]);
  const keep = useCallback(
    (next: Value | null) => {
      setValue(next);
      try {
        if (next === null) localStorage.removeItem(key);
        else localStorage.setItem(key, JSON.stringify(next));
      } catch {
        // A full or forbidden store: the value lives on in this page.
      }
    },
    [key],
  );
  return [value, keep];
}

function parsed<Value>(text: string): Value | null {
  try {
    return JSON.parse(text) as Value;
  } catch {
    return null;
  }
}
