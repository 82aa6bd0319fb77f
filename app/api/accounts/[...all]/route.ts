import { clientAddress } from "@/lib/platform/accounts/address";
import { auth } from "@/lib/platform/accounts/auth";
import { guardedSignIn } from "@/lib/platform/accounts/guardedSignIn";

export async function GET(request: Request): Promise<Response> {
  return (await auth()).handler(request);
}

export async function POST(request: Request): Promise<Response> {
  const { handler } = await auth();
  const isSignIn = new URL(request.url).pathname.endsWith("/sign-in/email");
  return isSignIn ? guardedSignIn(request, clientAddress(request.headers), handler) : handler(request);
}
