import { z } from "zod";
import { defineQuery } from "../platform/operation";
import { openInvitation } from "./invitations";
import { mayOf } from "./policy";
import { inWorkspace, tokenInput } from "./schema";

const mine = defineQuery({
  name: "workspaces.mine",
  input: z.strictObject({}),
  async run({ tx, actor }) {
    const rows = await tx.member.findMany({
      where: { userId: actor.userId },
      include: { workspace: true },
      orderBy: { createdAt: "asc" },
    });
    return {
      actor,
      workspaces: rows.map(({ workspace, role }) => ({ id: workspace.id, name: workspace.name, role })),
    };
  },
});

/** The parts of a page are read one by one: events of so many milliseconds before are told to it again. */
const RENDERED_WITHIN = 5_000;

const open = defineQuery({
  name: "workspaces.open",
  input: inWorkspace,
  async run({ tx, actor, member, now }, { workspaceId }) {
    const { role } = await member(workspaceId);
    const workspace = await tx.workspace.findUniqueOrThrow({ where: { id: workspaceId } });
    const { _max } = await tx.event.aggregate({
      where: { workspaceId, at: { lt: new Date(now.getTime() - RENDERED_WITHIN) } },
      _max: { id: true },
    });
    const since = String(_max.id ?? 0);
    return { id: workspace.id, name: workspace.name, role, actor, may: mayOf({ role }), since };
  },
});

const people = defineQuery({
  name: "workspaces.people",
  input: inWorkspace,
  async run({ tx, member, now }, { workspaceId }) {
    const self = await member(workspaceId);
    const may = mayOf(self);
    const members = await tx.member.findMany({
      where: { workspaceId },
      include: { user: true },
      orderBy: { createdAt: "asc" },
    });
    const invitations = may.manage
      ? await tx.invitation.findMany({
          where: { workspaceId, status: "pending", expiresAt: { gt: now } },
          orderBy: { createdAt: "desc" },
        })
      : [];
    return {
      may,
      members: members.map(({ user, role, createdAt }) => ({
        userId: user.id,
        name: user.name,
        email: user.email,
        role,
        since: createdAt.toISOString(),
        isSelf: user.id === self.userId,
      })),
      invitations: invitations.map(({ id, role, email, expiresAt }) => ({
        id,
        role,
        email,
        expiresAt: expiresAt.toISOString(),
      })),
    };
  },
});

/** What an invitation link leads to; known to whoever holds the link. */
const invitation = defineQuery({
  name: "workspaces.invitation",
  input: tokenInput,
  async run({ tx, now }, { token }) {
    const found = await openInvitation({ tx, now }, token);
    return { workspace: found.workspace.name, role: found.role, inviter: found.inviter.name };
  },
});

export const queries = { mine, open, people, invitation };
