/**
 * One worker thread for sums that take longer than a request should hold the main thread: a queue with an end, a time limit for each
 * sum. A worker that exceeds it is ended and another started for those who wait.
 */
import { Worker } from "node:worker_threads";

/** What may go wrong in a pool, whatever the sum. */
export class PoolError extends Error {
  override readonly name = "PoolError";
  readonly kind: "full" | "slow" | "failed";
  constructor(kind: PoolError["kind"], message: string) {
    super(message);
    this.kind = kind;
  }
}

export interface PoolOptions {
  readonly waiting: number;
  readonly limitMs: number;
}

export const POOL_OPTIONS: PoolOptions = { waiting: 16, limitMs: 2000 };

interface Waiting {
  readonly job: unknown;
  readonly resolve: (value: unknown) => void;
  readonly reject: (error: Error) => void;
}

export interface Pool {
  /** The worker's answer to a job. @throws PoolError */
  run(job: unknown): Promise<unknown>;
  close(): Promise<void>;
}

/** `data` is what the worker starts with (`workerData`). */
export function createPool(entry: URL, data: unknown, { waiting, limitMs }: PoolOptions = POOL_OPTIONS): Pool {
  const queue: Waiting[] = [];
  let worker: Worker | null = null;
  let current: (Waiting & { timer: NodeJS.Timeout }) | null = null;

  const settle = (finish: (job: Waiting) => void): void => {
    const done = current;
    current = null;
    if (done) {
      clearTimeout(done.timer);
      finish(done);
    }
    next();
  };
  const drop = (error: PoolError): void => {
    const gone = worker;
    worker = null;
    void gone?.terminate();
    settle((job) => job.reject(error));
  };
  const started = (): Worker => {
    if (worker) return worker;
    const made = new Worker(entry, { workerData: data });
    // A sum that nobody waits for must not keep the process alive.
    made.unref();
    made.on("message", (answer: unknown) => {
      if (made === worker) settle((job) => job.resolve(answer));
    });
    made.on("error", (error) => {
      if (made === worker) drop(new PoolError("failed", error.message));
    });
    worker = made;
    return made;
  };
  const next = (): void => {
    if (current) return;
    const job = queue.shift();
    if (!job) return;
    // The first sum of a worker also waits for its start and for the tables to be handed over.
    const limit = worker ? limitMs : limitMs + START_MS;
    const timer = setTimeout(
      () => drop(new PoolError("slow", `A sum took longer than ${limit / 1000} s and was given up.`)),
      limit,
    );
    current = { ...job, timer };
    started().postMessage(job.job);
  };
  return {
    run: (job) =>
      new Promise((resolve, reject) => {
        if (queue.length >= waiting) {
          reject(new PoolError("full", "Too many sums are waiting."));
          return;
        }
        queue.push({ job, resolve, reject });
        next();
      }),
    close: async () => {
      const gone = worker;
      worker = null;
      await gone?.terminate();
    },
  };
}

const START_MS = 3000;
