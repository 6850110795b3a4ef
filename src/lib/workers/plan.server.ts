/** The server's worker thread: ranks plans with the tables it was started with. It has no database. */
import { parentPort, workerData } from "node:worker_threads";
import { materialFinder } from "#src/lib/lookup/finder.ts";
import { StatementError } from "#src/lib/materials/resolve.ts";
import { rankJob, viewJob } from "#src/lib/plans/jobs.ts";
import type { PlanJob, PlanJobAnswer, PlanWorkerData } from "./plan-jobs.ts";

const { tables, known } = workerData as PlanWorkerData;
const { lookup } = materialFinder(known);

function answer(job: PlanJob): PlanJobAnswer {
  const date = new Date(job.time);
  try {
    return job.kind === "rank"
      ? { kind: "rank", answer: rankJob(job.request, tables, lookup, date) }
      : { kind: "view", view: viewJob(job.request, job.objectiveProposed, tables, lookup, date).view };
  } catch (error) {
    if (!(error instanceof StatementError)) throw error;
    const { path, code, message } = error;
    return { kind: "fault", path, code, message };
  }
}

parentPort?.on("message", (job: PlanJob) => parentPort?.postMessage(answer(job)));
