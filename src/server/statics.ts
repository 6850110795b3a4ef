/** Built files. The list is made at start, so no path of a caller ever reaches the file system. */
import { readdirSync } from "node:fs";
import { join, relative, sep } from "node:path";
import type { FastifyStaticOptions } from "@fastify/static";
import type { FastifyReply } from "fastify";

export interface StaticFiles {
  readonly options: FastifyStaticOptions;
  has(path: string): boolean;
  send(path: string, reply: FastifyReply): FastifyReply;
}

/** File names here carry a hash of their content. */
const HASHED = "/_astro/";

export function staticFiles(folder: string): StaticFiles {
  const paths = new Set(
    readdirSync(folder, { recursive: true, withFileTypes: true })
      .filter((entry) => entry.isFile() && !/\.(br|gz)$/.test(entry.name))
      .map((entry) => `/${relative(folder, join(entry.parentPath, entry.name)).split(sep).join("/")}`),
  );
  return {
    options: { root: folder, serve: false, preCompressed: true },
    has: (path) => paths.has(path),
    send: (path, reply) => {
      const hashed = path.startsWith(HASHED);
      void reply.header("vary", "accept-encoding").header("content-security-policy", FILE_POLICY);
      return reply.sendFile(path.slice(1), { maxAge: hashed ? "365d" : 0, immutable: hashed });
    },
  };
}

/** Scripts of workers are bound by the policy of their own file. */
const FILE_POLICY =
  "default-src 'self'; object-src 'none'; base-uri 'none'; form-action 'none'; frame-ancestors 'none'";
