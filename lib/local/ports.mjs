import { createServer } from "node:net";

function canListen(port, host) {
  return new Promise((resolve) => {
    const server = createServer();
    server.once("error", (error) =>
      resolve(error.code === "EAFNOSUPPORT" || error.code === "EADDRNOTAVAIL" ? undefined : false),
    );
    server.listen({ port, host, exclusive: true }, () => server.close(() => resolve(true)));
  });
}

/** A port is free when nobody listens on either loopback address or on all addresses. */
async function isFree(port) {
  for (const host of ["127.0.0.1", "::1", "0.0.0.0", "::"]) if ((await canListen(port, host)) === false) return false;
  return true;
}

const promised = new Set();

/** The first free port from `preferred` upwards; one call never returns what another call of this process got. */
export async function freePort(preferred) {
  for (let port = preferred; port < preferred + 200; port++) {
    if (promised.has(port) || !(await isFree(port))) continue;
    promised.add(port);
    return port;
  }
  throw new Error(`No free port between ${preferred} and ${preferred + 199}.`);
}
