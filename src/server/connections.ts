import type { IncomingMessage, Server, ServerResponse } from "node:http";
import type { Socket } from "node:net";

export interface Connections {
  /** Closes those that wait for no answer. */
  closeQuiet(): void;
  /** Whether part of an answer was sent on it already: nothing else may be written then. */
  isAnswering(socket: Socket): boolean;
}

/**
 * Keeps count of which connections wait for an answer. Node's own closeIdleConnections passes over those that never sent
 * a request, and stopping would wait for them.
 */
export function trackConnections(server: Server): Connections {
  // Answers under way; a caller may send its next request before the last is answered.
  const open = new Map<Socket, Set<ServerResponse>>();
  server.on("connection", (socket: Socket) => {
    open.set(socket, new Set());
    socket.once("close", () => open.delete(socket));
  });
  server.prependListener("request", ({ socket }: IncomingMessage, response: ServerResponse) => {
    open.get(socket)?.add(response);
    response.once("close", () => open.get(socket)?.delete(response));
  });
  return {
    closeQuiet: () => {
      for (const [socket, answers] of open) if (answers.size === 0) socket.destroy();
    },
    isAnswering: (socket) => [...(open.get(socket) ?? [])].some((answer) => answer.headersSent),
  };
}
