import type { IncomingMessage, Server, ServerResponse } from "node:http";
import type { Socket } from "node:net";

/**
 * Keeps count of which connections wait for an answer, and gives a function that closes the rest. Node's own
 * closeIdleConnections passes over those that never sent a request, and stopping would wait for them.
 */
export function trackConnections(server: Server): () => void {
  const open = new Set<Socket>();
  const waiting = new Set<Socket>();
  server.on("connection", (socket: Socket) => {
    open.add(socket);
    socket.once("close", () => {
      open.delete(socket);
      waiting.delete(socket);
    });
  });
  server.prependListener("request", ({ socket }: IncomingMessage, response: ServerResponse) => {
    waiting.add(socket);
    response.once("close", () => waiting.delete(socket));
  });
  return () => {
    for (const socket of open) if (!waiting.has(socket)) socket.destroy();
  };
}
