import { createServer, type RequestListener, type Server } from "node:http";

const listen = (server: Server, port: number, host: string) =>
  new Promise<void>((resolve, reject) => {
    server.once("error", reject);
    server.listen(port, host, resolve);
  });

/**
 * Serves one port on both loopback addresses, since "localhost" may mean either, and on no other address.
 *
 * @returns what closes it
 */
export async function onLoopback(port: number, listener: RequestListener): Promise<() => Promise<void>> {
  const servers = [createServer(listener)];
  await listen(servers[0]!, port, "127.0.0.1");
  const six = createServer(listener);
  await listen(six, port, "::1").then(
    () => servers.push(six),
    () => undefined, // a machine without IPv6
  );
  return async () => {
    for (const server of servers) {
      server.close();
      server.closeAllConnections();
    }
  };
}

/** Turns a rejected handler into a plain 500 instead of a hanging request. */
export const safely =
  (handler: (...args: Parameters<RequestListener>) => Promise<void>): RequestListener =>
  (request, response) => {
    handler(request, response).catch((error: unknown) => {
      console.error(error);
      if (!response.headersSent) response.writeHead(500);
      response.end();
    });
  };
