import type { Prisma, PrismaClient } from "@/lib/generated/prisma/client";

/** The database as commands and queries see it: always inside a transaction. */
export type Transaction = Prisma.TransactionClient;

/** The whole client; only lib/platform opens and closes it. */
export type Database = PrismaClient;
