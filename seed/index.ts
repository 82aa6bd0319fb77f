import { randomBytes } from "node:crypto";
import { existsSync, readFileSync, writeFileSync } from "node:fs";
import { join } from "node:path";
import { config } from "@/lib/platform/config";
import { store } from "@/lib/platform/db/store";

const EMAIL = "structurer@demo.invalid";

/**
 * Makes the demo workspace when the store has nobody in it yet, and says how to sign in: the password is made for this
 * installation and kept in the data folder. Null when people are already here without a demo.
 */
export async function plantDemo(): Promise<{ email: string; password: string } | null> {
  const { database } = await store();
  const file = join(config().DATA_DIR, "demo-password");
  if ((await database.user.count()) > 0) {
    return existsSync(file) ? { email: EMAIL, password: readFileSync(file, "utf8").trim() } : null;
  }
  const password = `${randomBytes(9).toString("base64url")}`;
  // What planting needs is most of the app: a start that has people already does not wait for it.
  const { plant } = await import("./plant");
  await plant(EMAIL, password);
  writeFileSync(file, `${password}\n`, { mode: 0o600 });
  return { email: EMAIL, password };
}
