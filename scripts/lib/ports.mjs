import net from "node:net";
import { Failure } from "./failure.mjs";

const listens = (port, host) =>
  new Promise((resolve, reject) => {
    const server = net.createServer();
    server.once("error", reject);
    server.listen({ port, host, exclusive: true }, () => {
      const address = server.address();
      server.close(() => resolve(address.port));
    });
  });

/**
 * Says whether a loopback port is free, on both addresses that "localhost" may mean.
 * @param {number} port
 * @returns {Promise<boolean>}
 */
export async function isFree(port) {
  try {
    await listens(port, "127.0.0.1");
  } catch {
    return false;
  }
  try {
    await listens(port, "::1");
  } catch (error) {
    // A machine without IPv6 has nothing there to be in the way.
    return error.code !== "EADDRINUSE" && error.code !== "EACCES";
  }
  return true;
}

/**
 * The first free loopback port from a number upwards.
 * @param {number} from
 * @returns {Promise<number>}
 */
export async function firstFreePort(from) {
  for (let port = from; port < from + 500 && port < 65_536; port += 1) {
    if (await isFree(port)) return port;
  }
  throw new Failure(
    `No port is free between ${from} and ${from + 499}.`,
    "End a server that you no longer need.",
  );
}

/**
 * Any free loopback port, the wanted one if possible.
 * @param {number} [wanted]
 * @returns {Promise<number>}
 */
export async function anyFreePort(wanted) {
  if (wanted && (await isFree(wanted))) return wanted;
  return listens(0, "127.0.0.1");
}
