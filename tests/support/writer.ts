/** A process that signs someone up in the store and then writes comments for ever, saying each one that was acknowledged. */

import { openEmbedded, openServer } from "@/lib/platform/db/open";
import { execute } from "@/lib/platform/run";
import { commands as workspaces } from "@/lib/workspaces/commands";
import { aPerson } from "./world";

async function main([mode, place]: string[]): Promise<void> {
  const store = await (mode === "server" ? openServer(place!) : openEmbedded(place!));
  const actor = await aPerson(store.database, "writer");
  for (let i = 0; ; i++) {
    const { workspaceId } = await execute(
      workspaces.create,
      { name: `Desk ${i}` },
      { database: store.database, actor },
    );
    process.stdout.write(`${workspaceId}\n`);
  }
}

void main(process.argv.slice(2));
