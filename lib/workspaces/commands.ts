import { randomBytes, randomUUID } from "node:crypto";
import { config } from "../platform/config";
import { notFound, refuse } from "../platform/errors";
import { sendMail } from "../platform/mail";
import { type CommandContext, defineCommand } from "../platform/operation";
import { hashOfToken, openInvitation } from "./invitations";
import { mayManage, need } from "./policy";
import {
  changeRoleInput,
  createInput,
  invitationInput,
  inviteInput,
  inWorkspace,
  memberInput,
  renameInput,
  tokenInput,
} from "./schema";

const INVITATION_DAYS = 7;

const create = defineCommand({
  name: "workspaces.create",
  input: createInput,
  async run({ tx, actor, record, now }, { name }) {
    const id = randomUUID();
    await tx.workspace.create({
      data: {
        id,
        name,
        createdAt: now,
        members: { create: { id: randomUUID(), userId: actor.userId, role: "owner", createdAt: now } },
      },
    });
    await record({
      workspaceId: id,
      kind: "workspace.created",
      subjectKind: "workspace",
      subjectId: id,
      after: { name },
    });
    return { workspaceId: id };
  },
});

const rename = defineCommand({
  name: "workspaces.rename",
  input: renameInput,
  async run(context, { workspaceId, name }) {
    await asOwner(context, workspaceId, "rename the workspace");
    const before = await context.tx.workspace.findUniqueOrThrow({ where: { id: workspaceId } });
    await context.tx.workspace.update({
      where: { id: workspaceId },
      data: { name, version: { increment: 1 } },
    });
    await context.record({
      workspaceId,
      kind: "workspace.renamed",
      subjectKind: "workspace",
      subjectId: workspaceId,
      before: { name: before.name },
      after: { name },
    });
    await context.emit({ workspaceId, kind: "workspace.renamed", payload: {} });
    return null;
  },
});

const invite = defineCommand({
  name: "workspaces.invite",
  input: inviteInput,
  async run(context, { workspaceId, role, email }) {
    const { tx, actor, now, record, emit } = context;
    await asOwner(context, workspaceId, "invite people");
    const token = randomBytes(24).toString("base64url");
    const id = randomUUID();
    const expiresAt = new Date(now.getTime() + INVITATION_DAYS * 24 * 3600 * 1000);
    await tx.invitation.create({
      data: {
        id,
        workspaceId,
        role,
        email: email || null,
        tokenHash: hashOfToken(token),
        expiresAt,
        inviterId: actor.userId,
        createdAt: now,
      },
    });
    await record({
      workspaceId,
      kind: "invitation.made",
      subjectKind: "invitation",
      subjectId: id,
      after: { role, email: email || null },
    });
    await emit({ workspaceId, kind: "invitation.made", payload: {} });
    const link = `${config().PUBLIC_URL}/join/${token}`;
    if (email) {
      const { name } = await tx.workspace.findUniqueOrThrow({ where: { id: workspaceId } });
      void sendMail(
        email,
        `Invitation to ${name}`,
        `${actor.name} invites you to the workspace ${name} in Loadline, as ${role}.\n\n${link}\n\nThe link holds for ${INVITATION_DAYS} days.`,
      );
    }
    return { invitationId: id, link, expiresAt: expiresAt.toISOString() };
  },
});

const revoke = defineCommand({
  name: "workspaces.revoke",
  input: invitationInput,
  async run(context, { workspaceId, invitationId }) {
    await asOwner(context, workspaceId, "revoke invitations");
    const { count } = await context.tx.invitation.updateMany({
      where: { id: invitationId, workspaceId, status: "pending" },
      data: { status: "revoked" },
    });
    if (count === 0) throw notFound("open invitation");
    await context.record({
      workspaceId,
      kind: "invitation.revoked",
      subjectKind: "invitation",
      subjectId: invitationId,
    });
    await context.emit({ workspaceId, kind: "invitation.revoked", payload: {} });
    return null;
  },
});

const join = defineCommand({
  name: "workspaces.join",
  input: tokenInput,
  async run({ tx, actor, now, record, emit }, { token }) {
    const invitation = await openInvitation({ tx, now }, token);
    const { workspaceId, role } = invitation;
    const isMember = await tx.member.findUnique({
      where: { workspaceId_userId: { workspaceId, userId: actor.userId } },
    });
    if (isMember) return { workspaceId };
    await tx.member.create({
      data: { id: randomUUID(), workspaceId, userId: actor.userId, role, createdAt: now },
    });
    await tx.invitation.update({ where: { id: invitation.id }, data: { status: "accepted" } });
    await record({
      workspaceId,
      kind: "member.joined",
      subjectKind: "member",
      subjectId: actor.userId,
      after: { role },
    });
    await emit({ workspaceId, kind: "member.joined", payload: { userId: actor.userId } });
    return { workspaceId };
  },
});

const changeRole = defineCommand({
  name: "workspaces.changeRole",
  input: changeRoleInput,
  async run(context, { workspaceId, userId, role }) {
    await asOwner(context, workspaceId, "change roles");
    const { tx, record, emit } = context;
    const member = await memberIn(context, workspaceId, userId);
    if (member.role === "owner" && role !== "owner") await keepAnOwner(context, workspaceId);
    await tx.member.update({ where: { id: member.id }, data: { role } });
    await record({
      workspaceId,
      kind: "member.roleChanged",
      subjectKind: "member",
      subjectId: userId,
      before: { role: member.role },
      after: { role },
    });
    await emit({ workspaceId, kind: "member.roleChanged", payload: { userId } });
    return null;
  },
});

const removeMember = defineCommand({
  name: "workspaces.removeMember",
  input: memberInput,
  async run(context, { workspaceId, userId }) {
    await asOwner(context, workspaceId, "remove members");
    await dropMember(context, workspaceId, userId, "member.removed");
    return null;
  },
});

const leave = defineCommand({
  name: "workspaces.leave",
  input: inWorkspace,
  async run(context, { workspaceId }) {
    await context.member(workspaceId);
    await dropMember(context, workspaceId, context.actor.userId, "member.left");
    return null;
  },
});

async function asOwner(context: CommandContext, workspaceId: string, act: string): Promise<void> {
  const member = await context.member(workspaceId);
  need(mayManage(member), member.role, act);
}

async function memberIn({ tx }: CommandContext, workspaceId: string, userId: string) {
  const member = await tx.member.findUnique({ where: { workspaceId_userId: { workspaceId, userId } } });
  if (!member) throw notFound("member");
  return member;
}

/** The last owner stays: the rows are locked, so that two owners cannot both leave at once. */
async function keepAnOwner({ tx }: CommandContext, workspaceId: string): Promise<void> {
  const owners = await tx.$queryRaw<
    unknown[]
  >`SELECT id FROM "member" WHERE "workspaceId" = ${workspaceId} AND role = 'owner' FOR UPDATE`;
  if (owners.length <= 1)
    throw refuse("conflict", "lastOwner", "A workspace needs an owner: make someone else owner first.");
}

async function dropMember(
  context: CommandContext,
  workspaceId: string,
  userId: string,
  kind: string,
): Promise<void> {
  const member = await memberIn(context, workspaceId, userId);
  if (member.role === "owner") await keepAnOwner(context, workspaceId);
  await context.tx.member.delete({ where: { id: member.id } });
  await context.record({
    workspaceId,
    kind,
    subjectKind: "member",
    subjectId: userId,
    before: { role: member.role },
  });
  await context.emit({ workspaceId, kind, payload: { userId } });
}

export const commands = { create, rename, invite, revoke, join, changeRole, removeMember, leave };
