import { randomUUID } from 'node:crypto';
import { setTimeout as pause } from 'node:timers/promises';
import type { Sequelize } from 'sequelize';
import { makeContext, type Clock } from '#server/http/context.ts';
import { userByAccountId } from '#server/modules/identity/index.ts';
import { claimJob, closeJob, handBack, reportProgress, type AuditJob } from './audit-job.queries.ts';
import { performAudit } from './perform-audit.ts';
import { storeAudit } from './store-audit.service.ts';

/** How often the queue is looked at without being told, ms: for what a process that ended left behind. */
const LOOK_EVERY = 15_000;
/** Longest wait for the work to be laid down when the process is to end, ms. */
const LAY_DOWN = 800;
/** How often progress is written, ms. */
const REPORT_EVERY = 400;

/**
 * Works on audits one after the other, inside the server. Requests get their turn between the parts of the work.
 * What is asked stands in the database: a process that ends leaves a question behind, and the next takes it up.
 */
export class AuditRunner {
  readonly #database: Sequelize;
  readonly #clock: Clock;
  readonly #name = randomUUID();
  #working: Promise<void> | null = null;
  readonly #leaving = new AbortController();
  #job: AuditJob | null = null;
  #watch: NodeJS.Timeout | null = null;
  #onError: (error: unknown) => void = () => {};

  constructor(database: Sequelize, clock: Clock) {
    this.#database = database;
    this.#clock = clock;
  }

  /** Begins to work, where it does not already. */
  wake(): void {
    if (this.#leaving.signal.aborted) return;
    this.#working ??= this.#work()
      .catch((error: unknown) => this.#onError(error))
      .finally(() => {
        this.#working = null;
      });
  }

  /** Looks at the queue now and every few seconds, for as long as the process lives. */
  watch(onError: (error: unknown) => void): void {
    this.#onError = onError;
    this.#watch = setInterval(() => this.wake(), LOOK_EVERY).unref();
    this.wake();
  }

  /** When nothing is worked on any more. */
  async idle(): Promise<void> {
    await this.#working;
  }

  /**
   * Lays the work down within a second; what was being worked on goes back into the queue. A part that is not done by
   * then is no longer waited for: it finds its job gone, and keeps nothing.
   */
  async leave(): Promise<void> {
    this.#leaving.abort();
    if (this.#watch) clearInterval(this.#watch);
    await Promise.race([this.#working, pause(LAY_DOWN, undefined, { ref: false })]);
    if (this.#job) await handBack(this.#database, this.#job.id, this.#name);
  }

  async #work(): Promise<void> {
    while (!this.#leaving.signal.aborted) {
      const job = await claimJob(this.#database, this.#name, this.#clock);
      if (!job) return;
      this.#job = job;
      try {
        await this.#run(job);
      } catch (error) {
        // What breaks off because the database is closed under it was handed back.
        if (this.#leaving.signal.aborted) return;
        this.#onError(error);
        const message = 'The work broke off; the log of the server says where. Ask for the audit again.';
        await closeJob({ database: this.#database }, job, 'failed', message);
      }
      if (!this.#leaving.signal.aborted) this.#job = null;
    }
  }

  async #run(job: AuditJob): Promise<void> {
    const beganAt = this.#clock.now();
    let reportedAt = 0;
    const report = async (done: number, total: number): Promise<boolean> => {
      const now = performance.now();
      if (done > 0 && done < total && now - reportedAt < REPORT_EVERY) return true;
      reportedAt = now;
      return reportProgress(this.#database, this.#clock, { id: job.id, runner: this.#name, done, total });
    };
    const performed = await performAudit(this.#database, job, report, this.#leaving.signal);
    if (!performed) return;
    const user = await userByAccountId(this.#database, this.#clock, job.askedBy);
    const context = makeContext({
      database: this.#database,
      clock: this.#clock,
      user,
      requestId: `audit ${job.id}`,
    });
    await storeAudit(context, job, performed, beganAt, this.#leaving.signal);
  }
}

const runners = new WeakMap<Sequelize, AuditRunner>();

/** The one runner per database pool. */
export function auditRunnerOf({ database, clock }: { database: Sequelize; clock: Clock }): AuditRunner {
  const known = runners.get(database);
  if (known) return known;
  const runner = new AuditRunner(database, clock);
  runners.set(database, runner);
  return runner;
}
