import { randomUUID } from "node:crypto";
import type { Actor, Role } from "@/lib/platform/accounts/actor";
import type { Database } from "@/lib/platform/db/client";

/** A person with an account, in no workspace. */
export async function aPerson(database: Database, name = "Ada Fennimore"): Promise<Actor> {
  const id = randomUUID();
  const email = `${id}@example.test`;
  await database.user.create({ data: { id, name, email } });
  return { userId: id, name, email };
}

/** A workspace with one member of each role. */
export async function aWorkspace(
  database: Database,
): Promise<{ readonly workspaceId: string; readonly members: Readonly<Record<Role, Actor>> }> {
  const workspaceId = randomUUID();
  await database.workspace.create({ data: { id: workspaceId, name: "Quay" } });
  const member = async (role: Role) => {
    const actor = await aPerson(database, `The ${role}`);
    await database.member.create({ data: { id: randomUUID(), workspaceId, userId: actor.userId, role } });
    return actor;
  };
  const members = {
    owner: await member("owner"),
    structurer: await member("structurer"),
    analyst: await member("analyst"),
    viewer: await member("viewer"),
  };
  return { workspaceId, members };
}
