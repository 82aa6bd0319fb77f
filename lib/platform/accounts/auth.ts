import { betterAuth } from "better-auth";
import { prismaAdapter } from "better-auth/adapters/prisma";
import { config } from "../config";
import { store } from "../db/store";
import type { Actor } from "./actor";

async function makeAuth() {
  const { AUTH_SECRET, PUBLIC_URL } = config();
  const { database } = await store();
  return betterAuth({
    appName: "Loadline",
    basePath: "/api/accounts",
    baseURL: PUBLIC_URL,
    secret: AUTH_SECRET,
    database: prismaAdapter(database, { provider: "postgresql" }),
    emailAndPassword: { enabled: true, minPasswordLength: 10, maxPasswordLength: 200, autoSignIn: true },
    session: { expiresIn: 60 * 60 * 24 * 14, updateAge: 60 * 60 * 24 },
    rateLimit: { enabled: false },
    telemetry: { enabled: false },
    trustedOrigins: (request?: Request) => {
      const origin = request?.headers.get("origin");
      const host = request?.headers.get("host");
      return [PUBLIC_URL, ...(origin && host && new URL(origin).host === host ? [origin] : [])];
    },
    advanced: { cookiePrefix: "loadline", useSecureCookies: PUBLIC_URL.startsWith("https:") },
  });
}

const shared = globalThis as typeof globalThis & { loadlineAuth?: ReturnType<typeof makeAuth> | undefined };

/** The accounts of this process: people, passwords, sessions. */
export function auth(): ReturnType<typeof makeAuth> {
  shared.loadlineAuth ??= makeAuth();
  return shared.loadlineAuth;
}

/** Who is signed in, from the request's cookies. */
export async function currentActor(headers: Headers): Promise<Actor | null> {
  const found = await (await auth()).api.getSession({ headers });
  return found ? { userId: found.user.id, name: found.user.name, email: found.user.email } : null;
}
