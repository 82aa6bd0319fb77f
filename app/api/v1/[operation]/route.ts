import { findOperation } from "@/lib/operations";
import { notFound, Refusal, refuse } from "@/lib/platform/errors";
import { logError } from "@/lib/platform/log";
import { serve } from "@/lib/platform/serve";

const LARGEST_BODY = 16 * 1024 * 1024;

/** The one door to every command and query: input JSON in, output JSON out, refusals as data. */
export async function POST(
  request: Request,
  { params }: { params: Promise<{ operation: string }> },
): Promise<Response> {
  const { operation: name } = await params;
  try {
    sameOrigin(request);
    const operation = findOperation(name);
    if (!operation) throw notFound("operation");
    const output = await serve(operation, await inputOf(request), request.headers);
    return Response.json(output ?? null);
  } catch (error) {
    return refusalResponse(error, name);
  }
}

async function inputOf(request: Request): Promise<unknown> {
  if (Number(request.headers.get("content-length") ?? 0) > LARGEST_BODY) {
    throw refuse("invalid", "tooLarge", "This is more than 16 MB: send it in parts.");
  }
  try {
    return JSON.parse(await request.text());
  } catch {
    throw refuse("invalid", "notJson", "The request's body must be JSON.");
  }
}

/** Cookies alone are not a wish: a browser's request must come from our own pages. */
function sameOrigin(request: Request): void {
  const origin = request.headers.get("origin");
  if (origin && new URL(origin).host !== request.headers.get("host")) {
    throw refuse("forbidden", "otherOrigin", "This request comes from another site.");
  }
}

function refusalResponse(error: unknown, operation: string): Response {
  if (error instanceof Refusal) {
    const { problems, current, status } = error;
    return Response.json({ errors: problems, ...(current === undefined ? {} : { current }) }, { status });
  }
  logError(`operation ${operation}`, error);
  const message = "Something went wrong on our side: nothing was changed. Try again.";
  return Response.json({ errors: [{ code: "internal", path: "", message }] }, { status: 500 });
}
