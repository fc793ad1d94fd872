/** A connection for a kernel of one's own: free ports on the loopback address, a fresh key, a file only its owner reads. */
import { randomUUID } from "node:crypto";
import { mkdtempSync, writeFileSync } from "node:fs";
import { createServer } from "node:net";
import { tmpdir } from "node:os";
import { join } from "node:path";
import type { ConnectionInfo } from "../kernel/wire";

const loopback = "127.0.0.1";

async function freePorts(count: number): Promise<number[]> {
  const servers = await Promise.all(
    Array.from(
      { length: count },
      () =>
        new Promise<ReturnType<typeof createServer>>((resolve, reject) => {
          const server = createServer();
          server.once("error", reject);
          server.listen(0, loopback, () => resolve(server));
        }),
    ),
  );
  const ports = servers.map((server) => (server.address() as { port: number }).port);
  await Promise.all(servers.map((server) => new Promise((resolve) => server.close(resolve))));
  return ports;
}

export interface NewConnection {
  info: ConnectionInfo;
  /** Folder of the connection file; whoever asked for it takes it away again. */
  folder: string;
  file: string;
}

/** Writes the connection file for a kernel that is about to start. */
export async function newConnection(): Promise<NewConnection> {
  const [shell_port, iopub_port, stdin_port, control_port, hb_port] = await freePorts(5);
  const info: ConnectionInfo = {
    transport: "tcp",
    ip: loopback,
    shell_port,
    iopub_port,
    stdin_port,
    control_port,
    hb_port,
    key: randomUUID(),
    signature_scheme: "hmac-sha256",
    kernel_name: "cosmology-cells",
  };
  const folder = mkdtempSync(join(tmpdir(), "cosmology-cells-"));
  const file = join(folder, "connection.json");
  writeFileSync(file, JSON.stringify(info), { mode: 0o600, flag: "wx" });
  return { info, folder, file };
}
