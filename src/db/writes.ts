/**
 * One write at a time. SQLite has one writer; its wait for the lock is synchronous and would freeze the whole process,
 * so writes of this process queue here instead, and a lock held by another process is tried again without blocking.
 * Inside a transaction use only what the transaction offers: the outer client would wait for ever.
 */
import type { Client, InStatement, Transaction, TransactionMode } from "@libsql/client";
import { DatabaseBusyError, sqliteCode } from "./errors.ts";

/** How long a write waits for its turn, and for a lock of another process, before the caller is told to try later. */
const WAIT_LIMIT_MS = 2000;

const isRead = (statement: InStatement): boolean =>
  /^\s*(select|explain|pragma)\b/i.test(typeof statement === "string" ? statement : statement.sql);

/** The client with every write (execute other than reads, batch, migrate, executeMultiple, transaction) behind one queue. */
export function withWriteQueue(client: Client, waitLimitMs = WAIT_LIMIT_MS): Client {
  const turn = createTurns(waitLimitMs);
  const alone = async <T>(work: () => Promise<T>): Promise<T> => {
    const done = await turn();
    try {
      return await retryWhileBusy(work, waitLimitMs);
    } finally {
      done();
    }
  };

  const queued: Partial<Client> = {
    execute: ((statement: InStatement, args?: never) =>
      isRead(statement)
        ? client.execute(statement as string, args)
        : alone(() => client.execute(statement as string, args))) as Client["execute"],
    batch: (statements, mode) =>
      mode === "read" ? client.batch(statements, mode) : alone(() => client.batch(statements, mode ?? "write")),
    migrate: (statements) => alone(() => client.migrate(statements)),
    executeMultiple: (sql) => alone(() => client.executeMultiple(sql)),
    transaction: async (mode?: TransactionMode) => {
      if (mode === "read") return client.transaction(mode);
      const done = await turn();
      try {
        return releaseAtEnd(await retryWhileBusy(() => client.transaction(mode ?? "write"), waitLimitMs), done);
      } catch (error) {
        done();
        throw error;
      }
    },
  };
  return new Proxy(client, {
    get(target, key) {
      if (Object.hasOwn(queued, key)) return queued[key as keyof Client];
      const value: unknown = Reflect.get(target, key, target);
      return typeof value === "function" ? (value.bind(target) as unknown) : value;
    },
  });
}

/** A queue: each caller gets its turn when the one before has called the function it was given. */
function createTurns(waitLimitMs: number): () => Promise<() => void> {
  let last: Promise<void> = Promise.resolve();
  return async () => {
    const before = last;
    let done = (): void => undefined;
    const mine = new Promise<void>((resolve) => (done = resolve));
    last = before.then(() => mine);
    const timer = timeLimit(waitLimitMs);
    try {
      await Promise.race([before, timer.expired]);
    } catch (error) {
      done();
      throw error;
    } finally {
      timer.clear();
    }
    return done;
  };
}

function timeLimit(limitMs: number): { expired: Promise<never>; clear: () => void } {
  let timer: NodeJS.Timeout | undefined;
  const expired = new Promise<never>((_, reject) => {
    timer = setTimeout(() => reject(new DatabaseBusyError("Writes are queued for too long.")), limitMs);
  });
  expired.catch(() => undefined);
  return { expired, clear: () => clearTimeout(timer) };
}

async function retryWhileBusy<T>(work: () => Promise<T>, limitMs: number): Promise<T> {
  const end = performance.now() + limitMs;
  for (;;) {
    try {
      return await work();
    } catch (error) {
      if (sqliteCode(error) !== "SQLITE_BUSY") throw error;
      if (performance.now() >= end) {
        throw new DatabaseBusyError("The database is held by another process.", { cause: error });
      }
      // Jitter, so that several waiting processes do not meet again at the same moment.
      await new Promise((resolve) => setTimeout(resolve, 20 + Math.random() * 40));
    }
  }
}

/** Gives the turn back when the transaction ends, whichever way. */
function releaseAtEnd(transaction: Transaction, done: () => void): Transaction {
  const { commit, rollback, close } = transaction;
  transaction.commit = () => commit.call(transaction).finally(done);
  transaction.rollback = () => rollback.call(transaction).finally(done);
  transaction.close = () => {
    close.call(transaction);
    done();
  };
  return transaction;
}
