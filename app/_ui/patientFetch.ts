const RETRY = 1_500;

/**
 * Lets the framework's own fetches of page data wait for a server that cannot be reached. Failing, they would make the browser
 * leave for the address, and show its error page in place of what someone is typing.
 */
export function makePageFetchesPatient(): void {
  const plain = window.fetch as typeof window.fetch & { isPatient?: true };
  if (plain.isPatient) return;
  const patient: typeof plain = async (input, init) => {
    if (!isPageData(init)) return plain(input, init);
    for (;;) {
      const answer = await whole(plain(input, init)).catch((error: unknown) => {
        if (init?.signal?.aborted) throw error;
        return null;
      });
      if (answer && ![502, 503, 504].includes(answer.status)) return answer;
      await new Promise((resolve) => setTimeout(resolve, RETRY));
    }
  };
  patient.isPatient = true;
  window.fetch = patient;
}

/** An answer once all of it has come: one that breaks off half-way counts as none. */
async function whole(coming: Promise<Response>): Promise<Response> {
  const answer = await coming;
  const { status, statusText, headers, url, redirected } = answer;
  const hasBody = ![101, 204, 205, 304].includes(status);
  const body = hasBody ? await answer.arrayBuffer() : null;
  const complete = new Response(body, { status, statusText, headers });
  Object.defineProperties(complete, { url: { value: url }, redirected: { value: redirected } });
  return complete;
}

function isPageData(init: RequestInit | undefined): boolean {
  return init?.headers !== undefined && new Headers(init.headers).has("rsc");
}
