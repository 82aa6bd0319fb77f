import { currentActor } from "@/lib/platform/accounts/auth";
import { Refusal } from "@/lib/platform/errors";
import { mustBeMember } from "@/lib/platform/events/live";

export const dynamic = "force-dynamic";

/** Whether this person may have a workspace's stream: 204, 401 when signed out, 404 for an outsider. */
export async function GET(request: Request): Promise<Response> {
  const workspaceId = new URL(request.url).searchParams.get("workspace") ?? "";
  const actor = await currentActor(request.headers);
  if (!actor) return new Response(null, { status: 401 });
  try {
    await mustBeMember(workspaceId, actor);
    return new Response(null, { status: 204 });
  } catch (error) {
    if (error instanceof Refusal) return new Response(null, { status: error.status });
    throw error;
  }
}
