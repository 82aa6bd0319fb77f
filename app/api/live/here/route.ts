import { currentActor } from "@/lib/platform/accounts/auth";
import { Refusal } from "@/lib/platform/errors";
import { movePage } from "@/lib/platform/events/live";
import { placeOf } from "../place";

export const dynamic = "force-dynamic";

/** An open page shows another deal: those who look at it too are told. */
export async function POST(request: Request): Promise<Response> {
  const actor = await currentActor(request.headers);
  if (!actor) return new Response(null, { status: 401 });
  const { workspaceId, page, dealId } = placeOf(new URL(request.url).searchParams);
  try {
    await movePage(workspaceId, actor, page, dealId);
    return new Response(null, { status: 204 });
  } catch (error) {
    if (error instanceof Refusal) return new Response(null, { status: error.status });
    throw error;
  }
}
