import { createHash } from "node:crypto";
import fs from "node:fs";
import os from "node:os";
import path from "node:path";
import { Failure } from "./failure.mjs";

/** The kernel's limit for a socket's path, with its closing zero. */
const SOCKET_LIMIT = 107;

/**
 * Where a server keeps what.
 * @param {string} dir its folder
 */
export function databaseFiles(dir) {
  return {
    dir,
    data: path.join(dir, "data"),
    temporary: path.join(dir, "tmp"),
    config: path.join(dir, "my.cnf"),
    log: path.join(dir, "mariadb.log"),
    pid: path.join(dir, "mariadb.pid"),
    port: path.join(dir, "port"),
    state: path.join(dir, "state.json"),
    ready: path.join(dir, "initialised"),
    socket: socketPath(dir),
  };
}

/** In the server's own folder, or in a private one under the temporary folder when that path is too long. */
function socketPath(dir) {
  const usual = path.join(dir, "mariadb.sock");
  if (Buffer.byteLength(usual) < SOCKET_LIMIT) return usual;
  const hash = createHash("sha256").update(dir).digest("hex").slice(0, 16);
  const folder = path.join(os.tmpdir(), `cembalo-${hash}`);
  const found = fs.lstatSync(folder, { throwIfNoEntry: false });
  const uid = process.getuid?.();
  if (found && (!found.isDirectory() || (found.uid !== uid && uid !== 0))) {
    throw new Failure(
      `${folder} is in the way.`,
      "Remove it, or move the project to a folder with a shorter path.",
    );
  }
  return path.join(folder, "db.sock");
}

/**
 * Writes the server's settings.
 * @param {ReturnType<typeof databaseFiles>} files
 * @param {{ port: number, relaxed: boolean }} options
 */
export function writeConfig(files, { port, relaxed }) {
  const quoted = (text) => `"${text.replaceAll("\\", "\\\\")}"`;
  const durability = relaxed
    ? [
        "innodb_flush_log_at_trx_commit=0",
        "sync_binlog=0",
        "innodb_doublewrite=0",
        "innodb_flush_method=nosync",
      ]
    : ["innodb_flush_log_at_trx_commit=1", "sync_binlog=1", "innodb_doublewrite=1"];
  const lines = [
    "[client]",
    `socket=${quoted(files.socket)}`,
    `user=${os.userInfo().username}`,
    "default-character-set=utf8mb4",
    "[mariadbd]",
    `datadir=${quoted(files.data)}`,
    `socket=${quoted(files.socket)}`,
    `pid-file=${quoted(files.pid)}`,
    `tmpdir=${quoted(files.temporary)}`,
    `secure-file-priv=${quoted(files.temporary)}`,
    "bind-address=127.0.0.1",
    `port=${port}`,
    "skip-name-resolve",
    "character-set-server=utf8mb4",
    "collation-server=utf8mb4_unicode_ci",
    "default-time-zone=+00:00",
    "sql_mode=STRICT_ALL_TABLES,ONLY_FULL_GROUP_BY,NO_ZERO_IN_DATE,NO_ZERO_DATE,ERROR_FOR_DIVISION_BY_ZERO,NO_ENGINE_SUBSTITUTION",
    "innodb_buffer_pool_size=128M",
    "innodb_log_file_size=32M",
    "max_connections=200",
    "max_allowed_packet=64M",
    ...durability,
  ];
  fs.writeFileSync(files.config, `${lines.join("\n")}\n`, { mode: 0o600 });
}
