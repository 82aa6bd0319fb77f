import { execFileSync } from "node:child_process";
import { existsSync, mkdtempSync, readdirSync, rmSync } from "node:fs";
import { createServer } from "node:net";
import { tmpdir } from "node:os";
import { delimiter, join } from "node:path";

/** A PostgreSQL server that the suite may use; `stop` ends it when the suite started it. */
export interface TestServer {
  readonly url: string;
  stop(): Promise<void>;
}

/** The server named by TEST_DATABASE_URL, else one of our own from installed programs, else null. */
export async function startPostgres(): Promise<TestServer | null> {
  const given = process.env.TEST_DATABASE_URL;
  if (given) return { url: given, stop: async () => {} };
  const programs = programFolder();
  if (programs === null) return null;
  const folder = mkdtempSync(join(tmpdir(), "loadline-postgres-"));
  const data = join(folder, "data");
  const port = await freePort();
  const asOwner = ownerCommand(folder);
  asOwner(join(programs, "initdb"), [
    "-D",
    data,
    "-U",
    "loadline",
    "-A",
    "trust",
    "-E",
    "UTF8",
    "--locale=C",
    "-N",
  ]);
  const options = `-p ${port} -c listen_addresses=127.0.0.1 -c unix_socket_directories=${folder} -c fsync=off`;
  asOwner(join(programs, "pg_ctl"), ["-D", data, "-l", join(folder, "log"), "-o", options, "-w", "start"]);
  return {
    url: `postgresql://loadline@127.0.0.1:${port}/postgres`,
    stop: async () => {
      asOwner(join(programs, "pg_ctl"), ["-D", data, "-m", "immediate", "stop"]);
      rmSync(folder, { recursive: true, force: true });
    },
  };
}

function programFolder(): string | null {
  const packaged = "/usr/lib/postgresql";
  const versions = existsSync(packaged) ? readdirSync(packaged).sort((a, b) => Number(b) - Number(a)) : [];
  const folders = [
    ...versions.map((version) => join(packaged, version, "bin")),
    ...(process.env.PATH ?? "").split(delimiter),
  ];
  return (
    folders.find((folder) => existsSync(join(folder, "initdb")) && existsSync(join(folder, "pg_ctl"))) ?? null
  );
}

/** The server refuses to run as root: there its own system user runs it. */
function ownerCommand(folder: string): (program: string, args: string[]) => void {
  const isRoot = process.getuid?.() === 0;
  if (isRoot) execFileSync("chown", ["postgres", folder]);
  return (program, args) => {
    const [command, commandArgs] = isRoot
      ? ["runuser", ["-u", "postgres", "--", program, ...args]]
      : [program, args];
    execFileSync(command as string, commandArgs as string[], { stdio: "ignore", cwd: folder });
  };
}

function freePort(): Promise<number> {
  return new Promise((resolve, reject) => {
    const server = createServer();
    server.once("error", reject);
    server.listen(0, "127.0.0.1", () => {
      const address = server.address();
      server.close(() => resolve(typeof address === "object" && address ? address.port : 0));
    });
  });
}
