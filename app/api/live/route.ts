import { currentActor } from "@/lib/platform/accounts/auth";
import { Refusal } from "@/lib/platform/errors";
import { liveStream } from "@/lib/platform/events/liveStream";

export const dynamic = "force-dynamic";

/** Server-sent events of one workspace, resumed after Last-Event-ID. */
export async function GET(request: Request): Promise<Response> {
  const workspaceId = new URL(request.url).searchParams.get("workspace") ?? "";
  const actor = await currentActor(request.headers);
  if (!actor) return new Response(null, { status: 401 });
  const last = request.headers.get("last-event-id") ?? new URL(request.url).searchParams.get("since");
  try {
    const stream = await liveStream(
      workspaceId,
      actor,
      last && /^\d+$/.test(last) ? BigInt(last) : null,
      request.signal,
    );
    return new Response(stream, {
      headers: {
        "content-type": "text/event-stream; charset=utf-8",
        "cache-control": "no-cache, no-transform",
        "x-accel-buffering": "no",
      },
    });
  } catch (error) {
    if (error instanceof Refusal) return new Response(null, { status: error.status });
    throw error;
  }
}

export function HEAD(): Response {
  return new Response(null, { headers: { "content-type": "text/event-stream" } });
}
