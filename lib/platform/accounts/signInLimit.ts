import type { Database } from "../db/client";
import { refuse } from "../errors";

/** Failed sign-ins allowed in a window: an account's are counted whatever address they come from, and the reverse. */
const LIMITS = { account: 10, address: 50 } as const;
const WINDOW = 15 * 60 * 1000;

/** What a sign-in is counted under. */
export interface SignInKeys {
  readonly account: string;
  readonly address: string;
}

/** @throws Refusal "limited" when the account or the address has failed too often lately. */
export async function checkSignIn(database: Database, keys: SignInKeys, now: Date): Promise<void> {
  for (const kind of ["account", "address"] as const) {
    const row = await database.rateLimit.findUnique({ where: { key: keyOf(kind, keys) } });
    const isFresh = row && now.getTime() - Number(row.lastRequest) < WINDOW;
    if (isFresh && row.count >= LIMITS[kind]) {
      throw refuse(
        "limited",
        "tooManySignIns",
        "Too many failed sign-ins: try again in a quarter of an hour.",
        "email",
      );
    }
  }
}

/** Counts a failed sign-in; a window starts anew when the last failure is old. */
export async function countFailure(database: Database, keys: SignInKeys, now: Date): Promise<void> {
  for (const kind of ["account", "address"] as const) {
    const key = keyOf(kind, keys);
    const oldest = BigInt(now.getTime() - WINDOW);
    await database.$executeRaw`
      INSERT INTO "rateLimit" (id, key, count, "lastRequest") VALUES (${key}, ${key}, 1, ${BigInt(now.getTime())})
      ON CONFLICT (key) DO UPDATE SET
        count = CASE WHEN "rateLimit"."lastRequest" < ${oldest} THEN 1 ELSE "rateLimit".count + 1 END,
        "lastRequest" = ${BigInt(now.getTime())}`;
  }
}

/** A good sign-in clears the account's count; the address keeps its own. */
export async function clearFailures(database: Database, keys: SignInKeys): Promise<void> {
  await database.rateLimit.deleteMany({ where: { key: keyOf("account", keys) } });
}

function keyOf(kind: "account" | "address", keys: SignInKeys): string {
  return `sign-in ${kind} ${keys[kind].toLowerCase()}`;
}
