import { fsyncSync } from "node:fs";
import { PGlite } from "@electric-sql/pglite";
import { NodeFS } from "@electric-sql/pglite/nodefs";

interface EmscriptenModule {
  readonly FS: {
    readonly filesystems: { readonly NODEFS: { readonly stream_ops: Record<string, unknown> } };
  };
}

/** The embedded database's files on disk, with the fsync that the runtime's own file system leaves out. */
class DurableNodeFS extends NodeFS {
  override async init(...args: Parameters<NodeFS["init"]>): ReturnType<NodeFS["init"]> {
    const result = await super.init(...args);
    const { preRun } = result.emscriptenOpts as unknown as { preRun: ((module: EmscriptenModule) => void)[] };
    preRun.push((module) => {
      module.FS.filesystems.NODEFS.stream_ops.fsync = (stream: { nfd?: number }) => {
        if (stream.nfd !== undefined) syncDescriptor(stream.nfd);
        return 0;
      };
    });
    return result;
  }
}

function syncDescriptor(descriptor: number): void {
  try {
    fsyncSync(descriptor);
    fsyncs.count++;
  } catch (error) {
    if (!["EINVAL", "EBADF"].includes((error as NodeJS.ErrnoException).code ?? "")) throw error;
  }
}

/** How often a write was forced to the disk: a test guards that it happens at all. */
export const fsyncs = { count: 0 };

/** Opens the embedded database in a folder; an acknowledged commit has reached the disk. */
export function openDurable(folder: string): Promise<PGlite> {
  return PGlite.create({
    fs: new DurableNodeFS(folder),
    startParams: [
      ...PGlite.defaultStartParams.filter((parameter) => parameter !== "-F"),
      "-c",
      "fsync=on",
      "-c",
      "wal_sync_method=fsync",
      "-c",
      "synchronous_commit=on",
    ],
  });
}
