import { currentActor } from "@/lib/platform/accounts/auth";
import { Refusal } from "@/lib/platform/errors";
import { live } from "@/lib/platform/events/live";
import { liveStream } from "@/lib/platform/events/liveStream";
import { placeOf } from "./place";

export const dynamic = "force-dynamic";

/** Server-sent events of one workspace, resumed after Last-Event-ID. */
export async function GET(request: Request): Promise<Response> {
  const asked = new URL(request.url).searchParams;
  const actor = await currentActor(request.headers);
  if (!actor) return new Response(null, { status: 401 });
  const last = request.headers.get("last-event-id") ?? asked.get("since");
  const since = last && /^\d{1,18}$/.test(last) ? BigInt(last) : null;
  try {
    const stream = await liveStream(await live(), {
      ...placeOf(asked),
      actor,
      since,
      signal: request.signal,
    });
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
