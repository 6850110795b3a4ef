/**
 * The front server: everything between a caller's bytes and the pages' server. The checks run in one order, cheap and
 * raw ones first; each says no by throwing a ProblemError.
 */
import type { IncomingMessage } from "node:http";
import compress from "@fastify/compress";
import fastifyStatic from "@fastify/static";
import fastify, {
  type FastifyBaseLogger,
  type FastifyInstance,
  type FastifyReply,
  type FastifyRequest,
  LogController,
} from "fastify";
import { ProblemError } from "#src/lib/http/problems.ts";
import type { Settings } from "#src/lib/settings.ts";
import { askPages, type PageAnswer, type PageHandler } from "./adapter.ts";
import { isApiPath, problemOf, sendProblem } from "./answers.ts";
import { checkBodyHeaders, MAX_BODY_BYTES } from "./bodies.ts";
import { addressRule, replaceForwarding } from "./clientAddress.ts";
import { trackConnections } from "./connections.ts";
import { policyFor, securityHeaders } from "./headers.ts";
import { checkIdentity } from "./identity.ts";
import { lookupLimits } from "./limits.ts";
import { type Address, readAddress } from "./paths.ts";
import { createShedding, SHEDDING_LIMITS, type SheddingLimits } from "./shedding.ts";
import { checkHost, checkOrigin, siteOf } from "./site.ts";
import { staticFiles } from "./statics.ts";
import { answerUnreadable, guardServer, newRequestId } from "./unreadable.ts";

declare module "fastify" {
  interface FastifyRequest {
    address: Address;
    clientAddress: string;
  }
}

export interface Timeouts {
  readonly headersMs: number;
  /** Until the whole request, body included, has arrived. */
  readonly requestMs: number;
  readonly keepAliveMs: number;
  /** Without a byte in either direction. */
  readonly silenceMs: number;
}

const TIMEOUTS: Timeouts = { headersMs: 10_000, requestMs: 30_000, keepAliveMs: 5_000, silenceMs: 60_000 };
const MAX_HEADER_BYTES = 16 * 1024;
const MAX_CONNECTIONS = 256;
const METHODS = ["GET", "HEAD", "POST", "PUT", "PATCH", "DELETE"];

export interface FrontOptions {
  readonly settings: Pick<Settings, "publicUrl" | "trustProxy" | "limitsFactor">;
  readonly handler: PageHandler;
  /** Built files, served as they are; null: none. */
  readonly clientFolder: string | null;
  readonly log: FastifyBaseLogger;
  readonly timeouts?: Partial<Timeouts>;
  /** When requests are refused so that others are answered. */
  readonly shedding?: SheddingLimits;
}

export interface Front {
  readonly app: FastifyInstance;
  /** From now on new requests are told to come back later, and connections close after their answer. */
  startClosing(): void;
}

export async function createFront(options: FrontOptions): Promise<Front> {
  const { settings, handler, log } = options;
  const timeouts = { ...TIMEOUTS, ...options.timeouts };
  const site = siteOf(settings.publicUrl);
  const addressOf = addressRule(settings.trustProxy);
  const headers = securityHeaders(site.protocol === "https:");
  let closing = false;

  const app = fastify({
    loggerInstance: log,
    logController: new LogController({ disableRequestLogging: true }),
    genReqId: newRequestId,
    requestIdHeader: false,
    bodyLimit: MAX_BODY_BYTES,
    requestTimeout: timeouts.requestMs,
    keepAliveTimeout: timeouts.keepAliveMs,
    connectionTimeout: timeouts.silenceMs,
    return503OnClosing: false,
    exposeHeadRoutes: false,
    routerOptions: { maxParamLength: 16 * 1024 },
    http: {
      headersTimeout: Math.min(timeouts.headersMs, timeouts.requestMs),
      connectionsCheckingInterval: Math.min(1000, timeouts.requestMs / 4),
      // Above our own limits, so that we and not the parser answer; the parser's answer cannot name the address.
      maxHeaderSize: 2 * MAX_HEADER_BYTES,
      requireHostHeader: false,
    },
    clientErrorHandler: (error, socket) => {
      if (connections.isAnswering(socket)) socket.destroy();
      else answerUnreadable(error, socket, headers, log);
    },
    frameworkErrors: (error, request, reply) => {
      void sendProblem(request, reply, problemOf(error));
    },
  });
  app.server.maxConnections = MAX_CONNECTIONS;
  guardServer(app.server, headers);
  const connections = trackConnections(app.server);

  const shed = createShedding(app, options.shedding ?? SHEDDING_LIMITS);
  const limit = await lookupLimits(app, settings.limitsFactor);
  const files = options.clientFolder === null ? null : staticFiles(options.clientFolder);
  if (files !== null) await app.register(fastifyStatic, files.options);
  await app.register(compress, { encodings: ["br", "gzip"], globalDecompression: false, threshold: 1024 });

  app.removeAllContentTypeParsers();
  app.addContentTypeParser("*", { parseAs: "buffer" }, (_request, body, done) => done(null, body));
  app.decorateRequest("address", null as unknown as Address);
  app.decorateRequest("clientAddress", "");

  app.addHook("onRequest", async (request, reply) => {
    const { raw } = request;
    void reply.header("x-request-id", request.id);
    request.clientAddress = addressOf(raw.socket.remoteAddress ?? "", singleHeader(raw.headers["x-forwarded-for"]));
    replaceForwarding(raw.headers, request.clientAddress);
    checkHeaderSize(raw);
    request.address = readAddress(raw.url ?? "");
    checkHost(raw, site);
    if (!METHODS.includes(raw.method ?? "")) {
      throw new ProblemError("methodNotAllowed", `The methods here are ${METHODS.join(", ")}.`);
    }
    checkRange(raw.headers.range);
    const { path } = request.address;
    if (closing) throw new ProblemError("notReady", "The site is stopping. Try again shortly.", retryAfter(5));
    shed(reply.raw, path, files?.has(path) ?? false);
    checkBodyHeaders(raw, isApiPath(path));
    checkOrigin(raw, site);
    if (isApiPath(path)) checkIdentity(raw);
    await limit(request, request.address);
  });

  app.addHook("onSend", async (_request, reply, payload) => {
    if (closing) void reply.header("connection", "close");
    return payload;
  });

  app.addHook("onResponse", async (request, reply) => {
    // Before the site listens it only asks its own pages, to warm them.
    if (!app.server.listening) return;
    log.info({
      requestId: request.id,
      method: request.raw.method,
      path: (request.raw.url ?? "").split("?", 1)[0]?.slice(0, 256),
      status: reply.statusCode,
      ms: Math.round(reply.elapsedTime * 10) / 10,
      address: request.clientAddress,
    });
  });

  app.setErrorHandler((error, request, reply) => {
    const problem = problemOf(error);
    if (problem.code === "internal") log.error({ requestId: request.id, err: error }, "A request failed.");
    return sendProblem(request, reply, problem);
  });
  app.setNotFoundHandler((request, reply) =>
    sendProblem(request, reply, new ProblemError("notFound", "Nothing is served at this address.")),
  );

  app.route({
    method: METHODS,
    url: "/*",
    handler: async (request, reply) => {
      const { path } = request.address;
      if (files?.has(path) === true && ["GET", "HEAD"].includes(request.method)) return files.send(path, reply);

      const body = Buffer.isBuffer(request.body) ? request.body : undefined;
      const answer = await askPages(handler, request.raw, body, {
        requestId: request.id,
        clientAddress: request.clientAddress,
      });
      return sendAnswer(request, reply, answer);
    },
  });

  return {
    app,
    startClosing: () => {
      closing = true;
      connections.closeQuiet();
    },
  };
}

function checkHeaderSize(request: IncomingMessage): void {
  let size = 0;
  for (const text of request.rawHeaders) size += text.length + 2;
  if (size > MAX_HEADER_BYTES) {
    throw new ProblemError("headersTooLarge", "The headers of a request may have at most 16 KiB.");
  }
}

/** One range is served; several would make a small request cost a large answer. */
function checkRange(range: string | undefined): void {
  if (range?.includes(",") === true) {
    throw new ProblemError("rangeNotSatisfiable", "One range can be asked for at a time.");
  }
}

/** Hands on what the pages' server answered, with what it left out; failures that have no words of their own get ours. */
function sendAnswer(request: FastifyRequest, reply: FastifyReply, answer: PageAnswer): FastifyReply {
  const { status, headers, body } = answer;
  const type = String(headers["content-type"] ?? "");
  const isBare = Buffer.isBuffer(body) && body.length === 0;
  const isProblem = type.startsWith("application/problem+json");
  if (status >= 500 && (isBare || (isApiPath(request.address.path) && !isProblem))) throw new Error("A page failed.");
  // Some spellings of an address match no route; the pages' server then answers with a page.
  if (status === 404 && !isProblem && isApiPath(request.address.path)) {
    throw new ProblemError("notFound", "The API has nothing at this address; /api/v1/openapi.json lists what it has.");
  }
  if (status === 404 && isBare && request.method !== "HEAD") {
    throw new ProblemError("notFound", "Nothing is served at this address.");
  }
  const policy = headers["content-security-policy"];
  void reply.code(status).headers(headers);
  if (type === "text/html") void reply.type("text/html; charset=utf-8");
  void reply.header("content-security-policy", policyFor(type, typeof policy === "string" ? policy : undefined));
  if (!reply.hasHeader("cache-control")) void reply.header("cache-control", "no-cache");
  return reply.send(isBare ? null : body);
}

function singleHeader(value: string | string[] | undefined): string | undefined {
  return Array.isArray(value) ? value.join(",") : value;
}

function retryAfter(seconds: number): { headers: Record<string, string> } {
  return { headers: { "retry-after": String(seconds) } };
}
