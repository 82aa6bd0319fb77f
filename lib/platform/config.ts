import { randomBytes } from "node:crypto";
import { existsSync, mkdirSync, readFileSync, writeFileSync } from "node:fs";
import { join, resolve } from "node:path";
import { z } from "zod";

const settingsSchema = z.object({
  PORT: z.coerce
    .number({ message: "PORT must be a number" })
    .int("PORT must be a whole number")
    .min(0, "PORT must be 0 or more")
    .max(65_535, "PORT must be at most 65535")
    .default(3000),
  HOST: z.string().min(1).default("localhost"),
  DATA_DIR: z
    .string()
    .min(1)
    .default("./data")
    .transform((folder) => resolve(folder)),
  DATABASE_URL: z
    .string()
    .refine((url) => /^postgres(ql)?:\/\//.test(url), "DATABASE_URL must start with postgresql://")
    .optional(),
  AUTH_SECRET: z.string().min(32, "AUTH_SECRET must have at least 32 characters").optional(),
  PUBLIC_URL: z
    .url({ protocol: /^https?$/, error: "PUBLIC_URL must be an http or https address" })
    .optional(),
  SMTP_URL: z
    .string()
    .refine((url) => /^smtps?:\/\//.test(url), "SMTP_URL must start with smtp:// or smtps://")
    .optional(),
  MAIL_FROM: z.string().default("Loadline <loadline@localhost>"),
  TRUST_PROXY: z.enum(["yes", "no"], { message: "TRUST_PROXY must be yes or no" }).default("no"),
});

export type Settings = z.infer<typeof settingsSchema>;
export type Config = Omit<Settings, "AUTH_SECRET" | "PUBLIC_URL"> & {
  readonly AUTH_SECRET: string;
  readonly PUBLIC_URL: string;
};

let known: Config | undefined;

/** The settings of this process, read once. @throws Error that lists every wrong setting. */
export function config(): Config {
  known ??= readConfig(process.env);
  return known;
}

/** Reads and checks settings; an empty variable counts as absent. */
export function readConfig(environment: Readonly<Record<string, string | undefined>>): Config {
  const given = Object.fromEntries(
    Object.entries(environment).filter(([, value]) => value !== undefined && value !== ""),
  );
  const parsed = settingsSchema.safeParse(given);
  if (!parsed.success)
    throw new Error(`Settings: ${parsed.error.issues.map((issue) => issue.message).join("; ")}.`);
  const settings = parsed.data;
  return {
    ...settings,
    AUTH_SECRET: settings.AUTH_SECRET ?? keptSecret(settings.DATA_DIR),
    PUBLIC_URL:
      settings.PUBLIC_URL ??
      `http://${settings.HOST === "0.0.0.0" ? "localhost" : settings.HOST}:${settings.PORT}`,
  };
}

/** The secret kept in the data folder, made on first use. */
function keptSecret(folder: string): string {
  const file = join(folder, "secret");
  if (existsSync(file)) return readFileSync(file, "utf8").trim();
  mkdirSync(folder, { recursive: true });
  const secret = randomBytes(32).toString("hex");
  writeFileSync(file, `${secret}\n`, { mode: 0o600 });
  return secret;
}
