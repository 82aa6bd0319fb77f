"use client";

import { Alert } from "@mantine/core";
import { useRouter } from "next/navigation";
import { useEffect, useRef, useState } from "react";

/** Keeps the page as the server has it: events of the deal refresh it; a lost connection is said and caught up with. */
export function LivePage({ workspaceId, dealId }: { workspaceId: string; dealId: string }) {
  const router = useRouter();
  const [isLost, setLost] = useState(false);
  const refresh = useRef(router.refresh);
  useEffect(() => {
    const source = new EventSource(`/api/live?workspace=${encodeURIComponent(workspaceId)}`);
    source.onopen = () => {
      setLost(false);
      refresh.current();
    };
    source.onerror = () => setLost(true);
    source.onmessage = (message) => {
      const event = JSON.parse(message.data) as { dealId: string | null };
      if (event.dealId === dealId) refresh.current();
    };
    return () => source.close();
  }, [workspaceId, dealId]);
  return isLost ? (
    <Alert color="yellow" role="status">
      The connection to the server is lost. The page catches up by itself when it is back; what you type is
      kept.
    </Alert>
  ) : null;
}
