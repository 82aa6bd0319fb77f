import { store } from "../db/store";
import { Refusal } from "../errors";
import { checkSignIn, clearFailures, countFailure } from "./signInLimit";

/** A sign-in under the limits of its account and its address. */
export async function guardedSignIn(
  request: Request,
  address: string,
  handler: (request: Request) => Promise<Response>,
): Promise<Response> {
  const { database } = await store();
  const body: unknown = await request
    .clone()
    .json()
    .catch(() => ({}));
  const email = typeof body === "object" && body !== null && "email" in body ? String(body.email) : "";
  const keys = { account: email.slice(0, 200), address };
  try {
    await checkSignIn(database, keys, new Date());
  } catch (error) {
    if (!(error instanceof Refusal)) throw error;
    return Response.json({ code: "TOO_MANY_SIGN_INS", message: error.message }, { status: error.status });
  }
  const response = await handler(request);
  if (response.ok) await clearFailures(database, keys);
  else await countFailure(database, keys, new Date());
  return response;
}
