/** Starts the built program once for a project's tests, which find it by inject("baseUrl"). */
import type { TestProject } from "vitest/node";
import { startServer } from "./server.ts";

declare module "vitest" {
  interface ProvidedContext {
    /** Without a slash at the end. */
    baseUrl: string;
    /** The server's log so far, one JSON document a line. */
    serverLog: string;
  }
}

export default async function setup(project: TestProject): Promise<() => Promise<void>> {
  const server = await startServer();
  project.provide("baseUrl", server.baseUrl);
  project.provide("serverLog", server.logFile);
  return async () => {
    await server.stop();
  };
}
