import type { AddressInfo } from "node:net";
import { SMTPServer } from "smtp-server";
import { afterAll, beforeAll, beforeEach, describe, expect, it } from "vitest";
import { commands as discussion } from "@/lib/discussion/commands";
import { commands as notices } from "@/lib/notices/commands";
import { mailNotices } from "@/lib/notices/mail";
import { execute } from "@/lib/platform/run";
import { withDatabase } from "../support/database";
import { aWorld } from "../support/world";

const place = withDatabase();
const caught: { to: string; text: string }[] = [];
let isRefusing = false;
let world: Awaited<ReturnType<typeof aWorld>>;

const catcher = new SMTPServer({
  authOptional: true,
  disabledCommands: ["STARTTLS"],
  onData(stream, session, done) {
    let text = "";
    stream.on("data", (part) => {
      text += part;
    });
    stream.on("end", () => {
      if (!isRefusing) caught.push({ to: session.envelope.rcptTo[0]?.address ?? "", text: plain(text) });
      done(isRefusing ? new Error("no room") : null);
    });
  },
});

/** A quoted-printable mail as read (RFC 2045, section 6.7): soft line breaks joined, bytes given back. */
function plain(text: string): string {
  return text
    .replace(/=\r\n/g, "")
    .replace(/=([0-9A-F]{2})/g, (_, hex) => String.fromCharCode(parseInt(hex, 16)));
}

beforeAll(async () => {
  await new Promise<void>((resolve) => {
    catcher.listen(0, "127.0.0.1", resolve);
  });
  const { port } = catcher.server.address() as AddressInfo;
  process.env.SMTP_URL = `smtp://127.0.0.1:${port}`;
  process.env.PUBLIC_URL = "https://desk.example";
  world = await aWorld(place.store.database);
});

afterAll(() => new Promise<void>((resolve) => catcher.close(() => resolve())));

beforeEach(async () => {
  caught.length = 0;
  isRefusing = false;
  await place.store.database.notice.deleteMany({});
});

const as = (role: "owner" | "analyst") => ({ database: place.store.database, actor: world.people[role] });
const mention = (body: string) => {
  const { workspaceId, dealId, people } = world;
  const input = {
    workspaceId,
    dealId,
    body,
    mentions: [people.owner.userId],
    anchor: { kind: "deal" as const },
  };
  return execute(discussion.start, input, as("analyst"));
};
const want = (mail: "off" | "digest" | "atOnce") =>
  execute(notices.setMail, { workspaceId: world.workspaceId, mail }, as("owner"));
const mail = (minutesLater = 0) =>
  mailNotices(place.store.database, new Date(Date.now() + minutesLater * 60_000));

describe("MAIL of notices", () => {
  it("goes at once to who wants so, with words and the comment's own address, and never twice", async () => {
    await want("atOnce");
    const { commentId } = await mention("Why is the first loss <b>so</b> high?");
    expect(await mail()).toBe(1);
    expect(await mail(120)).toBe(0);
    expect(caught).toHaveLength(1);
    const [{ to, text }] = caught as [(typeof caught)[0]];
    expect(to).toBe(world.people.owner.email);
    expect(text).toContain("Subject: analyst named you in Deal");
    expect(text).toContain("Why is the first loss <b>so</b> high?");
    const { workspaceId, dealId } = world;
    expect(text).toContain(
      `https://desk.example/w/${workspaceId}/deals/${dealId}/talk?threads=all#comment-${commentId}`,
    );
  });

  it("is gathered for an hour in a digest: one mail of all that waits", async () => {
    await want("digest");
    for (const body of ["one", "two", "three"]) await mention(body);
    expect(await mail(59)).toBe(0);
    expect(await mail(61)).toBe(1);
    expect(caught[0]?.text).toContain("Subject: 3 notices in Loadline");
    for (const body of ["one", "two", "three"]) expect(caught[0]?.text).toContain(`  ${body}`);
  });

  it("leaves out what was read meanwhile, and everything while it is off, also when it is switched on later", async () => {
    const { workspaceId } = world;
    await want("digest");
    await mention("read in time");
    await execute(notices.read, { workspaceId, which: "all", isRead: true }, as("owner"));
    expect(await mail(61)).toBe(0);
    await want("off");
    await mention("while off");
    expect(await mail(61)).toBe(0);
    await want("atOnce");
    expect(await mail()).toBe(0);
  });

  it("is tried again when the mail server refused it", async () => {
    await want("atOnce");
    await mention("again");
    isRefusing = true;
    expect(await mail()).toBe(0);
    isRefusing = false;
    expect(await mail()).toBe(1);
  });

  it("is sent once when several processes look at the same time", async () => {
    await want("atOnce");
    for (let i = 0; i < 10; i++) await mention(`No. ${i}`);
    const other = await place.another();
    const now = new Date();
    await Promise.all(
      Array.from({ length: 8 }, (_, i) => mailNotices(i % 2 ? other.database : place.store.database, now)),
    );
    const said = caught.flatMap(({ text }) => text.match(/^ {2}No\. \d/gm) ?? []);
    expect([...said].sort()).toEqual(Array.from({ length: 10 }, (_, i) => `  No. ${i}`));
  });
});
