import { Agent, get } from "node:http";
import { aMarket, aPool } from "../support/builders";
import { expect, test } from "./support/desk";

const STREAMS = 200;

test("two hundred open pages have a comment within a second of its being posted", async ({
  desk,
  context,
  baseURL,
}) => {
  const { poolId } = await desk.call("pools.create", { ...aPool(2) });
  const { marketId } = await desk.call("markets.create", { ...aMarket() });
  const correlation = { kind: "flat", rho: 0.3 };
  const content = {
    maturity: "2031-12-20",
    years: null,
    law: "finite",
    correlation,
    classes: [],
    nthToDefault: [1],
    notes: "",
  };
  const { dealId } = await desk.call("deals.create", { name: "Mole", poolId, marketId, content });
  const cookie = (await context.cookies()).map(({ name, value }) => `${name}=${value}`).join("; ");
  const agent = new Agent({ maxSockets: Number.POSITIVE_INFINITY });
  const heard: number[] = [];
  const stream = (i: number) =>
    new Promise<void>((resolve, reject) => {
      const address = `${baseURL}/api/live?workspace=${desk.workspaceId}&page=p${i}&deal=${dealId}`;
      get(address, { agent, headers: { cookie } }, (answer) => {
        if (answer.statusCode !== 200) reject(new Error(`Stream ${i}: ${answer.statusCode}`));
        answer.setEncoding("utf8");
        answer.on("data", (text: string) => {
          if (text.includes("comment.posted")) heard.push(Date.now());
        });
        answer.once("data", () => resolve());
        answer.on("error", () => undefined);
      }).on("error", reject);
    });
  await Promise.all(Array.from({ length: STREAMS }, (_, i) => stream(i)));
  await desk.call("discussion.start", { dealId, body: "The first of a process is slower." });
  await expect.poll(() => heard.length).toBe(STREAMS);
  const waits: number[] = [];
  for (let i = 0; i < 5; i++) {
    heard.length = 0;
    const from = Date.now();
    await desk.call("discussion.start", { dealId, body: `To all, ${i}` });
    await expect.poll(() => heard.length).toBe(STREAMS);
    waits.push(Math.max(...heard) - from);
  }
  test
    .info()
    .annotations.push({ type: "milliseconds until the last stream has it", description: waits.join(", ") });
  agent.destroy();
  expect(Math.max(...waits)).toBeLessThan(1_000);
});
