import { Refusal } from "@/lib/platform/errors";

/** The refusal that an act ends in; the test fails when it ends otherwise. */
export async function refusal(act: Promise<unknown>): Promise<Refusal> {
  const reason = await act.then(
    () => "nothing",
    (error: unknown) => error,
  );
  if (reason instanceof Refusal) return reason;
  throw new Error(`Expected a refusal, got ${String(reason)}.`);
}
