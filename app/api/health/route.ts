import { storeHealth } from "@/lib/platform/serve";
import packageJson from "@/package.json";

export const dynamic = "force-dynamic";

/** 200 once the app serves and its store answers. */
export async function GET(): Promise<Response> {
  return Response.json({ status: "ok", version: packageJson.version, store: await storeHealth() });
}
