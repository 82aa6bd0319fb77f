/** What an accounts request came to: nothing wrong, or one sentence. */
export type AccountAnswer = { readonly ok: true } | { readonly ok: false; readonly message: string };

/** Asks the accounts service (sign in, up, out, change password). Never throws. */
export async function askAccounts(path: string, body: Record<string, unknown>): Promise<AccountAnswer> {
  try {
    const response = await fetch(`/api/accounts/${path}`, {
      method: "POST",
      headers: { "content-type": "application/json" },
      body: JSON.stringify(body),
    });
    if (response.ok) return { ok: true };
    const { message } = (await response.json().catch(() => ({}))) as { message?: string };
    return { ok: false, message: message ?? "This did not work: check what you typed and try again." };
  } catch {
    return { ok: false, message: "The server cannot be reached. Try again in a moment." };
  }
}
